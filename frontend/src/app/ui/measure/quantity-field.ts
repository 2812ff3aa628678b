import {
  ChangeDetectionStrategy,
  Component,
  type ElementRef,
  booleanAttribute,
  computed,
  effect,
  forwardRef,
  input,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import {
  type AbstractControl,
  type ControlValueAccessor,
  NG_VALIDATORS,
  NG_VALUE_ACCESSOR,
  type ValidationErrors,
  type Validator,
} from '@angular/forms';
import { type TemperatureKind, parseUnit, formatSi, parseMeasure, prettyUnit, siUnitOf } from '@shared/units';

let count = 0;

/**
 * A number typed with any unit of the right dimension: "38 km/s", "0.12 c". The form value is the text as typed, which
 * survives whatever is wrong with it; `typedMeasure` turns it into digits and unit for a command.
 */
@Component({
  selector: 'dp-quantity-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <label [attr.for]="id"
      >{{ label() }}
      @if (optional()) {
        <span class="faint">optional</span>
      }
    </label>
    <div class="row">
      <input
        #box
        class="control mono"
        autocomplete="off"
        spellcheck="false"
        [id]="id"
        [value]="text()"
        [disabled]="isDisabled()"
        [placeholder]="placeholder()"
        [attr.aria-invalid]="shownError() === '' ? null : true"
        [attr.aria-describedby]="id + '-message'"
        (input)="type(box.value)"
        (blur)="leave()"
      />
      @if (echo()) {
        <span class="echo">{{ echo() }}</span>
      }
    </div>
    <p [id]="id + '-message'" [class.message]="shownError() !== ''" aria-live="polite">{{ shownError() || hint() }}</p>
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
    .row {
      position: relative;
    }
    .echo {
      position: absolute;
      right: 10px;
      top: 8px;
      max-width: 50%;
      overflow: hidden;
      color: var(--ink-2);
      background: var(--lifted);
      font: 400 13px / 20px var(--mono);
      letter-spacing: 0;
      pointer-events: none;
    }
    p {
      margin: 4px 0 0;
      color: var(--ink-2);
      font-size: 13px;
      line-height: 18px;
    }
    p:empty {
      display: none;
    }
    p.message {
      color: var(--non-compliant);
    }
  `,
  providers: [
    { provide: NG_VALUE_ACCESSOR, useExisting: forwardRef(() => QuantityField), multi: true },
    { provide: NG_VALIDATORS, useExisting: forwardRef(() => QuantityField), multi: true },
  ],
})
export class QuantityField implements ControlValueAccessor, Validator {
  readonly label = input.required<string>();
  /** A unit of the dimension asked for; also the example and what the echo is converted to. */
  readonly unit = input.required<string>();
  readonly temperature = input<TemperatureKind>('absolute');
  /** Takes a bare number in `unit`. Off by default: a number without unit is asked for one. */
  readonly assumeUnit = input(false);
  readonly optional = input(false, { transform: booleanAttribute });
  readonly hint = input('');
  /** A refusal of the server for this field. */
  readonly error = input<string | undefined>('');

  private readonly box = viewChild<ElementRef<HTMLInputElement>>('box');
  protected readonly id = `quantity-${++count}`;
  protected readonly text = signal('');
  protected readonly isDisabled = signal(false);
  /** What is wrong is said once the person has left the field, and from then on with each key. */
  private readonly hasLeft = signal(false);
  private onChange: (text: string) => void = () => undefined;
  private onTouched: () => void = () => undefined;
  private onValidatorChange: () => void = () => undefined;

  private readonly result = computed(() => readTyped(this.text(), this.unit(), this.temperature(), this.assumeUnit()));
  protected readonly placeholder = computed(() =>
    this.unit() === '' || this.unit() === '1' ? '0.88' : `… ${prettyUnit(this.unit())}`,
  );
  protected readonly shownError = computed(() => {
    if (this.error()) return this.error() ?? '';
    const result = this.result();
    if (!this.hasLeft() || result.ok || (result.code === 'empty' && this.optional())) return '';
    return result.message;
  });
  protected readonly echo = computed(() => {
    const result = this.result();
    if (!result.ok || result.measure.unit === '' || result.measure.unit === this.unit()) return '';
    return `= ${formatSi(result.measure.si, this.unit(), { temperature: this.temperature(), digits: 4 })}`;
  });

  constructor() {
    // Another unit or kind changes what is right; the form must hear of it.
    effect(() => {
      this.unit();
      this.temperature();
      this.optional();
      this.assumeUnit();
      untracked(() => this.onValidatorChange());
    });
  }

  protected type(text: string): void {
    this.text.set(text);
    this.onChange(text);
  }

  protected leave(): void {
    if (this.text() !== '') this.hasLeft.set(true);
    this.onTouched();
  }

  /** Shows what is wrong even if the field was never entered, when the form is sent. */
  reveal(): void {
    this.hasLeft.set(true);
  }

  focus(): void {
    this.box()?.nativeElement.focus();
  }

  writeValue(text: string | null): void {
    this.text.set(text ?? '');
  }

  registerOnChange(onChange: (text: string) => void): void {
    this.onChange = onChange;
  }

  registerOnTouched(onTouched: () => void): void {
    this.onTouched = onTouched;
  }

  registerOnValidatorChange(onValidatorChange: () => void): void {
    this.onValidatorChange = onValidatorChange;
  }

  setDisabledState(isDisabled: boolean): void {
    this.isDisabled.set(isDisabled);
  }

  validate(control: AbstractControl<string | null>): ValidationErrors | null {
    const result = readTyped(control.value ?? '', this.unit(), this.temperature(), this.assumeUnit());
    if (result.ok || (result.code === 'empty' && this.optional())) return null;
    return { measure: result.message };
  }
}

/** Reads what was typed into a quantity field whose dimension is that of `unit`. Errors: those of parseMeasure. */
export function readTyped(text: string, unit: string, temperature: TemperatureKind = 'absolute', assumeUnit = false) {
  const expected = parseUnit(unit);
  if (!expected.ok) return { ok: false as const, code: 'unknown-unit' as const, message: expected.message };
  return parseMeasure(text, {
    dimension: expected.unit.dimension,
    temperature,
    ...(assumeUnit ? { defaultUnit: unit === '' ? siUnitOf(expected.unit.dimension) : unit } : {}),
  });
}

/** Digits and unit of what was typed, as commands take them; null when it is empty or wrong. */
export function typedMeasure(
  text: string,
  unit: string,
  temperature: TemperatureKind = 'absolute',
  assumeUnit = false,
): { readonly text: string; readonly unit: string } | null {
  const result = readTyped(text, unit, temperature, assumeUnit);
  return result.ok ? { text: result.measure.text, unit: result.measure.unit } : null;
}
