import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { Router } from '@angular/router';
import type { ChangeRow } from '@shared/contract';
import { load } from '../core/http/load';
import { StudyContext } from '../core/study/study-context';
import { TitleBlock } from '../core/title-block';
import { addressWriter, matchesWords } from '../ui/address/address';
import { dayText } from '../ui/day/day';
import { EmptyState } from '../ui/empty-state/empty-state';
import { KeyLink } from '../ui/key-link/key-link';
import { Waiting } from '../ui/waiting/waiting';
import { WordFilter } from '../ui/word-filter/word-filter';
import { ChangesApi } from './changes-api';
import { WriteChangeDialog } from './write-change-dialog';

const OPEN = new Set(['draft', 'submitted', 'in assessment', 'before the board', 'deferred']);

interface Show {
  readonly value: string;
  readonly label: string;
  readonly takes: (row: ChangeRow, me: string | undefined) => boolean;
}
const SHOWS: readonly Show[] = [
  { value: '', label: 'All', takes: () => true },
  { value: 'open', label: 'Open', takes: (row) => OPEN.has(row.state) },
  { value: 'board', label: 'Before the board', takes: (row) => row.state === 'before the board' },
  { value: 'conflict', label: 'In conflict', takes: (row) => row.inConflict },
  { value: 'decided', label: 'Decided', takes: (row) => row.state === 'approved' || row.state === 'rejected' },
  { value: 'mine', label: 'Mine', takes: (row, me) => row.author.id === me },
];

/** The change requests of the study: what waits for a disposition first. */
@Component({
  selector: 'dp-changes',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [EmptyState, KeyLink, Waiting, WordFilter],
  templateUrl: './changes.html',
  styleUrl: './changes.scss',
})
export class Changes {
  private readonly api = inject(ChangesApi);
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);
  protected readonly context = inject(StudyContext);
  private readonly toAddress = addressWriter();

  /** Filters, from the address. */
  readonly show = input<string>();
  readonly q = input<string>();

  protected readonly changes = load(
    () => this.context.readKey(),
    () => this.api.list(),
    { discard: (previous, next) => previous.study !== next.study },
  );
  private readonly me = computed(() => this.context.head.value()?.me.id);
  private readonly all = computed(() => this.changes.value()?.rows ?? []);
  protected readonly isEmpty = computed(() => this.all().length === 0);
  protected readonly chosen = computed(() => SHOWS.find(({ value }) => value === (this.show() ?? ''))?.value ?? '');
  protected readonly words = computed(() =>
    SHOWS.map(({ value, label, takes }) => ({
      value,
      label,
      count: this.all().filter((row) => takes(row, this.me())).length,
    })),
  );
  protected readonly rows = computed(() => {
    const takes = SHOWS.find(({ value }) => value === this.chosen())?.takes ?? (() => true);
    return this.all()
      .filter((row) => takes(row, this.me()))
      .filter((row) => matchesWords(this.q() ?? '', row.key, row.title, row.author.name, row.state))
      .map((row) => ({ ...row, to: this.context.link('changes', row.key), dueText: row.due ? dayText(row.due) : '' }));
  });
  protected readonly summary = computed(() => {
    const open = this.all().filter(({ state }) => OPEN.has(state)).length;
    const board = this.all().filter(({ state }) => state === 'before the board').length;
    return `${open} open · ${board} before the board`;
  });

  constructor() {
    inject(TitleBlock).register({
      name: () => undefined,
      actions: () =>
        this.context.holds('requirements-owner', 'analyst', 'board-member', 'board-chair') &&
        this.context.standpoint().kind === 'now'
          ? [{ label: 'Write a change request', main: true, shortcut: 'n', run: () => this.write() }]
          : [],
    });
  }

  protected filter(show: string): void {
    this.toAddress({ show });
  }

  protected search(event: Event): void {
    if (event.target instanceof HTMLInputElement) this.toAddress({ q: event.target.value });
  }

  private write(): void {
    this.dialog
      .open<WriteChangeDialog, never, string>(WriteChangeDialog, { width: '600px' })
      .afterClosed()
      .subscribe((key) => {
        if (key !== undefined) void this.router.navigate(this.context.link('changes', key));
      });
  }
}
