import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { Router } from '@angular/router';
import { mayGive } from '@shared/contract/permissions';
import { StudyContext } from '../../core/study/study-context';
import { TitleBlock } from '../../core/title-block';
import { addressWriter } from '../../ui/address/address';
import { Tex } from '../../ui/proof/tex';
import { WordFilter } from '../../ui/word-filter/word-filter';
import { AnalysesApi, type MethodView } from '../analyses-api';
import { filtered, givenBy, newest } from './method-filter';

/** The library of published methods: equation, validity, reference, cautions and the checks each has passed. */
@Component({
  selector: 'dp-method-picker',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Tex, WordFilter],
  templateUrl: './method-picker.html',
  styleUrl: './method-picker.scss',
})
export class MethodPicker {
  private readonly api = inject(AnalysesApi);
  private readonly router = inject(Router);
  private readonly context = inject(StudyContext);
  private readonly toAddress = addressWriter();

  /** Filters from the address. */
  readonly concept = input<string>();
  readonly gives = input<string>();
  readonly q = input<string>();

  private readonly library = toSignal(this.api.library);
  protected readonly isReady = computed(() => this.library() !== undefined);
  private readonly all = computed(() => newest(this.library()?.methods ?? []));
  private readonly filter = computed(() => ({
    concept: this.concept() ?? '',
    gives: this.gives() ?? '',
    q: this.q() ?? '',
  }));
  protected readonly concepts = computed(() => {
    const methods = filtered(this.all(), { ...this.filter(), concept: '' });
    const names = [...new Set(this.all().flatMap(({ concepts }) => concepts))];
    return [
      { value: '', label: 'Every concept', count: methods.length },
      ...names.map((name) => ({
        value: name,
        label: name.charAt(0).toUpperCase() + name.slice(1).replaceAll('-', ' '),
        count: methods.filter(({ concepts }) => concepts.includes(name)).length,
      })),
    ];
  });
  protected readonly quantities = computed(() =>
    [...new Set(this.all().flatMap((method) => givenBy(method)))].sort((a, b) => a.localeCompare(b, 'en')),
  );
  protected readonly methods = computed(() =>
    filtered(this.all(), this.filter()).map((method) => ({
      method,
      takes: [...method.inputs, ...(method.group?.ports ?? [])].map(({ label }) => label).join(', '),
      outputs: method.outputs.map(({ label }) => label).join(', '),
      checks: checksInWords(method.checks.length),
    })),
  );
  protected readonly mayUse = computed(
    () =>
      this.context.isEditable() &&
      mayGive(this.context.standpoint().kind === 'draft' ? 'change.amend' : 'analysis.create', this.context.roles()),
  );

  constructor() {
    inject(TitleBlock).register({
      name: () => 'Methods',
      actions: () => [{ label: 'All analyses', run: () => void this.go(['analyses']) }],
    });
  }

  protected narrow(name: 'concept' | 'gives' | 'q', value: string): void {
    this.toAddress({ [name]: value });
  }

  protected use(method: MethodView): void {
    void this.go(['analyses', 'new'], { method: method.id });
  }

  private go(segments: readonly string[], query: Readonly<Record<string, string>> = {}): Promise<boolean> {
    return this.router.navigate(this.context.link(...segments), {
      queryParams: { ...this.context.readParams(), ...query },
    });
  }
}

function checksInWords(checks: number): string {
  if (checks === 0) return 'No published value to compare with; checked by a second route.';
  return `Reproduces ${checks} reference ${checks === 1 ? 'check' : 'checks'} in this build.`;
}
