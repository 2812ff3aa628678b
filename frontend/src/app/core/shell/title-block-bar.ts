import { BreakpointObserver } from '@angular/cdk/layout';
import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { MatMenu, MatMenuItem, MatMenuTrigger } from '@angular/material/menu';
import { interval, map } from 'rxjs';
import { ErrorLine } from '../errors/error-line';
import { roleList } from '../study/role-name';
import { describeStandpoint, isFrozen } from '../study/standpoint';
import { StudyContext } from '../study/study-context';
import { type SheetAction, TitleBlock } from '../title-block';
import { ago } from './ago';
import { StandpointDialog } from './standpoint-dialog';

const SHOWN_WIDE = 4;
const SHOWN_NARROW = 2;

/** The bottom edge: which study, standpoint, baseline and sheet this is, in which role, and what can be done with it. */
@Component({
  selector: 'dp-title-block-bar',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatMenu, MatMenuItem, MatMenuTrigger],
  templateUrl: './title-block-bar.html',
  styleUrl: './title-block-bar.scss',
  host: { role: 'contentinfo' },
})
export class TitleBlockBar {
  private readonly dialog = inject(MatDialog);
  private readonly line = inject(ErrorLine);
  private readonly titleBlock = inject(TitleBlock);
  protected readonly context = inject(StudyContext);

  private readonly clock = toSignal(interval(5000).pipe(map(() => Date.now())), { initialValue: Date.now() });
  private readonly isNarrow = toSignal(
    inject(BreakpointObserver)
      .observe('(max-width: 720px)')
      .pipe(map((state) => state.matches)),
    { initialValue: false },
  );

  protected readonly head = this.context.head.value;
  protected readonly sheet = this.titleBlock.sheetName;
  protected readonly standpoint = computed(() =>
    describeStandpoint(this.context.standpoint(), this.context.revision()),
  );
  protected readonly isFrozen = computed(() => isFrozen(this.context.standpoint()));
  protected readonly isElsewhere = computed(() => this.context.standpoint().kind !== 'now');
  protected readonly reproved = computed(() => {
    const head = this.head();
    if (head === undefined) return '';
    const when = this.isFrozen() ? '' : `${ago(head.provedAt, Math.max(this.clock(), Date.now()))}, `;
    return `${when}${head.verdicts} verdicts`;
  });
  protected readonly acting = computed(() => roleList(this.context.roles()) || 'Guest');

  /** "Petrel · now, r418 · you act as board member" */
  protected readonly inOneLine = computed(() => {
    const study = this.head()?.study.name.split(',')[0] ?? '';
    const standpoint = this.standpoint()
      .replace('Now ·', 'now,')
      .replace(/^[RBD]/, (letter) => letter.toLowerCase());
    return `${study} · ${standpoint} · you act as ${this.acting().toLowerCase()}`;
  });

  private readonly shownCount = computed(() => (this.isNarrow() ? SHOWN_NARROW : SHOWN_WIDE));
  protected readonly actions = computed(() => this.titleBlock.actions().slice(-this.shownCount()));
  protected readonly more = computed(() => this.titleBlock.actions().slice(0, -this.shownCount()));

  protected chooseStandpoint(): void {
    this.dialog.open(StandpointDialog);
  }

  protected run(action: SheetAction): void {
    if (!action.disabled) action.run();
    else if (action.reason) this.line.tell(action.reason);
  }
}
