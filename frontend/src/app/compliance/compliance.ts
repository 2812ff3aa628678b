import { BreakpointObserver } from '@angular/cdk/layout';
import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { Router } from '@angular/router';
import type { MatrixRow } from '@shared/contract';
import { map } from 'rxjs';
import { ErrorLine } from '../core/errors/error-line';
import { load } from '../core/http/load';
import { StudyContext } from '../core/study/study-context';
import { TitleBlock } from '../core/title-block';
import { addressWriter } from '../ui/address/address';
import { EmptyState } from '../ui/empty-state/empty-state';
import { WORST_FIRST, verdictWord } from '../ui/verdict/verdict-words';
import { Waiting } from '../ui/waiting/waiting';
import { WordFilter } from '../ui/word-filter/word-filter';
import { ComplianceApi, type MatrixFormat } from './compliance-api';
import { type FilterName, type MatrixFilter, choicesOf, filtered } from './matrix-filter';
import { MatrixGrid } from './matrix-grid';
import { MatrixList } from './matrix-list';
import { matrixTableText } from './matrix-table-text';
import { standings, statement } from './matrix-words';

const COMPLIANCES = ['yes', 'partial', 'no', 'not assessed'] as const;

/** The compliance matrix: for every requirement what is required, what was assessed, and whether it complies. */
@Component({
  selector: 'dp-compliance',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [EmptyState, MatrixGrid, MatrixList, Waiting, WordFilter],
  templateUrl: './compliance.html',
  styleUrl: './compliance.scss',
})
export class Compliance {
  private readonly api = inject(ComplianceApi);
  private readonly line = inject(ErrorLine);
  private readonly router = inject(Router);
  private readonly toAddress = addressWriter();
  protected readonly context = inject(StudyContext);

  /** Filters, order and whether statements are shown, from the address. */
  readonly verdict = input<string>();
  readonly compliance = input<string>();
  readonly method = input<string>();
  readonly element = input<string>();
  readonly owner = input<string>();
  readonly q = input<string>();
  readonly sort = input<string>();
  readonly statements = input<string>();

  protected readonly matrix = load(
    () => this.context.readKey(),
    () => this.api.matrix(),
    { discard: (previous, next) => previous.study !== next.study || previous.at !== next.at },
  );
  protected readonly isNarrow = toSignal(
    inject(BreakpointObserver)
      .observe('(max-width: 720px)')
      .pipe(map(({ matches }) => matches)),
    { initialValue: false },
  );

  private readonly all = computed(() => this.matrix.value()?.rows ?? []);
  private readonly filter = computed<MatrixFilter>(() => ({
    verdict: this.verdict() ?? '',
    compliance: this.compliance() ?? '',
    method: this.method() ?? '',
    element: this.element() ?? '',
    owner: this.owner() ?? '',
    q: this.q() ?? '',
  }));
  protected readonly rows = computed(() => filtered(this.all(), this.filter()));
  protected readonly isFiltered = computed(() => Object.values(this.filter()).some((part) => part !== ''));
  /** Counts beside the verdict words are those of the rows that the other filters leave. */
  protected readonly verdicts = computed(() => {
    const rows = filtered(this.all(), { ...this.filter(), verdict: '' });
    const words = WORST_FIRST.map((verdict) => ({
      value: verdict,
      label: verdictWord(verdict),
      count: rows.filter((row) => row.verdict === verdict).length,
    }));
    const chosen = this.filter().verdict;
    return [
      { value: '', label: 'All', count: rows.length },
      ...words.filter(({ count, value }) => count > 0 || value === chosen),
    ];
  });
  protected readonly selects = computed(() => {
    const rows = this.all();
    const one = (name: FilterName, label: string, any: string, choices: readonly string[]) => ({
      name,
      label,
      any,
      choices,
      chosen: this.filter()[name],
    });
    return [
      one('compliance', 'Compliance', 'any compliance', COMPLIANCES),
      one('method', 'Method', 'any method', choicesOf(rows, 'method')),
      one('element', 'Allocated to', 'any element', choicesOf(rows, 'element')),
      one('owner', 'Owner', 'any owner', choicesOf(rows, 'owner')),
    ];
  });
  protected readonly head = computed(() => {
    const view = this.matrix.value();
    if (view === undefined) return null;
    const { header, rows } = view;
    return {
      statement: statement(header),
      counts: COMPLIANCES.map((word) => ({ word, count: header.counts[word] })),
      standings: standings(header, rows.length),
      rule: header.decisionRule,
      caution: header.caution,
    };
  });

  constructor() {
    inject(TitleBlock).register({
      actions: () => {
        return [
          { label: 'CSV', run: () => void this.export('csv') },
          { label: 'XLSX', run: () => void this.export('xlsx') },
          { label: 'Export DOCX', main: true, run: () => void this.export('docx') },
        ];
      },
    });
  }

  protected narrow(name: FilterName, value: string): void {
    this.toAddress({ [name]: value });
  }

  protected clear(): void {
    this.toAddress({ verdict: '', compliance: '', method: '', element: '', owner: '', q: '' });
  }

  protected sortBy(sort: string): void {
    this.toAddress({ sort });
  }

  protected showStatements(shown: boolean): void {
    this.toAddress({ statements: shown ? '1' : '' });
  }

  protected open(row: MatrixRow): void {
    void this.router.navigate(this.context.link('requirements', row.key), { queryParams: this.context.readParams() });
  }

  protected async copy(): Promise<void> {
    try {
      await navigator.clipboard.writeText(matrixTableText(this.rows()));
      this.line.tell(`${this.rows().length} rows copied, ready to paste into a spreadsheet.`);
    } catch {
      this.line.tell('This browser does not let the page copy. Export CSV with the button below instead.');
    }
  }

  private async export(format: MatrixFormat): Promise<void> {
    const abort = new AbortController();
    this.line.tell(`Writing the matrix as ${format.toUpperCase()} …`, {
      label: 'Cancel',
      run: () => {
        abort.abort();
        this.line.dismiss();
      },
    });
    try {
      const { name, content } = await this.api.file(format, abort.signal);
      save(name, content);
      this.line.tell(`${name} was written.`);
    } catch (error) {
      if (!abort.signal.aborted) this.line.report(error, { label: 'Try again', run: () => void this.export(format) });
    }
  }
}

/** Hands a file to the browser's own downloads. */
function save(name: string, content: Blob): void {
  const address = URL.createObjectURL(content);
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  // The browser reads the address after the click has returned.
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
}
