import { Component, ChangeDetectionStrategy } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { QuantityField, typedMeasure } from './quantity-field';

@Component({
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [QuantityField, ReactiveFormsModule],
  template: '<dp-quantity-field label="Delta-v" unit="km/s" [formControl]="control" />',
})
class Form {
  readonly control = new FormControl('', { nonNullable: true });
}

describe('QuantityField', () => {
  async function field() {
    const fixture = TestBed.createComponent(Form);
    await fixture.whenStable();
    const host: HTMLElement = fixture.nativeElement;
    const box = host.querySelector('input');
    if (box === null) throw new Error('no input');
    const type = async (text: string): Promise<void> => {
      box.value = text;
      box.dispatchEvent(new Event('input'));
      box.dispatchEvent(new Event('blur'));
      await fixture.whenStable();
    };
    return { fixture, control: fixture.componentInstance.control, host, box, type };
  }

  it('takes any unit of the dimension and shows it in the one asked for', async () => {
    const { control, host, type } = await field();
    // 0.12 c = 0.12 · 299 792.458 km/s = 35 975.09 km/s.
    await type('0.12 c');
    expect(control.valid).toBe(true);
    expect(control.value).toBe('0.12 c');
    expect(host.querySelector('.echo')?.textContent).toMatch(/^= 35\u2009975\s?km\/s$/);
  });

  it('refuses another dimension beside the field and keeps what was typed', async () => {
    const { control, host, box, type } = await field();
    await type('38 kg');
    expect(control.hasError('measure')).toBe(true);
    expect(control.value).toBe('38 kg');
    expect(box.getAttribute('aria-invalid')).toBe('true');
    const message = host.querySelector(`#${box.getAttribute('aria-describedby')}`);
    expect(message?.textContent).toContain('38 kg');
  });

  it('asks for a unit when none is typed', async () => {
    const { control, host, type } = await field();
    await type('38');
    expect(control.valid).toBe(false);
    expect(host.querySelector('.message')?.textContent).toContain('has no unit');
  });

  it('says nothing while the person is still in a fresh field', async () => {
    const { fixture, host, box } = await field();
    box.value = '38 k';
    box.dispatchEvent(new Event('input'));
    await fixture.whenStable();
    expect(host.querySelector('.message')).toBeNull();
  });
});

describe('typedMeasure', () => {
  it('keeps the digits as typed', () => {
    expect(typedMeasure('38.00 km/s', 'm/s')).toEqual({ text: '38.00', unit: 'km/s' });
    expect(typedMeasure('38.00', 'km/s', 'absolute', true)).toEqual({ text: '38.00', unit: 'km/s' });
    expect(typedMeasure('thirty', 'km/s')).toBeNull();
  });
});
