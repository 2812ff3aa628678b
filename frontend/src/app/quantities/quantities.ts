import { BreakpointObserver } from '@angular/cdk/layout';
import { ChangeDetectionStrategy, Component, computed, inject, input, viewChild } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { Router } from '@angular/router';
import type { QuantityRow } from '@shared/contract';
import { mayGive } from '@shared/contract/permissions';
import { map } from 'rxjs';
import { ErrorLine } from '../core/errors/error-line';
import { load } from '../core/http/load';
import { StudyContext } from '../core/study/study-context';
import { TitleBlock } from '../core/title-block';
import { addressWriter } from '../ui/address/address';
import { ConflictView, type Side } from '../ui/conflict/conflict-view';
import { EmptyState } from '../ui/empty-state/empty-state';
import { Waiting } from '../ui/waiting/waiting';
import { WordFilter } from '../ui/word-filter/word-filter';
import { QuantityGrid } from './grid/quantity-grid';
import { QuantitiesApi } from './quantities-api';
import { type Held, QuantityEdits } from './quantity-edits';
import { type FilterName, type QuantityFilter, UNBOUND, filtered, hasState } from './quantity-filter';
import { QuantityList } from './quantity-list';
import { quantityTableText } from './quantity-table-text';
import { BASES, uncertaintyText, valueText } from './quantity-text';

const STATES = ['', 'working', 'controlled', 'change pending', 'without value', UNBOUND];

/** The register of quantities: every number that analyses rest on, with what it bears on. */
@Component({
  selector: 'dp-quantities',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ConflictView, EmptyState, QuantityGrid, QuantityList, Waiting, WordFilter],
  providers: [QuantityEdits],
  templateUrl: './quantities.html',
  styleUrl: './quantities.scss',
})
export class Quantities {
  private readonly api = inject(QuantitiesApi);
  private readonly line = inject(ErrorLine);
  private readonly router = inject(Router);
  private readonly toAddress = addressWriter();
  private readonly grid = viewChild(QuantityGrid);
  protected readonly edits = inject(QuantityEdits);
  protected readonly context = inject(StudyContext);

  /** Filters, order and the chosen row, from the address. */
  readonly state = input<string>();
  readonly basis = input<string>();
  readonly element = input<string>();
  readonly q = input<string>();
  readonly sort = input<string>();
  readonly select = input<string>();

  protected readonly register = load(
    () => this.context.readKey(),
    () => this.api.register(),
    { discard: (previous, next) => previous.study !== next.study || previous.at !== next.at },
  );
  protected readonly isNarrow = toSignal(
    inject(BreakpointObserver)
      .observe('(max-width: 720px)')
      .pipe(map(({ matches }) => matches)),
    { initialValue: false },
  );
  protected readonly bases = BASES;

  private readonly all = computed(() => this.register.value()?.rows ?? []);
  private readonly filter = computed<QuantityFilter>(() => ({
    state: this.state() ?? '',
    basis: this.basis() ?? '',
    element: this.element() ?? '',
    q: this.q() ?? '',
  }));
  protected readonly rows = computed(() => filtered(this.all(), this.filter()));
  protected readonly isFiltered = computed(() => Object.values(this.filter()).some((part) => part !== ''));
  protected readonly states = computed(() => {
    const rows = filtered(this.all(), { ...this.filter(), state: '' });
    return STATES.map((state) => ({
      value: state,
      label: state === '' ? 'All' : state.charAt(0).toUpperCase() + state.slice(1),
      count: rows.filter((row) => hasState(row, state)).length,
    })).filter(({ value, count }) => count > 0 || value === '' || value === this.filter().state);
  });
  protected readonly elements = computed(() =>
    [...new Set(this.all().map((row) => row.element))]
      .filter((key) => key !== '')
      .sort((a, b) => a.localeCompare(b, 'en')),
  );
  protected readonly mayAdd = computed(
    () =>
      this.context.isEditable() &&
      mayGive(this.context.standpoint().kind === 'draft' ? 'change.amend' : 'quantity.create', this.context.roles()),
  );

  constructor() {
    inject(TitleBlock).register({
      actions: () => [
        { label: 'Copy rows', run: () => void this.copy() },
        ...(this.mayAdd() ? [{ label: 'Add a quantity', main: true, shortcut: 'n', run: () => this.add() }] : []),
      ],
    });
  }

  protected narrow(name: FilterName | 'sort', value: string): void {
    this.toAddress({ [name]: value });
  }

  protected clear(): void {
    this.toAddress({ state: '', basis: '', element: '', q: '' });
  }

  protected open(row: QuantityRow): void {
    void this.router.navigate(this.context.link('quantities', row.key), { queryParams: this.context.readParams() });
  }

  protected again(held: Held): void {
    const now = this.now(held);
    if (this.isNarrow()) this.open(now);
    else this.grid()?.editAgain(now, held.field);
  }

  /** What stands now beside what was typed, where somebody else was first. */
  protected conflictOf(held: Held) {
    const now = this.now(held);
    const theirs = {
      value: valueText(now),
      uncertainty: uncertaintyText(now.uncertainty),
      basis: now.basis,
      source: now.source,
    };
    const label = held.field.charAt(0).toUpperCase() + held.field.slice(1);
    return [{ field: held.field, label, theirs: theirs[held.field], mine: held.typed }];
  }

  protected resolve(held: Held, chosen: Readonly<Record<string, Side>>): void {
    if (chosen[held.field] === 'mine') void this.edits.give(this.now(held), held.field, held.typed);
    else this.edits.drop(held);
  }

  private now(held: Held): QuantityRow {
    return this.all().find((row) => row.id === held.row.id) ?? held.row;
  }

  private add(): void {
    void this.router.navigate(this.context.link('quantities', 'new'), { queryParams: this.context.readParams() });
  }

  private async copy(): Promise<void> {
    try {
      await navigator.clipboard.writeText(quantityTableText(this.rows()));
      this.line.tell(`${this.rows().length} rows copied, ready to paste into a spreadsheet.`);
    } catch {
      this.line.tell('This browser does not let the page copy. Select the cells and copy them instead.');
    }
  }
}
