import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { mayGive } from '@shared/contract/permissions';
import { load } from '../../core/http/load';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { StudyContext } from '../../core/study/study-context';
import { type SheetAction, TitleBlock } from '../../core/title-block';
import { addressWriter, matchesWords } from '../../ui/address/address';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { KeyLink } from '../../ui/key-link/key-link';
import { VerdictMark } from '../../ui/verdict/verdict-mark';
import { Waiting } from '../../ui/waiting/waiting';
import { WordFilter } from '../../ui/word-filter/word-filter';
import { AnalysesApi } from '../analyses-api';

const STANDS = [
  { value: '', label: 'All' },
  { value: 'draft', label: 'Draft' },
  { value: 'checked', label: 'Checked' },
  { value: 'controlled', label: 'Controlled' },
  { value: 'unlinked', label: 'Verifies nothing' },
] as const;

/** All analyses: what each is, what it verifies, and whether somebody else has checked it. */
@Component({
  selector: 'dp-analyses',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [EmptyState, KeyLink, RouterLink, VerdictMark, Waiting, WordFilter],
  templateUrl: './analyses.html',
  styleUrl: './analyses.scss',
})
export class Analyses {
  private readonly api = inject(AnalysesApi);
  private readonly router = inject(Router);
  private readonly units = inject(UnitPreferences);
  private readonly toAddress = addressWriter();
  protected readonly context = inject(StudyContext);

  /** Filters from the address. */
  readonly state = input<string>();
  readonly q = input<string>();

  protected readonly view = load(
    () => this.context.readKey(),
    () => this.api.list(),
    { discard: (previous, next) => previous.study !== next.study || previous.at !== next.at },
  );
  private readonly found = computed(() =>
    (this.view.value()?.rows ?? []).filter((row) =>
      matchesWords(
        this.q() ?? '',
        ...[row.key, row.name, row.methodName, row.element, row.author.name],
        ...row.verifies.flatMap(({ key, title }) => [key, title]),
        ...row.outputs.flatMap(({ name, label }) => [name, label]),
      ),
    ),
  );
  protected readonly states = computed(() =>
    STANDS.map((stand) => ({ ...stand, count: this.found().filter((row) => stands(row, stand.value)).length })).filter(
      ({ count, value }) => count > 0 || value === '' || value === this.state(),
    ),
  );
  protected readonly rows = computed(() =>
    this.found()
      .filter((row) => stands(row, this.state() ?? ''))
      .map((row) => ({
        ...row,
        // The last output is what an analysis is usually written for.
        gives: row.outputs.slice(-1).map(({ name, shown }) => `${name} = ${this.units.shown(shown)}`)[0] ?? '',
      })),
  );
  protected readonly mayWrite = computed(
    () =>
      this.context.isEditable() &&
      mayGive(this.context.standpoint().kind === 'draft' ? 'change.amend' : 'analysis.create', this.context.roles()),
  );

  constructor() {
    inject(TitleBlock).register({ actions: () => this.actions() });
  }

  protected narrow(name: 'state' | 'q', value: string): void {
    this.toAddress({ [name]: value });
  }

  private actions(): readonly SheetAction[] {
    if (!this.mayWrite()) return [{ label: 'See the methods', run: () => this.go(['methods']) }];
    return [
      { label: 'Bring in results', run: () => this.go(['new'], { kind: 'external' }) },
      { label: 'Use a method', run: () => this.go(['methods']) },
      { label: 'Write an analysis', main: true, shortcut: 'n', run: () => this.go(['new']) },
    ];
  }

  private go(segments: readonly string[], query: Readonly<Record<string, string>> = {}): void {
    void this.router.navigate(this.context.link('analyses', ...segments), {
      queryParams: { ...this.context.readParams(), ...query },
    });
  }
}

function stands(
  row: { readonly state: string; readonly controlled: boolean; readonly verifies: readonly unknown[] },
  state: string,
): boolean {
  switch (state) {
    case '':
      return true;
    case 'controlled':
      return row.controlled;
    case 'unlinked':
      return row.verifies.length === 0;
    default:
      return row.state === state;
  }
}
