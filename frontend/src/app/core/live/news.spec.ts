import type { StudyEvent } from '@shared/contract';
import { newsOf } from './news';

const event: StudyEvent = {
  revision: 419,
  by: 'M. Sato',
  byId: 'p2',
  at: '',
  summary: 'Set specific impulse',
  moved: [],
  touched: [],
};

describe('newsOf', () => {
  it('names the verdicts that turned and leaves out those that only moved', () => {
    const moved = [
      { key: 'VEH-002', from: 'compliant', to: 'non-compliant' },
      { key: 'VEH-001', from: 'compliant', to: 'compliant' },
    ] as const;
    expect(newsOf({ ...event, moved })).toBe('M. Sato, r419: Set specific impulse. VEH-002 is now non-compliant.');
    expect(newsOf(event)).toBe('M. Sato, r419: Set specific impulse.');
  });

  it('counts what it does not name', () => {
    const moved = [1, 2, 3, 4, 5].map((n) => ({
      key: `A-00${n}`,
      from: 'compliant' as const,
      to: 'short margin' as const,
    }));
    expect(newsOf({ ...event, moved })).toContain('A-003 is now short margin, 2 more verdicts turned.');
  });
});
