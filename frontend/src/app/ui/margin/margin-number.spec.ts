import { TestBed } from '@angular/core/testing';
import { MarginNumber } from './margin-number';

describe('MarginNumber', () => {
  function number(margin: unknown, unit: string): HTMLElement {
    const fixture = TestBed.createComponent(MarginNumber);
    fixture.componentRef.setInput('margin', margin);
    fixture.componentRef.setInput('unit', unit);
    fixture.detectChanges();
    return fixture.nativeElement;
  }

  it('shows per cent and the absolute margin on hover', () => {
    const host = number({ absolute: 1100, percent: 2.89, percentOf: '', atLimit: false }, 'km/s');
    expect(host.textContent).toBe('+2.9\u00a0%');
    expect(host.title).toMatch(/^1\.1\s?km\/s$/);
  });

  it('shows the absolute margin where per cent has no meaning', () => {
    expect(number({ absolute: 88, percent: null, percentOf: '', atLimit: false }, 'K').textContent).toMatch(
      /^\+88\s?K$/,
    );
    expect(number(null, 'K').textContent).toBe('');
  });

  it('writes a margin of a temperature as a difference: 5 K of margin are 5 °C, not −268', () => {
    const host = number({ absolute: 5, percent: 0.6, percentOf: 'of kelvin', atLimit: false }, '°C');
    expect(host.title).toMatch(/^5\s?°C; per cent of kelvin$/);
  });
});
