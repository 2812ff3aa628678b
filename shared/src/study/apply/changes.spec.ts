import type { Command } from '@shared/contract';
import { proveAll } from '../prove';
import type { Study } from '../study';
import { refused } from '../testing/refused';
import { CHANGE, approval, bringToVote, reviewedStudy, seen, writeChange } from '../testing/reviewed-study';
import {
  ANALYST,
  CHAIR,
  ID,
  MEMBER,
  OWNER,
  edit,
  idOf,
  limit,
  requirement,
  type Somebody,
} from '../testing/small-study';
import { isInConflict } from '../views/proposed-edits';

const setIsp = (study: Study, text: string, ahead = 0): Command => ({
  type: 'quantity.set',
  id: ID.isp,
  version: study.get('quantity', ID.isp)!.version + ahead,
  value: { text, unit: 's' },
});
const setDry = (study: Study, text: string): Command => ({
  type: 'quantity.set',
  ...seen(study, 'quantity', ID.dry),
  value: { text, unit: 't' },
});
const step = (study: Study, type: string, more: object = {}): Command =>
  ({ type, ...seen(study, 'change', CHANGE), ...more }) as Command;
const reviseMass = (study: Study, text: string): Command => ({
  type: 'requirement.revise',
  ...seen(study, 'requirement', ID.mass),
  changes: { limit: limit('at most', text, 't') },
});

describe('writing a change request', () => {
  it('is class 1 when it touches a baselined limit, trace or budget, else class 2', () => {
    const study = reviewedStudy();
    writeChange(study, OWNER, setIsp(study, '6600'));
    expect(study.get('change', CHANGE)).toMatchObject({ key: 'CR-001', class: 2, state: 'draft' });
    edit(study, OWNER, step(study, 'change.amend', { edits: [reviseMass(study, '118')] }));
    expect(study.get('change', CHANGE)!.class).toBe(1);
  });

  it('tries its edits: what could not be approved now is refused while it is written', () => {
    const study = reviewedStudy();
    const write = (...edits: Command[]): Command =>
      ({ type: 'change.write', title: 'T', reason: '', due: null, edits }) as Command;
    expect(refused(study, OWNER, write(setIsp(study, '0'))).details.field).toBe('value');
    expect(refused(study, OWNER, write(setIsp(study, '6600', 5))).code).toBe('stale');
    expect(refused(study, OWNER, write({ type: 'quantity.remove', ...seen(study, 'quantity', ID.dry) })).code).toBe(
      'in-use',
    );
    writeChange(study, OWNER, setIsp(study, '6600'));
    expect(refused(study, OWNER, step(study, 'change.amend', { edits: [setIsp(study, '6700')] })).code).toBe('stale');
    edit(study, OWNER, step(study, 'change.amend', { edits: [setIsp(study, '6700', 1)] }));
    expect(study.get('change', CHANGE)!.edits).toHaveLength(2);
  });

  it('rebuilds a draft with the same identifiers, traces of new requirements included', () => {
    const study = reviewedStudy();
    writeChange(
      study,
      OWNER,
      requirement({ id: idOf(80), title: 'spare', parentIds: [ID.deltaV], limit: limit('at most', '1', 'km/s') }),
    );
    const { edits } = study.get('change', CHANGE)!;
    expect(edits.map(({ type }) => type)).toEqual(['requirement.create', 'trace.link']);
    const trace = (edits[1] as { id: string }).id;
    edit(
      study,
      OWNER,
      step(study, 'change.amend', { edits: [{ type: 'budget.propose', id: trace, version: 1, share: 'proposed' }] }),
    );
  });

  it('is edited by its author only, and while it is a draft', () => {
    const study = reviewedStudy();
    writeChange(study, OWNER, setIsp(study, '6600'), setIsp(study, '6700', 1));
    for (const type of ['change.revise', 'change.submit', 'change.withdraw', 'change.drop', 'change.rebase']) {
      const refusal = refused(study, ANALYST, step(study, type, { changes: {}, index: 0, reason: 'x' }));
      expect(refusal).toMatchObject({ code: 'forbidden' });
      expect(refusal.message).toContain(OWNER.name);
    }
    expect(refused(study, OWNER, step(study, 'change.drop', { index: 7 })).details.field).toBe('index');
    edit(study, OWNER, step(study, 'change.submit'));
    expect(refused(study, OWNER, step(study, 'change.drop', { index: 0 })).code).toBe('state');
    expect(refused(study, OWNER, step(study, 'change.amend', { edits: [setDry(study, '1')] })).code).toBe('state');
  });

  it('keeps later edits of the same thing in step when one is dropped', () => {
    const study = reviewedStudy();
    writeChange(study, OWNER, setIsp(study, '6600'), setIsp(study, '6700', 1));
    edit(study, OWNER, step(study, 'change.drop', { index: 0 }));
    expect(isInConflict(study, study.get('change', CHANGE)!)).toBe(false);
    edit(study, OWNER, step(study, 'change.submit'));
  });

  it('is not submitted without a reason or without edits', () => {
    const study = reviewedStudy();
    edit(study, OWNER, { type: 'change.write', id: CHANGE, title: 'T', reason: '', due: null, edits: [] });
    expect(refused(study, OWNER, step(study, 'change.submit')).details.field).toBe('reason');
    edit(study, OWNER, step(study, 'change.revise', { changes: { reason: 'r' } }));
    expect(refused(study, OWNER, step(study, 'change.submit')).details.field).toBe('edits');
  });
});

describe('voting and disposing', () => {
  function beforeBoard(author: Somebody): Study {
    const study = reviewedStudy();
    writeChange(study, author, setIsp(study, '6600'), reviseMass(study, '125'));
    edit(study, author, step(study, 'change.submit'));
    edit(study, CHAIR, step(study, 'change.refer', { due: null }));
    return study;
  }
  const vote = (study: Study, value: 'for' | 'against', remark = ''): Command =>
    step(study, 'change.vote', { vote: value, remark });
  const dispose = (study: Study, decision: string, reason = ''): Command =>
    step(study, 'change.dispose', { decision, reason });

  it('gives its author no vote and no disposition', () => {
    const study = beforeBoard(MEMBER);
    const refusal = refused(study, MEMBER, vote(study, 'for'));
    expect(refusal.code).toBe('forbidden');
    expect(refusal.message).toBe('You raised CR-001; its author does not vote on it.');
    const raisedByChair = beforeBoard(CHAIR);
    edit(raisedByChair, MEMBER, vote(raisedByChair, 'for'));
    expect(refused(raisedByChair, CHAIR, dispose(raisedByChair, 'approved'))).toMatchObject({ code: 'forbidden' });
  });

  it('is for the board: an analyst does not vote and a member does not dispose', () => {
    const study = beforeBoard(OWNER);
    expect(refused(study, ANALYST, vote(study, 'for')).message).toContain('board member or board chair');
    expect(refused(study, MEMBER, dispose(study, 'approved')).message).toContain('board chair');
  });

  it('counts one vote a person, the last one, and asks why against', () => {
    const study = beforeBoard(OWNER);
    expect(refused(study, MEMBER, vote(study, 'against')).details.field).toBe('remark');
    edit(study, MEMBER, vote(study, 'against', 'too early'));
    edit(study, MEMBER, vote(study, 'for'));
    expect(study.get('change', CHANGE)!.votes.map((one) => one.vote)).toEqual(['for']);
  });

  it('approves only with the quorum, rejects and defers only with a reason, and only before the board', () => {
    const study = beforeBoard(OWNER);
    const short = refused(study, CHAIR, dispose(study, 'approved'));
    expect(short.message).toBe('CR-001 has 0 of the 1 votes for it that approval needs.');
    expect(refused(study, CHAIR, dispose(study, 'rejected')).details.field).toBe('reason');
    expect(refused(study, CHAIR, dispose(study, 'deferred')).details.field).toBe('reason');
    edit(study, CHAIR, dispose(study, 'rejected', 'not now'));
    expect(refused(study, MEMBER, vote(study, 'for')).code).toBe('state');
    expect(refused(study, CHAIR, dispose(study, 'approved')).code).toBe('state');
    expect(refused(study, OWNER, step(study, 'change.withdraw', { reason: 'x' })).code).toBe('state');
  });

  it('applies every edit at approval, in the name of its author', () => {
    const study = beforeBoard(OWNER);
    edit(study, MEMBER, vote(study, 'for'));
    edit(study, CHAIR, dispose(study, 'approved'));
    expect(study.get('quantity', ID.isp)!.value!.text).toBe('6600');
    expect(study.get('requirement', ID.mass)).toMatchObject({ state: 'baselined', limit: { value: { text: '125' } } });
    expect(study.get('change', CHANGE)).toMatchObject({ state: 'approved', disposition: { personId: CHAIR.id } });
    expect(proveAll(study).proven.get(ID.mass)!.verdict).toBe('compliant');
  });

  it('makes what an approved request creates its author’s', () => {
    const study = reviewedStudy();
    writeChange(study, OWNER, requirement({ id: idOf(80), title: 'spare' }));
    bringToVote(study, OWNER);
    edit(study, CHAIR, approval(study));
    expect(study.get('requirement', idOf(80))).toMatchObject({
      ownerId: OWNER.id,
      state: 'in preparation',
      key: 'VEH-003',
    });
  });

  it('starts the votes again when a deferred request comes back', () => {
    const study = beforeBoard(OWNER);
    edit(study, MEMBER, vote(study, 'for'));
    edit(study, CHAIR, dispose(study, 'deferred', 'mass statement awaited'));
    edit(study, OWNER, step(study, 'change.submit'));
    expect(study.get('change', CHANGE)).toMatchObject({ state: 'in assessment', votes: [], disposition: null });
  });
});

describe('a change request in conflict', () => {
  function inConflict(): Study {
    const study = reviewedStudy();
    writeChange(study, OWNER, reviseMass(study, '125'), setDry(study, '60'));
    bringToVote(study, OWNER);
    // The dry mass is a working quantity: an analyst may move it meanwhile.
    edit(study, ANALYST, setDry(study, '64'));
    return study;
  }

  it('is not approved, and not in part either', () => {
    const study = inConflict();
    expect(isInConflict(study, study.get('change', CHANGE)!)).toBe(true);
    const refusal = refused(study, CHAIR, approval(study));
    expect(refusal).toMatchObject({ code: 'conflict', details: { field: 'edits' } });
    expect(refusal.message).toMatch(/CR-001 is in conflict: what its edit 2 changes has moved.*Q-002/);
    expect(study.get('requirement', ID.mass)!.limit!.value.text).toBe('116');
    expect(study.get('change', CHANGE)!.state).toBe('before the board');
  });

  it('is resolved by its author onto what stands now, and then goes through the board again', () => {
    const study = inConflict();
    edit(study, OWNER, step(study, 'change.rebase'));
    const change = study.get('change', CHANGE)!;
    expect(change).toMatchObject({ state: 'submitted', votes: [] });
    expect(isInConflict(study, change)).toBe(false);
    edit(study, CHAIR, step(study, 'change.refer', { due: null }));
    edit(study, MEMBER, step(study, 'change.vote', { vote: 'for', remark: '' }));
    edit(study, CHAIR, approval(study));
    expect(study.get('quantity', ID.dry)!.value!.text).toBe('60');
  });

  it('follows several edits of one thing, and drops those whose target is gone', () => {
    const study = reviewedStudy();
    edit(study, OWNER, requirement({ id: idOf(80), title: 'spare' }), {
      type: 'trace.link',
      id: idOf(81),
      parentId: ID.mass,
      childId: idOf(80),
    });
    const base = study.get('quantity', ID.isp)!.version;
    writeChange(study, OWNER, setIsp(study, '6600'), setIsp(study, '6700', 1), {
      type: 'trace.unlink',
      id: idOf(81),
      version: 1,
    });
    edit(study, OWNER, { type: 'trace.unlink', id: idOf(81), version: 1 });
    edit(study, OWNER, step(study, 'change.rebase'));
    const edits = study.get('change', CHANGE)!.edits as unknown as { type: string; version: number }[];
    expect(edits.map(({ type, version }) => [type, version])).toEqual([
      ['quantity.set', base],
      ['quantity.set', base + 1],
    ]);
  });

  it('cannot be submitted before it is resolved', () => {
    const study = reviewedStudy();
    writeChange(study, OWNER, setDry(study, '60'));
    edit(study, ANALYST, setDry(study, '64'));
    expect(refused(study, OWNER, step(study, 'change.submit'))).toMatchObject({ code: 'conflict' });
  });
});

describe('approval of several edits', () => {
  it('is atomic: one refused edit refuses them all', () => {
    const study = reviewedStudy();
    writeChange(study, OWNER, reviseMass(study, '125'), {
      type: 'requirement.withdraw',
      ...seen(study, 'requirement', ID.outbound),
      reason: 'gone',
    });
    bringToVote(study, OWNER);
    edit(study, OWNER, requirement({ id: idOf(80), title: 'burn', prefix: 'PRP', parentIds: [ID.outbound] }));
    const refusal = refused(study, CHAIR, approval(study));
    expect(refusal.code).toBe('in-use');
    expect(study.get('requirement', ID.mass)!.limit!.value.text).toBe('116');
    expect(study.get('change', CHANGE)!.state).toBe('before the board');
  });
});
