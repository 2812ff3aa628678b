import type { ChangeSheet } from '@shared/contract';
import { changeActions } from './change-actions';

const SHEET = {
  key: 'CR-024',
  reason: 'The working fluid loses margin above 800 K.',
  inConflict: false,
  votesFor: 0,
  votesAgainst: 0,
  quorum: 2,
  summaries: [{ index: 0 }],
  impact: { problem: null },
  board: [
    { id: 'chair', name: 'R. Adeyemi', chair: true, vote: null, author: false },
    { id: 'member', name: 'L. Brandt', chair: false, vote: null, author: false },
  ],
  may: [],
} as unknown as ChangeSheet;

const offered = (sheet: Partial<ChangeSheet>, me = 'member', draft: 'closed' | 'open' | 'here' = 'closed') =>
  changeActions({ ...SHEET, ...sheet }, { me, draft });
const labels = (...args: Parameters<typeof offered>) => offered(...args).map(({ label }) => label);
const main = (...args: Parameters<typeof offered>) => offered(...args).filter((action) => action.main);

describe('the actions of a change request', () => {
  it('are none for who may do nothing', () => {
    expect(labels({})).toEqual([]);
  });

  it('end with submitting for its author, and with adding an edit as long as it proposes nothing', () => {
    const may: ChangeSheet['may'] = ['change.revise', 'change.amend', 'change.submit', 'change.withdraw'];
    expect(labels({ may }, 'author', 'open')).toEqual([
      'Withdraw',
      'Edit',
      'Look from this draft',
      'Add an edit',
      'Submit',
    ]);
    expect(main({ may }).map(({ step }) => step)).toEqual(['submit']);
    expect(main({ may, summaries: [] }).map(({ step }) => step)).toEqual(['add']);
    expect(offered({ may, reason: ' ' }).at(-1)?.reason).toContain('Say why');
  });

  it('put the vote last until it is given, then the disposition', () => {
    const may: ChangeSheet['may'] = ['change.vote', 'change.dispose'];
    expect(labels({ may }, 'chair')).toEqual(['Defer', 'Reject', 'Approve', 'Against', 'For']);
    const vote = { personId: 'chair', vote: 'for' as const, remark: '', at: '2026-01-01' };
    const board = SHEET.board.map((seat) => (seat.id === 'chair' ? { ...seat, vote } : seat));
    expect(labels({ may, board }, 'chair')).toEqual(['Against', 'For', 'Defer', 'Reject', 'Approve']);
    expect(main({ may, board }, 'chair').map(({ step }) => step)).toEqual(['approve']);
  });

  it('refuse approval with the reason while votes are missing or what it edits has moved', () => {
    const may: ChangeSheet['may'] = ['change.dispose'];
    expect(offered({ may, votesFor: 1 }).at(-1)?.reason).toBe(
      'CR-024 has 1 of the 2 votes for it that approval needs.',
    );
    expect(offered({ may, votesFor: 2, inConflict: true }).at(-1)?.reason).toContain('in conflict');
    expect(offered({ may, votesFor: 2 }).at(-1)?.reason).toBeUndefined();
  });
});
