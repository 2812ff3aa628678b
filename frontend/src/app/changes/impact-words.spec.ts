import type { Impact, VerdictMove } from '@shared/contract';
import { counted, impactSentence, worseSentence } from './impact-words';

const MOVE: VerdictMove = { key: 'VEH-001', title: 'Provide total delta-v', before: null, after: null, limit: null };

function impact(turned: number, moved: number, better: number, worse: number): Impact {
  return {
    revision: 418,
    total: 42,
    turned: Array.from({ length: turned }, () => MOVE),
    moved: Array.from({ length: moved }, () => MOVE),
    better,
    worse: Array.from({ length: worse }, (_, index) => `VEH-00${index}`),
    budgets: [],
    problem: null,
  };
}
const said = (...counts: [number, number, number, number]): string => {
  const { strong, rest } = impactSentence(impact(...counts));
  return strong + rest;
};

describe('the sentence about what approval would do', () => {
  it('counts what turns apart from what only moves', () => {
    expect(said(3, 2, 1, 2)).toBe('Three of 42 verdicts turn, one for the better; two more move.');
    expect(said(1, 1, 0, 1)).toBe('One of 42 verdicts turns, for the worse; one more moves.');
    expect(said(2, 0, 2, 0)).toBe('Two of 42 verdicts turn, all for the better.');
    expect(said(3, 0, 0, 2)).toBe('Three of 42 verdicts turn, two for the worse.');
    expect(said(13, 0, 0, 13)).toBe('13 of 42 verdicts turn, all for the worse.');
  });

  it('says plainly when nothing turns', () => {
    expect(said(0, 0, 0, 0)).toBe('No verdict turns and no margin moves.');
    expect(said(0, 2, 0, 0)).toBe('No verdict turns; two move.');
  });

  it('speaks in the past tense of what was approved', () => {
    const { strong, rest } = impactSentence(impact(3, 1, 1, 2), true);
    expect(strong + rest).toBe('Three of 42 verdicts turned, one for the better; one more moved.');
    expect(impactSentence(impact(0, 0, 0, 0), true)).toEqual({
      strong: 'No verdict turned',
      rest: ' and no margin moved.',
    });
  });
});

describe('what a worse verdict means', () => {
  it('is said for the verdict it would become', () => {
    const after = { verdict: 'indeterminate', reason: '' } as NonNullable<VerdictMove['after']>;
    expect(worseSentence({ ...MOVE, after })).toEqual({
      strong: 'VEH-001 would become indeterminate:',
      rest: ' its limit would lie inside its uncertainty.',
    });
    const failed = { verdict: 'not computable', reason: 'Emissivity has no value.' } as typeof after;
    expect(worseSentence({ ...MOVE, after: failed }).rest).toBe(' Emissivity has no value.');
    expect(worseSentence(MOVE).strong).toBe('VEH-001 would be withdrawn.');
  });
});

describe('counted', () => {
  it('uses words for small numbers', () => {
    expect(counted(1, 'edit', 'edits')).toBe('one edit');
    expect(counted(14, 'edit', 'edits')).toBe('14 edits');
  });
});
