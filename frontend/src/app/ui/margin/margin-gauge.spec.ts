import { TestBed } from '@angular/core/testing';
import { gaugeReading } from './gauge-reading';
import { MarginGauge } from './margin-gauge';
import { marginPlace } from './margin-scale';
import { percentText } from './margin-text';

describe('marginPlace', () => {
  it('puts the limit in the middle and grows with the square root', () => {
    expect(marginPlace(0)).toBe(0);
    expect(marginPlace(35)).toBe(1);
    // A quarter of the full scale lies at half of the way: sqrt(8.75 / 35) = 0.5.
    expect(marginPlace(8.75)).toBeCloseTo(0.5, 12);
    expect(marginPlace(-8.75)).toBeCloseTo(-0.5, 12);
  });

  it('stays on the scale however large the margin', () => {
    expect(marginPlace(-7800)).toBe(-1);
    expect(marginPlace(Number.POSITIVE_INFINITY)).toBe(1);
  });
});

describe('percentText', () => {
  it.each([
    [2.84, '+2.8\u00a0%'],
    [-3.4, '\u22123.4\u00a0%'],
    [0, '0.0\u00a0%'],
    [-0.04, '0.0\u00a0%'],
    [-7800.4, '\u22127\u2009800\u00a0%'],
    [Number.NaN, '—'],
  ])('writes %p as %p', (percent, text) => {
    expect(percentText(percent)).toBe(text);
  });
});

describe('gaugeReading', () => {
  const required = { percent: 5, absolute: 1900, definition: '', source: '' };

  it('brings required margin and uncertainty to per cent of the limit', () => {
    // Limit 38 km/s, value 39.1 km/s: 1100/38000 = 2.89 %; U = 900 m/s = 2.37 %; required 1900 m/s = 5 %.
    const margin = { absolute: 1100, percent: (1100 / 38000) * 100, percentOf: '', atLimit: false };
    const reading = gaugeReading({ verdict: 'short margin', margin, required, expanded: 900, value: { si: 39100 } });
    expect(reading?.required).toBeCloseTo(5, 9);
    expect(reading?.uncertainty).toBeCloseTo(2.368, 3);
  });

  it('scales by the value when the value stands at the limit', () => {
    const margin = { absolute: 0, percent: 0, percentOf: '', atLimit: true };
    const reading = gaugeReading({
      verdict: 'compliant',
      margin,
      required: null,
      expanded: 200,
      value: { si: 20_000 },
    });
    expect(reading).toMatchObject({ margin: 0, uncertainty: 1 });
  });

  it('takes the required margin as measure where the limit is zero', () => {
    const margin = { absolute: 950, percent: null, percentOf: '', atLimit: false };
    expect(
      gaugeReading({ verdict: 'short margin', margin, required, expanded: null, value: null })?.margin,
    ).toBeCloseTo(5, 9);
  });

  it('has nothing to draw without a margin', () => {
    expect(
      gaugeReading({ verdict: 'no evidence', margin: null, required: null, expanded: null, value: null }),
    ).toBeNull();
  });
});

describe('MarginGauge', () => {
  function gauge(inputs: Record<string, unknown>): HTMLElement {
    const fixture = TestBed.createComponent(MarginGauge);
    for (const [name, value] of Object.entries(inputs)) fixture.componentRef.setInput(name, value);
    fixture.detectChanges();
    return fixture.nativeElement;
  }

  it('draws what misses the limit to the left of it', () => {
    const host = gauge({
      reading: { verdict: 'non-compliant', margin: -3.4, required: 5, uncertainty: null },
      width: 146,
    });
    const bar = host.querySelector('.bar');
    const start = Number(bar?.getAttribute('x'));
    expect(start).toBeLessThan(73);
    expect(start + Number(bar?.getAttribute('width'))).toBeCloseTo(73, 6);
    expect(host.querySelector('.whisker')).toBeNull();
    expect(host.querySelector('svg')?.getAttribute('aria-label')).toBe(
      'Non-compliant, margin −3.4\u00a0%, +5.0\u00a0% required',
    );
  });

  it('shows what approval would make of it below a faded bar', () => {
    const host = gauge({
      reading: { verdict: 'indeterminate', margin: 0.7, required: 5, uncertainty: 2 },
      proposed: { verdict: 'compliant', margin: 7.3, required: 5, uncertainty: 2 },
    });
    expect(host.querySelectorAll('.bar')).toHaveLength(2);
    expect(host.querySelectorAll('.before')).toHaveLength(1);
    expect(host.querySelector('svg')?.getAttribute('aria-label')).toContain('If approved: Compliant, margin +7.3');
  });
});
