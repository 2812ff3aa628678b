import { matchesWords } from './address';

describe('matchesWords', () => {
  it('asks for every word, in any order and case', () => {
    expect(matchesWords('heat RAD', 'RAD-002', 'Reject waste heat')).toBe(true);
    expect(matchesWords('heat VEH', 'RAD-002', 'Reject waste heat')).toBe(false);
    expect(matchesWords('', 'anything')).toBe(true);
  });
});
