import {
  ChangeDetectionStrategy,
  Component,
  type ElementRef,
  computed,
  inject,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { matchesWords } from '../../ui/address/address';
import { type Source, sourceId } from '../text/sources';

const SHOWN = 60;
let count = 0;

/** Picks what an input is bound to: type a key, symbol or word, or walk the list. */
@Component({
  selector: 'dp-bind-picker',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <input
      #box
      class="control"
      role="combobox"
      aria-autocomplete="list"
      autocomplete="off"
      spellcheck="false"
      [attr.aria-label]="label()"
      [attr.aria-expanded]="isOpen()"
      [attr.aria-controls]="id"
      [attr.aria-activedescendant]="isOpen() && options().length > 0 ? id + '-' + active() : null"
      [placeholder]="placeholder()"
      (focus)="isOpen.set(true)"
      (click)="isOpen.set(true)"
      (blur)="isOpen.set(false)"
      (input)="type(box.value)"
      (keydown)="press($event)"
    />
    <div class="list" role="listbox" [id]="id" [attr.aria-label]="label()" [hidden]="!isOpen()">
      @if (isOpen()) {
        @for (option of options(); track option.id; let index = $index) {
          @if (option.opensGroup) {
            <div class="caption" role="presentation">{{ option.source.group }}</div>
          }
          <div
            role="option"
            class="option"
            [id]="id + '-' + index"
            [class.active]="index === active()"
            [attr.aria-selected]="index === active()"
            (mousedown)="$event.preventDefault()"
            tabindex="-1"
            (click)="take(option.source)"
            (keydown.enter)="take(option.source)"
          >
            <span class="key">{{ option.source.key }}</span>
            <span class="words">
              @if (option.source.group === 'Quantities') {
                <span class="mono">{{ option.source.symbol }}</span>
              }
              {{ option.source.name }}</span
            >
            <span class="number">{{ option.shown }}</span>
          </div>
        }
        @if (options().length === 0) {
          <p class="faint">{{ nothing() }}</p>
        }
      }
    </div>
  `,
  styleUrl: './bind-picker.scss',
})
export class BindPicker {
  private readonly units = inject(UnitPreferences);
  private readonly box = viewChild.required<ElementRef<HTMLInputElement>>('box');
  readonly label = input.required<string>();
  readonly placeholder = input('Key, symbol or word');
  readonly sources = input.required<readonly Source[]>();
  /** What to say when nothing can be picked. */
  readonly nothing = input('Nothing in the study matches.');
  readonly choose = output<Source>();

  protected readonly id = `bindable-${++count}`;
  protected readonly isOpen = signal(false);
  private readonly typed = signal('');
  protected readonly active = signal(0);
  protected readonly options = computed(() => {
    if (!this.isOpen()) return [];
    const found = this.sources().filter((source) => matchesWords(this.typed(), source.key, source.symbol, source.name));
    // What is named exactly as typed stands first.
    const exact = found.filter((source) => source.symbol === this.typed() || source.key === this.typed());
    const ordered = [...exact, ...found.filter((source) => !exact.includes(source))].slice(0, SHOWN);
    return ordered.map((source, index) => ({
      source,
      id: sourceId(source.from),
      opensGroup: index === 0 || ordered[index - 1]?.group !== source.group,
      shown: source.si === null ? '—' : this.units.show(source.si, source.unit, { temperature: source.temperature }),
    }));
  });

  focus(): void {
    this.box().nativeElement.focus();
  }

  protected type(text: string): void {
    this.typed.set(text);
    this.active.set(0);
    this.isOpen.set(true);
  }

  protected press(event: KeyboardEvent): void {
    const last = this.options().length - 1;
    switch (event.key) {
      case 'ArrowDown':
        if (this.isOpen()) this.active.update((at) => Math.min(last, at + 1));
        else this.isOpen.set(true);
        break;
      case 'ArrowUp':
        this.active.update((at) => Math.max(0, at - 1));
        break;
      case 'Enter': {
        const option = this.options()[this.active()];
        if (option === undefined) return;
        this.take(option.source);
        break;
      }
      case 'Escape':
        if (!this.isOpen()) return;
        this.isOpen.set(false);
        break;
      default:
        return;
    }
    event.preventDefault();
    event.stopPropagation();
    document.getElementById(`${this.id}-${this.active()}`)?.scrollIntoView({ block: 'nearest' });
  }

  protected take(source: Source): void {
    this.choose.emit(source);
    this.box().nativeElement.value = '';
    this.typed.set('');
    this.active.set(0);
    this.isOpen.set(false);
  }
}
