import { TestBed } from '@angular/core/testing';
import type { BudgetView } from '@shared/contract';
import { BudgetRibbon } from './budget-ribbon';
import { budgetSentence } from './budget-sentence';
import { ribbonOf } from './ribbon';

const share = (key: string, value: number | null, status: 'adopted' | 'proposed' = 'adopted') => ({
  traceId: key,
  traceVersion: 1,
  key,
  title: `Title of ${key}`,
  value,
  status,
});

/** The delta-v limit of Petrel: 24.5 + 9.5 + 2.0 = 36.0 of 38.0 km/s, 2.0 in reserve. */
const PETREL: BudgetView = {
  rule: 'sum',
  sense: 'demands',
  unit: 'km/s',
  difference: false,
  limit: 38_000,
  shares: [share('PRP-001', 24_500), share('PRP-002', 9500), share('PRP-003', 2000)],
  allocated: 36_000,
  reserve: 2000,
  reserveIfAdopted: 2000,
  closes: true,
  problem: '',
};

describe('ribbonOf', () => {
  it('gives each child its share of the limit and the rest to the reserve', () => {
    const ribbon = ribbonOf(PETREL);
    expect(ribbon?.limit).toBe(1);
    expect(ribbon?.segments.map((segment) => segment.kind)).toEqual(['adopted', 'adopted', 'adopted', 'reserve']);
    expect(ribbon?.segments[0]?.length).toBeCloseTo(24.5 / 38, 12);
    expect(ribbon?.segments[3]?.length).toBeCloseTo(2 / 38, 12);
  });

  it('draws what goes past the limit apart', () => {
    // 24.5 + 9.5 + 8 = 42 of 38: the last share has 4 inside and 4 past the end; the whole is 42.
    const ribbon = ribbonOf({ ...PETREL, shares: [share('A', 24_500), share('B', 9500), share('C', 8000)] });
    expect(ribbon?.segments.map((segment) => segment.kind)).toEqual(['adopted', 'adopted', 'adopted', 'overrun']);
    expect(ribbon?.segments[3]?.length).toBeCloseTo(4 / 42, 12);
    expect(ribbon?.limit).toBeCloseTo(38 / 42, 12);
  });

  it('puts proposed shares after the adopted ones', () => {
    const ribbon = ribbonOf({ ...PETREL, shares: [share('NEW', 1000, 'proposed'), share('A', 24_500)] });
    expect(ribbon?.segments.map((segment) => segment.share?.key)).toEqual(['A', 'NEW', undefined]);
  });

  it('draws root-sum-squares by their squares and nothing that has no length', () => {
    // 3 and 4 against 5: 9/25 and 16/25.
    const rss = ribbonOf({ ...PETREL, rule: 'root-sum-square', limit: 5, shares: [share('A', 3), share('B', 4)] });
    expect(rss?.segments.map((segment) => segment.length)).toEqual([9 / 25, 16 / 25]);
    expect(ribbonOf({ ...PETREL, rule: 'product' })).toBeNull();
    expect(ribbonOf({ ...PETREL, shares: [share('A', null)] })).toBeNull();
  });
});

describe('budgetSentence', () => {
  const text = (budget: BudgetView): string => {
    const { before, strong, after } = budgetSentence(budget);
    return `${before}${strong}${after}`.replaceAll('\u00a0', ' ');
  };

  it('says what is shared out and what is left', () => {
    expect(text(PETREL)).toBe(
      'Demands add up: 36 km/s of 38 km/s shared out, 2 km/s held in reserve. The budget closes.',
    );
  });

  it('says how much is too much, and what supply lacks', () => {
    expect(text({ ...PETREL, allocated: 42_000, reserve: -4000, closes: false })).toContain(
      '4 km/s too much. The budget does not close.',
    );
    expect(text({ ...PETREL, sense: 'contributions', reserve: -2000, closes: false })).toContain('2 km/s missing');
  });

  it('names the problem where a share has no number', () => {
    expect(text({ ...PETREL, allocated: null, reserve: null, closes: null, problem: 'PRP-003 has no limit' })).toBe(
      'Demands add up: PRP-003 has no limit.',
    );
  });
});

describe('BudgetRibbon', () => {
  it('opens a child by its segment', () => {
    const fixture = TestBed.createComponent(BudgetRibbon);
    fixture.componentRef.setInput('budget', PETREL);
    const opened: string[] = [];
    fixture.componentInstance.open.subscribe((key) => opened.push(key));
    fixture.detectChanges();
    const buttons: NodeListOf<HTMLButtonElement> = fixture.nativeElement.querySelectorAll('button');
    expect(buttons[0]?.textContent?.trim()).toBe('PRP-001 · 24.5');
    buttons[1]?.click();
    expect(opened).toEqual(['PRP-002']);
  });
});
