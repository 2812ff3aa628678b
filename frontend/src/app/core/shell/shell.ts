import {
  ChangeDetectionStrategy,
  Component,
  type ElementRef,
  computed,
  effect,
  inject,
  viewChild,
} from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { Title } from '@angular/platform-browser';
import { NavigationEnd, Router, RouterOutlet } from '@angular/router';
import { filter, map, pairwise, startWith } from 'rxjs';
import { ErrorLine } from '../errors/error-line';
import { JumpDialog } from '../keyboard/jump-dialog';
import { KeysDialog } from '../keyboard/keys-dialog';
import { Shortcuts } from '../keyboard/shortcuts';
import { LiveUpdates } from '../live/live-updates';
import { newsOf } from '../live/news';
import { SessionStore } from '../session/session-store';
import { StudyContext } from '../study/study-context';
import { TitleBlock } from '../title-block';
import { sectionOf } from './sections';
import { ShellHeader } from './shell-header';
import { TitleBlockBar } from './title-block-bar';

/** The frame around every page: header above, title block below, a quiet line for what went wrong between them. */
@Component({
  selector: 'dp-shell',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterOutlet, ShellHeader, TitleBlockBar],
  template: `
    <a class="skip" href="#sheet" (click)="skip($event)">Skip to the sheet</a>
    <dp-shell-header [url]="url()" />
    <main id="sheet" tabindex="-1" #main>
      <router-outlet />
    </main>
    <div class="line" role="status" aria-live="polite">
      @if (line.announcement(); as announcement) {
        <div [class.error]="announcement.tone === 'error'">
          <span>{{ announcement.text }}</span>
          @if (announcement.action; as action) {
            <button type="button" class="quiet" (click)="action.run()">{{ action.label }}</button>
          }
          <button type="button" class="quiet" (click)="line.dismiss()">Dismiss</button>
        </div>
      }
    </div>
    @if (hasTitleBlock()) {
      <dp-title-block-bar />
    }
  `,
  styleUrl: './shell.scss',
})
export class Shell {
  private readonly router = inject(Router);
  private readonly dialog = inject(MatDialog);
  private readonly context = inject(StudyContext);
  private readonly titleBlock = inject(TitleBlock);
  private readonly session = inject(SessionStore);
  private readonly main = viewChild.required<ElementRef<HTMLElement>>('main');
  protected readonly line = inject(ErrorLine);

  private readonly ended = this.router.events.pipe(
    filter((event) => event instanceof NavigationEnd),
    map((event) => event.urlAfterRedirects),
  );
  protected readonly url = toSignal(this.ended, { initialValue: this.router.url });
  protected readonly hasTitleBlock = computed(
    () =>
      this.session.person() !== null && (this.context.study() !== undefined || this.titleBlock.actions().length > 0),
  );

  constructor() {
    const group = 'Everywhere';
    const shortcuts = inject(Shortcuts);
    shortcuts.register([
      { keys: '?', label: 'Show the keys', group, run: () => this.dialog.open(KeysDialog) },
      { keys: '/', label: 'Jump to any item by key or word', group, run: () => this.openJump() },
      { keys: 'Ctrl+k', label: 'Jump to any item by key or word', group, run: () => this.openJump() },
    ]);
    effect((onCleanup) => this.offerActionKeys(shortcuts, onCleanup));

    this.ended
      .pipe(map(pathOf), startWith(pathOf(this.router.url)), pairwise(), takeUntilDestroyed())
      .subscribe(([before, after]) => {
        if (before !== after) this.arrive();
      });

    inject(LiveUpdates)
      .events.pipe(
        filter((event) => event.byId !== this.session.person()?.id),
        takeUntilDestroyed(),
      )
      .subscribe((event) => this.line.tell(newsOf(event)));

    const title = inject(Title);
    effect(() => {
      const parts = [
        this.titleBlock.sheetName(),
        sectionOf(this.url())?.label,
        this.context.head.value()?.study.name,
        'Deltaproof',
      ];
      title.setTitle(parts.filter((part) => part !== undefined && part !== '').join(' · '));
    });
  }

  protected skip(event: Event): void {
    event.preventDefault();
    this.main().nativeElement.focus();
  }

  /** A new page starts with a clean line, and with the focus on the sheet unless something in it already has it. */
  private arrive(): void {
    if (this.line.announcement()?.tone === 'error') this.line.dismiss();
    const main = this.main().nativeElement;
    if (!main.contains(document.activeElement)) main.focus({ preventScroll: true });
  }

  private openJump(): void {
    if (this.context.study() !== undefined && this.dialog.openDialogs.length === 0)
      this.dialog.open(JumpDialog, { width: '620px', position: { top: '72px' } });
  }

  private offerActionKeys(shortcuts: Shortcuts, onCleanup: (end: () => void) => void): void {
    const keyed = this.titleBlock.actions().filter((action) => action.shortcut !== undefined);
    const added = keyed.map((action) => ({
      keys: action.shortcut ?? '',
      label: action.label,
      group: 'This sheet',
      run: () => {
        if (!action.disabled) action.run();
      },
    }));
    onCleanup(shortcuts.add(added));
  }
}

function pathOf(url: string): string {
  return url.split(/[?#]/)[0] ?? url;
}
