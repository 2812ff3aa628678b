import { BreakpointObserver } from '@angular/cdk/layout';
import { CdkFixedSizeVirtualScroll, CdkVirtualForOf, CdkVirtualScrollViewport } from '@angular/cdk/scrolling';
import {
  ChangeDetectionStrategy,
  Component,
  ElementRef,
  Injector,
  afterNextRender,
  computed,
  effect,
  inject,
  signal,
  viewChild,
} from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import type { FlowRow } from '@shared/contract';
import { map } from 'rxjs';
import { load } from '../../core/http/load';
import { Shortcuts } from '../../core/keyboard/shortcuts';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { StudyContext } from '../../core/study/study-context';
import { type SheetAction, TitleBlock } from '../../core/title-block';
import { BudgetRibbon } from '../../ui/budget-ribbon/budget-ribbon';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { limitText } from '../../ui/limit/limit-text';
import { gaugeReading } from '../../ui/margin/gauge-reading';
import { MarginGauge } from '../../ui/margin/margin-gauge';
import { MarginNumber } from '../../ui/margin/margin-number';
import { VerdictMark } from '../../ui/verdict/verdict-mark';
import { WORST_FIRST, verdictWord } from '../../ui/verdict/verdict-words';
import { Waiting } from '../../ui/waiting/waiting';
import { RequirementApi } from '../requirement-api';
import { ExportDialog } from './export-dialog';
import { type FlowLine, type FlowFilter, flowLines, isWide, nextLine, pathsAbove } from './flow-lines';

const PHONE_LINE = 80;
const STATES = ['in preparation', 'in review', 'baselined', 'change pending', 'to be resolved'];

/** All requirements as they flow down: limit, computed value, margin, verdict, allocation, and the budgets between them. */
@Component({
  selector: 'dp-flow-down',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    BudgetRibbon,
    CdkFixedSizeVirtualScroll,
    CdkVirtualForOf,
    CdkVirtualScrollViewport,
    EmptyState,
    MarginGauge,
    MarginNumber,
    RouterLink,
    VerdictMark,
    Waiting,
  ],
  templateUrl: './flow-down.html',
  styleUrl: './flow-down.scss',
})
export class FlowDown {
  private readonly api = inject(RequirementApi);
  private readonly router = inject(Router);
  private readonly dialog = inject(MatDialog);
  private readonly injector = inject(Injector);
  private readonly units = inject(UnitPreferences);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  protected readonly context = inject(StudyContext);
  private readonly viewport = viewChild(CdkVirtualScrollViewport);
  private readonly box = viewChild<ElementRef<HTMLInputElement>>('box');

  private readonly query = toSignal(inject(ActivatedRoute).queryParamMap, { requireSync: true });
  protected readonly filter = computed<FlowFilter>(() => ({
    text: this.query().get('text') ?? '',
    verdict: this.query().get('verdict') ?? '',
    state: this.query().get('state') ?? '',
  }));
  protected readonly isWide = computed(() => isWide(this.filter()));
  protected readonly selectedKey = computed(() => this.query().get('select'));

  protected readonly view = load(
    () => this.context.readKey(),
    () => this.api.flowDown(),
    { discard: (previous, next) => previous.study !== next.study },
  );
  private readonly rows = computed(() => this.view.value()?.rows ?? []);
  private readonly closed = signal<ReadonlySet<string>>(new Set());
  /** Which of several places of the selected requirement was chosen. */
  private readonly chosenPath = signal<string | null>(null);
  protected readonly selected = computed(() => {
    const places = this.rows().filter((row) => row.key === this.selectedKey());
    return places.find((row) => row.path === this.chosenPath()) ?? places[0] ?? null;
  });
  protected readonly lines = computed(() =>
    flowLines(this.rows(), this.filter(), this.closed(), this.selected()?.path ?? null),
  );
  private readonly reached = signal<string | null>(null);
  protected readonly tabStop = computed(() => {
    const lines = this.lines();
    const here = this.reached() ?? this.selected()?.path;
    return lines.some((line) => line.id === here) ? here : lines[0]?.id;
  });
  protected readonly counts = computed(() => {
    const counts = this.view.value()?.counts;
    if (counts === undefined) return '';
    return `${counts.inForce} in force · ${counts.inPreparation} in preparation · ${counts.toBeResolved} to be resolved`;
  });

  private readonly isPhone = toSignal(
    inject(BreakpointObserver)
      .observe('(max-width: 720px)')
      .pipe(map((state) => state.matches)),
    { initialValue: false },
  );
  protected readonly lineHeight = computed(() => (this.isPhone() ? PHONE_LINE : rowHeight()));

  protected readonly verdicts = WORST_FIRST;
  protected readonly verdictWord = verdictWord;
  protected readonly states = STATES;
  protected readonly gauge = gaugeReading;
  protected readonly show = this.units.show.bind(this.units);
  protected readonly idOf = (_index: number, line: FlowLine): string => line.id;

  constructor() {
    inject(TitleBlock).register({ name: () => this.selected()?.key, actions: () => this.actions() });
    inject(Shortcuts).register([
      { keys: '↑ ↓ ← →', label: 'Move, open and close in the flow-down', group: 'This sheet' },
      { keys: 'Space', label: 'Select the requirement and unfold its budget', group: 'This sheet' },
      { keys: 'Enter', label: 'Open its sheet', group: 'This sheet' },
    ]);
    // What is being typed is not overwritten by the address that it itself has set.
    effect(() => {
      const text = this.filter().text;
      const box = this.box()?.nativeElement;
      if (box !== undefined && box !== box.ownerDocument.activeElement) box.value = text;
    });
  }

  protected limit(row: FlowRow): string {
    return limitText(row.limit, this.show);
  }

  protected computedText(row: FlowRow): string {
    if (row.verdict === 'not computable') return 'not computable';
    return this.units.shown(row.value);
  }

  protected narrow(name: 'text' | 'verdict' | 'state', value: string): void {
    this.toAddress({ [name]: value.trim() === '' ? null : value });
  }

  protected widen(): void {
    this.toAddress({ text: null, verdict: null, state: null });
  }

  protected select(row: FlowRow): void {
    const again = this.selected()?.path === row.path;
    this.reached.set(row.path);
    this.chosenPath.set(again ? null : row.path);
    this.toAddress({ select: again ? null : row.key });
  }

  protected open(key: string): void {
    void this.router.navigate(this.context.link('requirements', key), { queryParams: this.context.readParams() });
  }

  protected toggle(row: FlowRow): void {
    this.closed.update((closed) => {
      const next = new Set(closed);
      if (!next.delete(row.path)) next.add(row.path);
      return next;
    });
  }

  protected closeAll(): void {
    this.closed.set(new Set(this.rows().flatMap((row) => (row.hasChildren ? [row.path] : []))));
  }

  protected openAll(): void {
    this.closed.set(new Set());
  }

  /** Arrows as in any tree: right opens or goes in, left closes or goes up. */
  protected press(event: KeyboardEvent, line: FlowLine & { readonly kind: 'requirement' }, index: number): void {
    if (event.target instanceof HTMLElement && event.target.closest('button, a') && event.key === 'Enter') return;
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const { row, isOpen } = line;
    switch (event.key) {
      case 'ArrowRight':
        if (row.hasChildren && !isOpen) this.toggle(row);
        else if (row.hasChildren) this.reach(nextLine(this.lines(), index, 'ArrowDown'));
        break;
      case 'ArrowLeft':
        if (row.hasChildren && isOpen) this.toggle(row);
        else this.reachPath(pathsAbove(row.path)[0]);
        break;
      case 'Enter':
        this.open(row.key);
        break;
      case ' ':
        this.select(row);
        break;
      default: {
        const next = nextLine(this.lines(), index, event.key);
        if (next === index) return;
        this.reach(next);
      }
    }
    event.preventDefault();
  }

  /** Keeps one line within reach of the Tab key when the reached one has been scrolled away. */
  protected scrolled(): void {
    const viewport = this.viewport();
    if (viewport === undefined || this.host.contains(document.activeElement)) return;
    const { start, end } = viewport.getRenderedRange();
    const shown = this.lines().slice(start, end);
    if (!shown.some((line) => line.id === this.tabStop())) this.reached.set(shown[0]?.id ?? null);
  }

  private reachPath(path: string | undefined): void {
    const index = this.lines().findIndex((line) => line.id === path);
    if (index >= 0) this.reach(index);
  }

  private reach(index: number): void {
    const line = this.lines()[index];
    const viewport = this.viewport();
    if (line === undefined || viewport === undefined) return;
    this.reached.set(line.id);
    const { start, end } = viewport.getRenderedRange();
    const top = viewport.measureScrollOffset();
    const at = index * this.lineHeight();
    if (index < start || index >= end || at < top || at + this.lineHeight() > top + viewport.getViewportSize()) {
      viewport.scrollToOffset(Math.max(0, at - viewport.getViewportSize() / 2));
    }
    // A line that had to be scrolled to is drawn some frames later.
    const focus = (frames: number): void => {
      const row = this.host.querySelector<HTMLElement>(`[data-path="${CSS.escape(line.id)}"]`);
      if (row !== null) row.focus({ preventScroll: true });
      else if (frames > 0) requestAnimationFrame(() => focus(frames - 1));
    };
    afterNextRender(() => requestAnimationFrame(() => focus(20)), { injector: this.injector });
  }

  private toAddress(queryParams: Record<string, string | null>): void {
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  }

  private actions(): readonly SheetAction[] {
    const selected = this.selected();
    const out: SheetAction[] = [{ label: 'Export', run: () => this.dialog.open(ExportDialog, { width: '480px' }) }];
    if (selected !== null) out.unshift({ label: `Open ${selected.key}`, run: () => this.open(selected.key) });
    if (this.context.isEditable() && this.context.holds('requirements-owner')) {
      out.push({ label: 'Write a requirement', main: true, shortcut: 'n', run: () => this.write() });
    }
    return out;
  }

  private write(): void {
    const parent = this.selected()?.key;
    void this.router.navigate(this.context.link('requirements', 'new'), {
      queryParams: { ...this.context.readParams(), ...(parent === undefined ? {} : { parent }) },
    });
  }
}

/** Row height in px as the density setting has it. */
function rowHeight(): number {
  const row = Number.parseFloat(getComputedStyle(document.documentElement).getPropertyValue('--row'));
  return Number.isFinite(row) && row > 0 ? row : 36;
}
