import {
  ChangeDetectionStrategy,
  Component,
  ElementRef,
  Injector,
  afterNextRender,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import type { ElementRow } from '@shared/contract';
import { mayGive } from '@shared/contract/permissions';
import { load } from '../core/http/load';
import { Shortcuts } from '../core/keyboard/shortcuts';
import { StudyContext } from '../core/study/study-context';
import { type SheetAction, TitleBlock } from '../core/title-block';
import { addressWriter } from '../ui/address/address';
import { EmptyState } from '../ui/empty-state/empty-state';
import { KeyLink } from '../ui/key-link/key-link';
import { VerdictMark } from '../ui/verdict/verdict-mark';
import { Waiting } from '../ui/waiting/waiting';
import { ElementActs } from './element-acts';
import { type ElementLine, above, elementLines } from './element-lines';
import { ProductTreeApi } from './product-tree-api';

const SHOWN = 8;

/** What the vehicle consists of, with the requirements allocated to each part and the worst verdict at or below it. */
@Component({
  selector: 'dp-product-tree',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [EmptyState, KeyLink, RouterLink, VerdictMark, Waiting],
  templateUrl: './product-tree.html',
  styleUrl: './product-tree.scss',
})
export class ProductTree {
  private readonly api = inject(ProductTreeApi);
  private readonly acts = inject(ElementActs);
  private readonly injector = inject(Injector);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private readonly toAddress = addressWriter();
  protected readonly context = inject(StudyContext);

  /** Code of the selected element, from the address. */
  readonly select = input<string>();

  protected readonly view = load(
    () => this.context.readKey(),
    () => this.api.tree(),
    { discard: (previous, next) => previous.study !== next.study || previous.at !== next.at },
  );
  private readonly rows = computed(() => this.view.value()?.rows ?? []);
  private readonly closed = signal<ReadonlySet<string>>(new Set());
  private readonly unfolded = signal<ReadonlySet<string>>(new Set());
  protected readonly lines = computed(() =>
    elementLines(this.rows(), this.closed()).map((line) => {
      const all = line.row.requirements;
      const isWhole = this.unfolded().has(line.row.id) || all.length <= SHOWN + 1;
      const shown = isWhole ? all : all.slice(0, SHOWN);
      return { ...line, shown, more: all.length - shown.length };
    }),
  );
  protected readonly selected = computed(() => this.rows().find(({ key }) => key === this.select()) ?? null);
  protected readonly tabStop = computed(() => {
    const lines = this.lines();
    const here = this.reached() ?? this.selected()?.id;
    return lines.some(({ row }) => row.id === here) ? here : lines[0]?.row.id;
  });
  private readonly reached = signal<string | null>(null);
  protected readonly counts = computed(() => {
    const view = this.view.value();
    if (view === undefined) return '';
    const allocated = view.rows.reduce((sum, row) => sum + row.requirements.length, 0);
    return `${view.rows.length} elements · ${allocated} requirements allocated · ${view.unallocated.length} not allocated`;
  });
  private readonly mayEdit = computed(
    () =>
      this.context.isEditable() &&
      mayGive(this.context.standpoint().kind === 'draft' ? 'change.amend' : 'element.create', this.context.roles()),
  );

  constructor() {
    inject(TitleBlock).register({ name: () => this.selected()?.key, actions: () => this.actions() });
    inject(Shortcuts).register([
      { keys: '↑ ↓ ← →', label: 'Move, open and close in the tree', group: 'This sheet' },
      { keys: 'Space', label: 'Select the element', group: 'This sheet' },
    ]);
    // A link to an element opens what it lies in, and brings it into view once.
    effect(() => {
      const [key, rows] = [this.select(), this.rows()];
      const row = rows.find((one) => one.key === key);
      if (row === undefined) return;
      untracked(() => {
        const open = new Set(above(rows, row.id).map(({ id }) => id));
        this.closed.update((closed) => new Set([...closed].filter((id) => !open.has(id))));
        if (this.reached() !== row.id) this.reach(row.id, false);
      });
    });
  }

  protected choose(row: ElementRow): void {
    this.reached.set(row.id);
    this.toAddress({ select: this.select() === row.key ? '' : row.key });
  }

  protected toggle(row: ElementRow): void {
    this.closed.update((closed) => flipped(closed, row.id));
  }

  protected unfold(row: ElementRow): void {
    this.unfolded.update((unfolded) => flipped(unfolded, row.id));
  }

  protected add(): Promise<void> {
    return this.acts.add(this.rows(), this.selected()).then((key) => {
      if (key !== undefined) this.toAddress({ select: key });
    });
  }

  /** Arrows as in any tree: right opens or goes in, left closes or goes up. */
  protected press(event: KeyboardEvent, line: ElementLine, index: number): void {
    if (event.ctrlKey || event.metaKey || event.altKey || event.target !== event.currentTarget) return;
    const { row, hasChildren, isOpen } = line;
    const lines = this.lines();
    switch (event.key) {
      case 'ArrowRight':
        if (hasChildren && !isOpen) this.toggle(row);
        else if (hasChildren) this.reach(lines[index + 1]?.row.id);
        break;
      case 'ArrowLeft':
        if (hasChildren && isOpen) this.toggle(row);
        else this.reach(row.parentId ?? undefined);
        break;
      case 'ArrowDown':
        this.reach(lines[index + 1]?.row.id);
        break;
      case 'ArrowUp':
        this.reach(lines[index - 1]?.row.id);
        break;
      case 'Home':
        this.reach(lines[0]?.row.id);
        break;
      case 'End':
        this.reach(lines.at(-1)?.row.id);
        break;
      case ' ':
      case 'Enter':
        this.choose(row);
        break;
      default:
        return;
    }
    event.preventDefault();
  }

  private reach(id: string | undefined, focus = true): void {
    if (id === undefined) return;
    this.reached.set(id);
    afterNextRender(
      () => {
        const row = this.host.querySelector<HTMLElement>(`[data-element="${id}"]`);
        if (focus) row?.focus();
        else row?.scrollIntoView({ block: 'nearest' });
      },
      { injector: this.injector },
    );
  }

  private actions(): readonly SheetAction[] {
    if (!this.mayEdit()) return [];
    const selected = this.selected();
    return [
      ...(selected === null
        ? []
        : [
            { label: `Remove ${selected.key}`, run: () => void this.acts.remove(selected) },
            { label: 'Rename or move', run: () => void this.acts.edit(this.rows(), selected) },
          ]),
      {
        label: selected === null ? 'Add an element' : `Add below ${selected.key}`,
        main: true,
        shortcut: 'n',
        run: () => void this.add(),
      },
    ];
  }
}

function flipped(set: ReadonlySet<string>, id: string): ReadonlySet<string> {
  const next = new Set(set);
  if (!next.delete(id)) next.add(id);
  return next;
}
