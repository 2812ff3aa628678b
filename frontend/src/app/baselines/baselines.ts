import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import type { BaselineRow } from '@shared/contract';
import { ErrorLine } from '../core/errors/error-line';
import { load } from '../core/http/load';
import { StudyContext } from '../core/study/study-context';
import { TitleBlock } from '../core/title-block';
import { dayText } from '../ui/day/day';
import { EmptyState } from '../ui/empty-state/empty-state';
import { VerdictMark } from '../ui/verdict/verdict-mark';
import { WORST_FIRST } from '../ui/verdict/verdict-words';
import { Waiting } from '../ui/waiting/waiting';
import { BaselinesApi } from './baselines-api';

/** The baselines of the study, newest first, each to be opened as it was. */
@Component({
  selector: 'dp-baselines',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [EmptyState, RouterLink, VerdictMark, Waiting],
  templateUrl: './baselines.html',
  styleUrl: './baselines.scss',
})
export class Baselines {
  private readonly api = inject(BaselinesApi);
  private readonly line = inject(ErrorLine);
  private readonly router = inject(Router);
  protected readonly context = inject(StudyContext);

  protected readonly baselines = load(
    () => this.context.readKey(),
    () => this.api.list(),
    { discard: (previous, next) => previous.study !== next.study },
  );
  protected readonly rows = computed(() =>
    (this.baselines.value()?.rows ?? []).map((row) => ({
      row,
      day: dayText(row.at),
      digest: row.digest.slice(0, 12),
      counts: countsOf(row),
      at: { at: `baseline:${row.key}` },
    })),
  );
  protected readonly summary = computed(() => {
    const inForce = this.context.head.value()?.baselineInForce;
    return inForce ? `In force: ${inForce.key} · ${inForce.name}` : 'None is in force yet';
  });

  constructor() {
    inject(TitleBlock).register({
      actions: () =>
        this.context.holds('board-chair') && this.context.standpoint().kind === 'now'
          ? [
              {
                label: 'Take a baseline',
                main: true,
                shortcut: 'n',
                run: () => void this.router.navigate(this.context.link('baselines', 'new')),
              },
            ]
          : [],
    });
  }

  protected async copy(row: BaselineRow): Promise<void> {
    try {
      await navigator.clipboard.writeText(row.digest);
      this.line.tell(`The digest of ${row.key} was copied.`);
    } catch {
      this.line.tell(`This browser does not let the page copy. The digest of ${row.key} is ${row.digest}`);
    }
  }
}

function countsOf(row: BaselineRow) {
  return WORST_FIRST.map((verdict) => ({ verdict, count: row.counts[verdict] })).filter(({ count }) => count > 0);
}
