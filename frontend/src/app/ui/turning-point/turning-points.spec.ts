import { TestBed } from '@angular/core/testing';
import type { TurningPoint } from '@shared/contract';
import { TurningPoints } from './turning-points';

const point = (symbol: string, now: number, atLimit: number | null): TurningPoint => ({
  quantityKey: `Q-${symbol}`,
  symbol,
  tex: symbol,
  name: `Name of ${symbol}`,
  now: { si: now, unit: 's' },
  atLimit,
  atRequired: null,
  percent: atLimit === null ? null : ((atLimit - now) / now) * 100,
});

describe('TurningPoints', () => {
  it('puts the input that turns the verdict soonest first and one that never does last', () => {
    const fixture = TestBed.createComponent(TurningPoints);
    // 6500 → 6320 s is −2.8 %; 55 → 53.9 is −2.0 %.
    fixture.componentRef.setInput('points', [point('a', 10, null), point('b', 6500, 6320), point('c', 55, 53.9)]);
    fixture.detectChanges();
    const rows: HTMLElement[] = [...fixture.nativeElement.querySelectorAll('tbody tr')];
    expect(rows.map((row) => row.children[1]?.textContent)).toEqual(['Name of c', 'Name of b', 'Name of a']);
    expect(rows[1]?.querySelector('.change')?.textContent).toBe('−2.8\u00a0%');
    expect(rows[2]?.textContent).toContain('not reached');
    expect(rows[2]?.querySelector('path.way')).toBeNull();
  });
});
