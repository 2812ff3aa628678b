import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { type FormControl, type FormGroup, ReactiveFormsModule } from '@angular/forms';
import type { ElementRow } from '@shared/contract';
import { prettyUnit } from '@shared/units';
import { startWith, switchMap } from 'rxjs';
import { type ProblemError } from '../../core/http/problem-error';
import { StudyContext } from '../../core/study/study-context';
import { Control, Field } from '../../ui/field/field';
import { refusedField } from '../../core/acts/refused-field';
import { BLANK, type RequirementText, faultsOf } from './requirement-text';
import { isTypedTemperature, readAny, understood } from './typed-limit';

export type RequirementForm = FormGroup<{ [K in keyof RequirementText]: FormControl<RequirementText[K]> }>;
type Finding = { readonly code: string; readonly blocks: boolean; readonly message: string };

const REFUSED: Readonly<Partial<Record<keyof RequirementText, readonly string[]>>> = {
  value: ['limit', 'limit.value', 'limit.value.text', 'limit.value.unit', 'limit.temperature'],
  upper: ['limit.upper', 'limit.upper.text', 'limit.upper.unit'],
  tolerance: ['limit.tolerance', 'limit.tolerance.text', 'limit.tolerance.unit'],
  relation: ['limit.relation'],
  condition: ['limit.condition'],
  action: ['openItem.action'],
  estimate: ['openItem.estimate'],
  due: ['openItem.due'],
  openPersonId: ['openItem.personId'],
  openRationale: ['openItem.rationale'],
};

/** The fields of a requirement with what is wrong beside each, and what its wording lacks while it is written. */
@Component({
  selector: 'dp-requirement-fields',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field, ReactiveFormsModule],
  templateUrl: './requirement-fields.html',
  styleUrl: './requirement-fields.scss',
})
export class RequirementFields {
  readonly form = input.required<RequirementForm>();
  readonly isNew = input(false);
  readonly elements = input<readonly ElementRow[]>([]);
  /** What the server refused. */
  readonly problem = input<ProblemError | null>(null);
  /** True once it was tried to save: then what is missing is said too. */
  readonly asked = input(false);

  private readonly context = inject(StudyContext);
  private readonly values = toSignal(toObservable(this.form).pipe(switchMap((form) => toObservableOf(form))), {
    initialValue: BLANK,
  });
  protected readonly typed = computed<RequirementText>(() => ({ ...BLANK, ...this.values() }));

  private readonly head = this.context.head.value;
  protected readonly levels = computed(() => this.head()?.study.levels ?? []);
  protected readonly members = computed(() => this.head()?.members ?? []);
  protected readonly parameters = computed(() => [
    ...new Set([
      ...(this.head()?.policies ?? []).map((policy) => policy.parameter),
      ...(this.typed().parameter === '' ? [] : [this.typed().parameter]),
    ]),
  ]);
  protected readonly policyHint = computed(() => {
    const { parameter } = this.typed();
    if (parameter === '') return 'What the limit is about; the margin policy asks for a margin by it.';
    const maturity = this.head()?.study.maturity;
    const policy = this.head()?.policies.find((row) => row.parameter === parameter && row.maturity === maturity);
    if (policy === undefined) return 'No margin is asked for at this maturity.';
    const { percent, absolute, maturity: at } = policy;
    // Rows written before there were absolute margins come without the field.
    if (!absolute) return `The policy asks for a margin of ${percent} % at ${at}.`;
    const elsewhere = percent > 0 ? `, and of ${percent} % for limits in other units` : '';
    return `The policy asks for a margin of ${absolute.text} ${prettyUnit(absolute.unit)}${elsewhere} at ${at}.`;
  });
  protected readonly isTemperature = computed(() => isTypedTemperature(this.typed().value));
  protected readonly understood = computed(() => understood(this.typed().value));
  protected readonly findings = signal<readonly Finding[]>([]);

  protected readonly messages = computed<Partial<Record<keyof RequirementText, string>>>(() => {
    const text = this.typed();
    const faults = faultsOf(text, this.isNew());
    const message = (name: keyof RequirementText): string => {
      const fault = faults[name];
      // Before saving only what was typed is judged, not what is still to be typed.
      if (fault !== undefined && (this.asked() || (isJudgedAtOnce(name) && text[name] !== ''))) return fault;
      return refusedField(this.problem(), ...(REFUSED[name] ?? [name]));
    };
    return Object.fromEntries((Object.keys(BLANK) as (keyof RequirementText)[]).map((name) => [name, message(name)]));
  });

  constructor() {
    effect((onCleanup) => {
      const { text, relation, value } = this.typed();
      if (text.trim() === '') return this.findings.set([]);
      let isCurrent = true;
      onCleanup(() => (isCurrent = false));
      // The rules are the server's own; they come with the study core, which the page does without until somebody writes.
      void import('@shared/study').then(({ wordingFindings }) => {
        const isLimited = relation !== '' && readAny(value).ok;
        const limit = isLimited ? PLACEHOLDER : null;
        if (isCurrent) this.findings.set(wordingFindings({ text, limit }));
      });
    });
  }
}

/** The wording rules only ask whether there is a limit. */
const PLACEHOLDER = {
  relation: 'at least',
  value: { text: '1', unit: '', si: 1 },
  upper: null,
  tolerance: null,
  temperature: 'absolute',
  condition: '',
} as const;

function isJudgedAtOnce(name: keyof RequirementText): boolean {
  return name === 'prefix';
}

function toObservableOf(form: RequirementForm) {
  return form.valueChanges.pipe(startWith(form.value));
}
