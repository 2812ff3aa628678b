import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Control, Field } from './field';

@Component({
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field],
  template: '<dp-field label="Key" hint="Capital letters" [error]="error()" optional><input dpControl /></dp-field>',
})
class Form {
  readonly error = signal('');
}

describe('Field', () => {
  it('ties label, help and refusal to the control', () => {
    const fixture = TestBed.createComponent(Form);
    fixture.detectChanges();
    const host: HTMLElement = fixture.nativeElement;
    const control = host.querySelector('input');
    expect(host.querySelector('label')?.htmlFor).toBe(control?.id);
    expect(host.querySelector('label')?.textContent).toMatch(/Key\s+optional/);
    const described = (): string | undefined =>
      host.querySelector(`#${control?.getAttribute('aria-describedby')}`)?.textContent ?? undefined;
    expect(described()).toBe('Capital letters');
    expect(control?.hasAttribute('aria-invalid')).toBe(false);

    fixture.componentInstance.error.set('“petrel” is no key.');
    fixture.detectChanges();
    expect(described()).toBe('“petrel” is no key.');
    expect(control?.getAttribute('aria-invalid')).toBe('true');
  });
});
