import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import type { RecordRow } from '@shared/contract';
import { StudyContext } from '../core/study/study-context';
import { momentText } from '../ui/day/day';
import { KeyLink } from '../ui/key-link/key-link';
import { VerdictMark } from '../ui/verdict/verdict-mark';

/** Longer lists of changes are cut until they are asked for. */
const SHOWN = 6;

/** One entry of the ledger. */
@Component({
  selector: 'dp-record-entry',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [KeyLink, VerdictMark],
  templateUrl: './record-entry.html',
  styleUrl: './record-entry.scss',
})
export class RecordEntry {
  protected readonly context = inject(StudyContext);
  readonly row = input.required<RecordRow>();
  readonly takeBack = output<void>();
  readonly lookFrom = output<void>();

  protected readonly isWhole = signal(false);
  protected readonly when = computed(() => momentText(this.row().at));
  protected readonly changes = computed(() =>
    this.isWhole() ? this.row().changes : this.row().changes.slice(0, SHOWN),
  );
  protected readonly cut = computed(() => this.row().changes.length - this.changes().length);
  protected readonly turned = computed(() =>
    this.row()
      .moved.filter(({ from, to }) => from !== to)
      .map((move) => ({ ...move, address: this.context.link('requirements', move.key) })),
  );
  protected readonly moved = computed(() => {
    const count = this.row().moved.length - this.turned().length;
    return count === 0 ? '' : count === 1 ? 'one margin moved' : `${count} margins moved`;
  });
}
