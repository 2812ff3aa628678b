import {
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { Router, RouterLink } from '@angular/router';
import type { Command, EditCommand, QuantityRow } from '@shared/contract';
import { mayGive } from '@shared/contract/permissions';
import { formatSi, parseUnit, siUnitOf } from '@shared/units';
import { firstValueFrom, map } from 'rxjs';
import { Drafts } from '../../core/drafts/drafts';
import { load } from '../../core/http/load';
import { type ProblemError, toProblem } from '../../core/http/problem-error';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { Edits } from '../../core/study/edits';
import { StudyContext } from '../../core/study/study-context';
import { type SheetAction, TitleBlock } from '../../core/title-block';
import { Acts } from '../../core/acts/acts';
import { ProposeChange } from '../../core/acts/propose-change';
import { Ask } from '../../ui/ask/ask';
import { type ConflictField, ConflictView, type Side } from '../../ui/conflict/conflict-view';
import { Control, Field } from '../../ui/field/field';
import { QuantityField } from '../../ui/measure/quantity-field';
import { Tex } from '../../ui/proof/tex';
import { Waiting } from '../../ui/waiting/waiting';
import { refusedField } from '../../core/acts/refused-field';
import { QuantitiesApi } from '../quantities-api';
import { QuantityEdits } from '../quantity-edits';
import { BASES, shownUncertainty, shownValue } from '../quantity-text';
import {
  BLANK,
  type QuantityTextField,
  boundsInWords,
  changedFields,
  faultsOf,
  fieldsOf,
  textOf,
} from './quantity-form';

const LABELS: Readonly<Record<QuantityTextField, string>> = {
  symbol: 'Symbol',
  name: 'Name',
  kind: 'Kind',
  unit: 'Unit',
  temperature: 'What the temperature is',
  value: 'Value',
  halfWidth: 'Uncertainty, half-width',
  distribution: 'Distribution',
  k: 'Coverage factor k',
  basis: 'Basis',
  source: 'Source',
  elementId: 'Element',
};

/** One quantity in full, or a new one: what it is, its value and where that comes from. */
@Component({
  selector: 'dp-quantity-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ConflictView, Control, Field, QuantityField, ReactiveFormsModule, RouterLink, Tex, Waiting],
  providers: [QuantityEdits],
  templateUrl: './quantity-page.html',
  styleUrl: './quantity-page.scss',
})
export class QuantityPage {
  /** From the address; undefined for a new one. */
  readonly key = input<string>();

  private readonly api = inject(QuantitiesApi);
  private readonly edits = inject(Edits);
  private readonly rowEdits = inject(QuantityEdits);
  private readonly acts = inject(Acts);
  private readonly ask = inject(Ask);
  private readonly drafts = inject(Drafts);
  private readonly proposals = inject(ProposeChange);
  private readonly router = inject(Router);
  private readonly units = inject(UnitPreferences);
  private readonly owner = inject(DestroyRef);
  protected readonly context = inject(StudyContext);

  protected readonly register = load(
    () => this.context.readKey(),
    () => this.api.register(),
    { discard: (previous, next) => previous.study !== next.study || previous.at !== next.at },
  );
  private readonly tree = load(
    () => this.context.readKey(),
    () => this.api.productTree(),
  );
  protected readonly kinds = toSignal(this.api.kinds, { initialValue: [] });
  protected readonly elements = computed(() => this.tree.value()?.rows ?? []);
  protected readonly bases = BASES;

  protected readonly isNew = computed(() => this.key() === undefined);
  protected readonly row = computed(() => this.register.value()?.rows.find((row) => row.key === this.key()));
  protected readonly isMissing = computed(
    () => this.register.value() !== undefined && !this.isNew() && this.row() === undefined,
  );
  protected readonly mayEdit = computed(() => {
    const row = this.row();
    if (row !== undefined) return this.rowEdits.mayEdit(row);
    return this.isNew() && this.context.isEditable();
  });
  private readonly isProposal = computed(
    () => this.row()?.state === 'controlled' && this.context.standpoint().kind !== 'draft',
  );

  protected readonly form = inject(NonNullableFormBuilder).group({ ...BLANK });
  protected readonly typed = toSignal(this.form.valueChanges.pipe(map(() => this.form.getRawValue())), {
    initialValue: BLANK,
  });
  protected readonly isRestored = signal(false);
  private readonly asked = signal(false);
  private readonly busy = signal(false);
  private readonly problem = signal<ProblemError | null>(null);
  /** The row as the form was filled from it. */
  private readonly base = signal<QuantityRow | undefined>(undefined);

  private readonly faults = computed(() => faultsOf(this.typed()));
  protected readonly unplaced = computed(() => {
    const problem = this.problem();
    if (problem === null || problem.code === 'stale') return null;
    return this.fieldNames().some((field) => this.refused(field) !== '') ? null : problem;
  });
  protected readonly conflict = computed<readonly ConflictField[] | null>(() => {
    const row = this.row();
    if (this.problem()?.code !== 'stale' || row === undefined) return null;
    const [theirs, mine] = [textOf(row), this.typed()];
    return this.fieldNames().map((field) => ({
      field,
      label: LABELS[field],
      theirs: theirs[field],
      mine: mine[field],
    }));
  });
  private readonly parsedUnit = computed(() => parseUnit(this.typed().unit.trim()));
  protected readonly knownUnit = computed(() => (this.parsedUnit().ok ? this.typed().unit.trim() : ''));
  protected readonly isTemperature = computed(() => {
    const parsed = this.parsedUnit();
    return parsed.ok && siUnitOf(parsed.unit.dimension) === 'K';
  });
  protected readonly temperature = computed(() =>
    this.typed().temperature === 'difference' ? ('difference' as const) : ('absolute' as const),
  );
  protected readonly bounds = computed(() => {
    const kind = this.kinds().find(({ id }) => id === this.typed().kind);
    if (kind === undefined) return 'A kind brings its physical bounds: values outside them are refused.';
    const options = kind.temperature ? { temperature: kind.temperature } : {};
    return boundsInWords(kind, (si) => formatSi(si, kind.unit, { ...options, digits: 6 }));
  });

  constructor() {
    inject(TitleBlock).register({ name: () => this.key() ?? 'New quantity', actions: () => this.actions() });
    effect(() => {
      if (this.isNew())
        untracked(() => this.isRestored.set(this.drafts.follow(this.draftKey(), this.form, this.owner)));
    });
    // A newer state fills the form only as long as nothing was typed into it.
    effect(() => {
      const row = this.row();
      if (row !== undefined && !this.form.dirty) untracked(() => this.fill(row));
    });
  }

  protected value(row: QuantityRow): string {
    return shownValue(row, this.units.show.bind(this.units));
  }

  protected uncertainty(row: QuantityRow): string {
    return shownUncertainty(row, this.units.show.bind(this.units));
  }

  protected fault(field: QuantityTextField): string {
    return (this.asked() ? (this.faults()[field] ?? '') : '') || this.refused(field);
  }

  /** A kind brings a unit of its dimension, and says whether a temperature is a difference. */
  protected takeUnitOfKind(): void {
    const kind = this.kinds().find(({ id }) => id === this.form.controls.kind.value);
    if (kind === undefined) return;
    const [has, needs] = [this.parsedUnit(), parseUnit(kind.unit)];
    const fits = has.ok && needs.ok && has.unit.dimension === needs.unit.dimension && this.typed().unit !== '';
    this.form.patchValue({ ...(fits ? {} : { unit: kind.unit }), temperature: kind.temperature ?? 'absolute' });
  }

  protected resolve(chosen: Readonly<Record<string, Side>>): void {
    const row = this.row();
    if (row === undefined) return;
    const theirs = textOf(row);
    this.form.patchValue(
      Object.fromEntries(
        this.fieldNames()
          .filter((field) => chosen[field] === 'theirs')
          .map((field) => [field, theirs[field]]),
      ),
    );
    this.base.set(row);
    this.problem.set(null);
  }

  protected throwAway(): void {
    this.drafts.discard(this.draftKey());
    this.isRestored.set(false);
    this.asked.set(false);
    this.problem.set(null);
    const row = this.row();
    if (row === undefined) this.form.reset({ ...BLANK });
    else this.fill(row);
  }

  protected async save(): Promise<void> {
    this.asked.set(true);
    this.problem.set(null);
    if (this.busy() || Object.keys(this.faults()).length > 0) return this.showFirstFault();
    const command = this.command();
    if (command === null) return;
    if (this.isProposal()) return this.propose(command);
    this.busy.set(true);
    try {
      const answer = await firstValueFrom(this.edits.give([command]));
      this.drafts.discard(this.draftKey());
      this.form.markAsPristine();
      this.asked.set(false);
      const key = this.key() ?? answer.created[0]?.key;
      this.acts.tell(answer, this.isNew() ? `${key ?? 'The quantity'} was added` : `${key} was saved`);
      if (this.isNew())
        await this.router.navigate(this.context.link('quantities'), {
          queryParams: { ...this.context.readParams(), ...(key === undefined ? {} : { select: key }) },
        });
    } catch (error) {
      this.problem.set(toProblem(error));
      if (toProblem(error).code === 'stale') this.register.reload();
      this.showFirstFault();
    } finally {
      this.busy.set(false);
    }
  }

  /** What has been typed as one command; null when nothing differs. */
  private command(): EditCommand | null {
    const base = this.base();
    if (base === undefined) return { type: 'quantity.create', ...fieldsOf(this.typed()) };
    const changes = changedFields(textOf(base), this.typed());
    if (Object.keys(changes).length === 0) return null;
    return { type: 'quantity.revise', id: base.id, version: base.version, changes };
  }

  private async propose(command: EditCommand): Promise<void> {
    const row = this.row();
    if (row === undefined) return;
    await this.proposals.open({
      title: `Change ${row.key} ${row.name}`,
      what: `${row.key} ${row.name} is controlled`,
      edits: [command],
    });
  }

  private actions(): readonly SheetAction[] {
    const back: SheetAction = { label: this.isNew() ? 'Leave it' : 'All quantities', run: () => void this.goBack() };
    if (!this.mayEdit()) return [back];
    const row = this.row();
    const isWorking = row?.state === 'working' && mayGive('quantity.remove', this.context.roles());
    return [
      back,
      ...(row !== undefined && isWorking ? [{ label: 'Remove', run: () => void this.remove(row) }] : []),
      {
        label: this.isNew() ? 'Save the quantity' : this.isProposal() ? 'Propose a change' : 'Save',
        main: true,
        shortcut: 'Ctrl+Enter',
        disabled: this.busy(),
        run: () => void this.save(),
      },
    ];
  }

  private async remove(row: QuantityRow): Promise<void> {
    const answer = await this.ask.ask({
      title: `Remove ${row.key}?`,
      text: `${row.name} leaves the register. What was recorded stays in the ledger.`,
      action: `Remove ${row.key}`,
    });
    if (answer === undefined) return;
    const command: Command = { type: 'quantity.remove', id: row.id, version: row.version };
    if (await this.acts.give([command], `${row.key} was removed`)) await this.goBack();
  }

  private goBack(): Promise<boolean> {
    const key = this.key();
    return this.router.navigate(this.context.link('quantities'), {
      queryParams: { ...this.context.readParams(), ...(key === undefined ? {} : { select: key }) },
    });
  }

  private fill(row: QuantityRow): void {
    this.base.set(row);
    this.form.reset({ ...textOf(row) });
  }

  private refused(field: QuantityTextField): string {
    if (field === 'halfWidth') return refusedField(this.problem(), 'uncertainty', 'uncertainty.halfWidth');
    if (field === 'k') return refusedField(this.problem(), 'uncertainty.k');
    return refusedField(this.problem(), field, ...(field === 'value' ? ['value.text', 'value.unit'] : []));
  }

  private fieldNames(): readonly QuantityTextField[] {
    return Object.keys(LABELS) as QuantityTextField[];
  }

  private draftKey(): string {
    return `new-quantity.${this.context.study() ?? ''}`;
  }

  private showFirstFault(): void {
    requestAnimationFrame(() => document.querySelector<HTMLElement>('form [aria-invalid="true"]')?.focus());
  }
}
