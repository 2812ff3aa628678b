import {
  ChangeDetectionStrategy,
  Component,
  booleanAttribute,
  Directive,
  computed,
  inject,
  input,
} from '@angular/core';

let count = 0;

/**
 * A labelled control with its help and its refusal beside it. Put one native control with `dpControl` inside:
 * `<dp-field label="Name" [error]="…"><input dpControl formControlName="name" /></dp-field>`.
 */
@Component({
  selector: 'dp-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <label [attr.for]="controlId"
      >{{ label() }}
      @if (optional()) {
        <span class="faint">optional</span>
      }
    </label>
    <ng-content />
    @if (error()) {
      <p class="message" [id]="messageId" role="alert">{{ error() }}</p>
    } @else if (hint()) {
      <p class="hint" [id]="messageId">{{ hint() }}</p>
    }
  `,
  styles: `
    :host {
      display: block;
      min-width: 0;
    }
    label {
      display: block;
      margin-bottom: 3px;
      font-size: 13px;
      line-height: 18px;
      font-weight: 620;
    }
    label .faint {
      font-weight: 450;
    }
    p {
      margin: 4px 0 0;
      font-size: 13px;
      line-height: 18px;
    }
    .hint {
      color: var(--ink-2);
    }
    .message {
      color: var(--non-compliant);
    }
  `,
})
export class Field {
  private readonly number = ++count;
  readonly label = input.required<string>();
  readonly hint = input('');
  /** What is wrong and what would be right; empty when nothing is. */
  readonly error = input<string | undefined>('');
  readonly optional = input(false, { transform: booleanAttribute });

  readonly controlId = `field-${this.number}`;
  readonly messageId = `field-${this.number}-message`;
  readonly describedBy = computed(() => (this.error() || this.hint() ? this.messageId : null));
  readonly isRefused = computed(() => Boolean(this.error()));
}

/** Ties a native control to the `dp-field` around it. */
@Directive({
  selector: 'input[dpControl], textarea[dpControl], select[dpControl]',
  host: {
    class: 'control',
    '[id]': 'field.controlId',
    '[attr.aria-describedby]': 'field.describedBy()',
    '[attr.aria-invalid]': 'field.isRefused() ? true : null',
  },
})
export class Control {
  protected readonly field = inject(Field);
}
