import type { OverviewView } from '@shared/contract';
import { closureHeadline, closureSentence } from './closure-words';
import { moveSentence } from './move-words';

const NONE = {
  compliant: 0,
  'short margin': 0,
  indeterminate: 0,
  'non-compliant': 0,
  'not computable': 0,
  'no evidence': 0,
};

describe('the opening of the overview', () => {
  it('says whether the study closes, by its short name', () => {
    expect(closureHeadline('Petrel, nuclear-electric tug', { closes: false, total: 42 })).toBe(
      'Petrel does not close yet.',
    );
    expect(closureHeadline('Cinder', { closes: true, total: 9 })).toBe('Cinder closes.');
    expect(closureHeadline('Blank', { closes: false, total: 0 })).toBe('Blank has no requirements yet.');
  });

  it('names every verdict that is open, in words, and how many hold', () => {
    const counts = { ...NONE, 'non-compliant': 2, 'short margin': 1, indeterminate: 1, compliant: 38 };
    expect(closureSentence({ counts, total: 42 })).toBe(
      'Two of 42 requirements miss their limit, one holds it with too little margin and one is indeterminate. The other 38 hold with margin.',
    );
    expect(closureSentence({ counts: { ...NONE, compliant: 9 }, total: 9 })).toBe(
      'All 9 requirements hold with margin.',
    );
    expect(closureSentence({ counts: { ...NONE, 'no evidence': 1 }, total: 1 })).toBe(
      'One requirement has no evidence. None holds with margin.',
    );
  });
});

describe('what one input alone would have to become', () => {
  const move: OverviewView['moves'][number] = {
    key: 'ARR-002',
    title: 'Arrive',
    quantityKey: 'Q-004',
    name: 'Specific power',
    from: { si: 20, unit: 'W/kg' },
    to: { si: 2400, unit: 'W/kg' },
    decades: 2.08,
  };
  const shown = ({ si, unit }: { si: number; unit: string }): string => `${si} ${unit}`;

  it('says the direction and the orders of magnitude', () => {
    const { before, to, after } = moveSentence(move, shown);
    expect(before).toContain('specific power alone would have to rise from 20 W/kg to ');
    expect([to, after]).toEqual(['2400 W/kg', ', by about two orders of magnitude.']);
  });

  it('leaves them out below a factor of ten, and keeps abbreviations', () => {
    const { before, after } = moveSentence(
      { ...move, name: 'PMAD efficiency', to: { si: 10, unit: 'W/kg' }, decades: null },
      shown,
    );
    expect(before).toContain('PMAD efficiency alone would have to fall from');
    expect(after).toBe('.');
  });
});
