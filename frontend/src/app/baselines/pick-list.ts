import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { SectionCaption } from '../ui/section-caption/section-caption';

/** Something that can be taken into a baseline. */
export interface Candidate {
  readonly id: string;
  readonly key: string;
  readonly title: string;
  readonly note: string;
  /** True when it cannot be picked; the note then says why. */
  readonly isBarred?: boolean;
}

/** A list to pick from, with all and none. */
@Component({
  selector: 'dp-pick-list',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [SectionCaption],
  template: `
    <dp-section-caption [text]="caption()" />
    @if (error()) {
      <p class="message small" role="alert">{{ error() }}</p>
    }
    @if (candidates().length > 0) {
      <p class="small faint">
        {{ count() }} of {{ open().length }} chosen
        <button type="button" class="quiet" (click)="all()">
          All<span class="only-heard"> {{ caption() }}</span>
        </button>
        <button type="button" class="quiet" (click)="pickedChange.emit(nothing)">
          None<span class="only-heard"> {{ caption() }}</span>
        </button>
      </p>
      <ul class="rows" [attr.aria-label]="caption()">
        @for (candidate of candidates(); track candidate.id) {
          <li>
            <label class="choice">
              <input
                type="checkbox"
                [checked]="picked().has(candidate.id)"
                [disabled]="candidate.isBarred ?? false"
                (change)="toggle(candidate.id)"
              />
              <span
                ><span class="key">{{ candidate.key }}</span> {{ candidate.title }}
                <span class="faint small">{{ candidate.note }}</span></span
              >
            </label>
          </li>
        }
      </ul>
    } @else {
      <p class="faint">{{ none() }}</p>
    }
  `,
  styles: `
    :host {
      display: block;
      min-width: 0;
    }
    p {
      margin: 0 0 4px;
    }
    .rows {
      border-top: 1.5px solid var(--line);
    }
    @media (min-width: 1081px) {
      .rows {
        max-height: max(320px, calc(var(--sheet-height) - 210px));
        overflow-y: auto;
      }
    }
    li {
      padding: 2px 0;
    }
    .choice {
      align-items: flex-start;
      width: 100%;
      padding: 4px 0;
    }
    .choice input {
      flex: none;
    }
    .message {
      color: var(--non-compliant);
    }
  `,
})
export class PickList {
  readonly caption = input.required<string>();
  readonly candidates = input.required<readonly Candidate[]>();
  readonly picked = input.required<ReadonlySet<string>>();
  /** What stands there when there is nothing to pick from. */
  readonly none = input('');
  readonly error = input('');
  readonly pickedChange = output<ReadonlySet<string>>();

  protected readonly nothing: ReadonlySet<string> = new Set();
  protected readonly open = computed(() => this.candidates().filter(({ isBarred }) => isBarred !== true));
  protected readonly count = computed(() => this.candidates().filter(({ id }) => this.picked().has(id)).length);

  protected all(): void {
    this.pickedChange.emit(new Set(this.open().map(({ id }) => id)));
  }

  protected toggle(id: string): void {
    const picked = new Set(this.picked());
    if (!picked.delete(id)) picked.add(id);
    this.pickedChange.emit(picked);
  }
}
