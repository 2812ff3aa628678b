import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RecordRow } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { ErrorLine } from '../core/errors/error-line';
import { load } from '../core/http/load';
import { StudyContext } from '../core/study/study-context';
import { TitleBlock } from '../core/title-block';
import { addressWriter, matchesWords } from '../ui/address/address';
import { Ask } from '../ui/ask/ask';
import { EmptyState } from '../ui/empty-state/empty-state';
import { Waiting } from '../ui/waiting/waiting';
import { RecordEntry } from './record-entry';
import { RecordsApi } from './records-api';

const PAGE = 50;
/** A search looks through more entries at once. */
const SEARCHED = 200;

/** The ledger: every revision with who, when, why, what was before and after, and which verdicts turned. */
@Component({
  selector: 'dp-records',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [EmptyState, RecordEntry, RouterLink, Waiting],
  templateUrl: './records.html',
  styleUrl: './records.scss',
})
export class Records {
  private readonly api = inject(RecordsApi);
  private readonly ask = inject(Ask);
  private readonly line = inject(ErrorLine);
  private readonly toAddress = addressWriter();
  protected readonly context = inject(StudyContext);

  /** From the address: the revision before which the page begins, and what is searched for. */
  readonly before = input<string>();
  readonly q = input<string>();

  private readonly start = computed(() => {
    const before = Number(this.before());
    return Number.isInteger(before) && before > 0 ? before : undefined;
  });
  private readonly size = computed(() => ((this.q() ?? '') === '' ? PAGE : SEARCHED));
  protected readonly records = load(
    () => {
      const place = this.context.readKey();
      return place && { ...place, before: this.start(), limit: this.size() };
    },
    ({ before, limit }) => this.api.page(before, limit),
    { discard: (previous, next) => previous.study !== next.study || previous.before !== next.before },
  );
  private readonly busy = signal(false);

  protected readonly rows = computed(() =>
    (this.records.value()?.rows ?? []).filter((row) => matchesWords(this.q() ?? '', ...textsOf(row))),
  );
  protected readonly isSearch = computed(() => (this.q() ?? '').trim() !== '');
  protected readonly searched = computed(() => this.records.value()?.rows.length ?? 0);
  protected readonly chain = computed(() => {
    const chain = this.records.value()?.chain;
    return chain && { entries: chain.entries, head: chain.head, short: chain.head.slice(0, 12) };
  });

  constructor() {
    inject(TitleBlock).register({ actions: () => [] });
  }

  protected search(event: Event): void {
    if (event.target instanceof HTMLInputElement) this.toAddress({ q: event.target.value });
  }

  protected async takeBack(row: RecordRow): Promise<void> {
    const answer = await this.ask.ask({
      title: `Take back r${row.revision}?`,
      text: `${row.summary}. What it changed becomes again what it was before, as a new revision; the ledger keeps both.`,
      action: 'Take it back',
    });
    if (answer === undefined || this.busy()) return;
    this.busy.set(true);
    try {
      const done = await firstValueFrom(this.api.takeBack(row.revision));
      this.line.tell(`r${row.revision} was taken back as r${done.revision}.`);
    } catch (error) {
      this.line.report(error);
    } finally {
      this.busy.set(false);
    }
  }

  protected lookFrom(row: RecordRow): void {
    void this.context.lookFrom({ kind: 'revision', revision: row.revision });
  }
}

/** Everything of an entry that a search looks at. */
function textsOf(row: RecordRow): string[] {
  return [
    `r${row.revision}`,
    row.summary,
    row.why,
    row.by.name,
    ...row.changes.flatMap(({ key, field, before, after }) => [key, field, before, after]),
    ...row.moved.map(({ key }) => key),
  ];
}
