import { standing } from './standing';

const none = {
  compliant: 0,
  'short margin': 0,
  indeterminate: 0,
  'non-compliant': 0,
  'not computable': 0,
  'no evidence': 0,
};

describe('standing', () => {
  it('says what fails before anything else', () => {
    expect(standing({ ...none, compliant: 36, 'short margin': 1, 'non-compliant': 2 })).toBe(
      'does not close: 2 requirements miss their limit',
    );
    expect(standing({ ...none, 'non-compliant': 1 })).toBe('does not close: one requirement misses its limit');
  });

  it('never says that a study closes while anything is short or without a result', () => {
    expect(standing({ ...none, compliant: 40, 'no evidence': 1 })).toMatch(/^not shown to close: one requirement is/);
    expect(standing({ ...none, compliant: 16 })).toBe('closes: all 16 requirements hold with margin');
    expect(standing(none)).toBe('has no requirements yet');
  });
});
