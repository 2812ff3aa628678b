import type { Command, Patch } from '@shared/contract';
import { proveAll } from '../prove';
import type { Refusal } from '../refusal';
import type { Study } from '../study';
import { refused } from '../testing/refused';
import { reviewedStudy, seen } from '../testing/reviewed-study';
import { takeBaseline } from '../testing/baselines';
import {
  ANALYST,
  CHAIR,
  ID,
  MEMBER,
  OWNER,
  edit,
  editingAs,
  factsOf,
  formulaAnalysis,
  idOf,
  limit,
  quantity,
  requirement,
  smallStudy,
  verifiedBy,
  type Somebody,
} from '../testing/small-study';
import { applyCommands } from './index';

const UNDO: Command = { type: 'edit.undo', revision: 7 };
function undo(study: Study, person: Somebody, patch: Patch, actor: Somebody = person): void {
  const fork = study.fork();
  applyCommands(fork, [UNDO], editingAs(person, { patchOf: () => ({ patch, actorId: actor.id }) }), factsOf(study));
  study.absorb(fork.patch());
}
function undoRefused(study: Study, person: Somebody, patch: Patch, actor: Somebody = person): Refusal {
  return refused(study, person, UNDO, { patchOf: () => ({ patch, actorId: actor.id }) });
}
const set = (study: Study, id: string, text: string, unit: string): Command => ({
  type: 'quantity.set',
  ...seen(study, 'quantity', id),
  value: { text, unit },
});

describe('taking back an own edit', () => {
  it('brings back what was, as a new version, and the verdicts with it', () => {
    const study = smallStudy();
    const before = JSON.stringify([...proveAll(study).proven]);
    const patch = edit(study, ANALYST, set(study, ID.isp, '6000', 's'));
    undo(study, ANALYST, patch);
    expect(study.get('quantity', ID.isp)).toMatchObject({ version: 3, value: { text: '6500' } });
    expect(JSON.stringify([...proveAll(study).proven])).toBe(before);
  });

  it('removes what was written without giving its key out again', () => {
    const study = smallStudy();
    const patch = edit(study, OWNER, requirement({ id: idOf(80), title: 'a', parentIds: [ID.mass] }));
    undo(study, OWNER, patch);
    expect(study.get('requirement', idOf(80))).toBeUndefined();
    expect(study.find('trace', 'parentId', ID.mass)).toEqual([]);
    edit(study, OWNER, requirement({ id: idOf(81), title: 'b' }));
    expect(study.get('requirement', idOf(81))!.key).toBe('VEH-004');
  });

  it('brings back what was removed', () => {
    const study = smallStudy();
    const patch = edit(study, ANALYST, { type: 'verification.unlink', id: ID.massByAnalysis, version: 1 });
    expect(proveAll(study).proven.get(ID.mass)!.verdict).toBe('no evidence');
    undo(study, ANALYST, patch);
    expect(proveAll(study).proven.get(ID.mass)!.verdict).toBe('non-compliant');
  });

  it('can itself be taken back', () => {
    const study = smallStudy();
    const first = edit(study, ANALYST, set(study, ID.isp, '6000', 's'));
    const fork = study.fork();
    applyCommands(
      fork,
      [UNDO],
      editingAs(ANALYST, { patchOf: () => ({ patch: first, actorId: ANALYST.id }) }),
      factsOf(study),
    );
    const second = fork.patch();
    study.absorb(second);
    undo(study, ANALYST, second);
    expect(study.get('quantity', ID.isp)!.value!.text).toBe('6000');
  });
});

describe('taking back is refused', () => {
  it('for an edit of somebody else, and for a revision that is not there', () => {
    const study = smallStudy();
    const patch = edit(study, ANALYST, set(study, ID.isp, '6000', 's'));
    const other = undoRefused(study, MEMBER, patch, ANALYST);
    expect(other.code).toBe('forbidden');
    expect(other.message).toContain(ANALYST.name);
    expect(refused(study, ANALYST, UNDO).code).toBe('not-found');
  });

  it('after a later edit of the same thing', () => {
    const study = smallStudy();
    const patch = edit(study, ANALYST, set(study, ID.isp, '6000', 's'));
    edit(study, ANALYST, set(study, ID.isp, '6100', 's'));
    const refusal = undoRefused(study, ANALYST, patch);
    expect(refusal.code).toBe('conflict');
    expect(refusal.message).toContain('Q-001 has been edited again since revision 7');
  });

  it('for a step of procedure', () => {
    const study = smallStudy();
    const patch = edit(study, OWNER, { type: 'change.write', title: 'T', reason: '', due: null, edits: [] });
    expect(undoRefused(study, OWNER, patch).message).toContain('step of procedure');
    const taken = takeBaseline(study, [ID.mass]);
    expect(undoRefused(study, CHAIR, taken).code).toBe('state');
  });

  it('once what it edited is under control', () => {
    const study = reviewedStudy();
    const linked = verifiedBy(idOf(80), ID.outbound, ID.transfer, 'v_e');
    const patch = edit(study, ANALYST, linked);
    takeBaseline(study, [ID.outbound]);
    expect(undoRefused(study, ANALYST, patch).code).toBe('controlled');
  });

  it('of writing something that others have come to use', () => {
    const study = smallStudy();
    const patch = edit(study, ANALYST, quantity(idOf(80), 'x', '1', 'm'));
    edit(
      study,
      ANALYST,
      formulaAnalysis(idOf(81), 'a', [{ name: 'x', from: { quantityId: idOf(80) } }], [['y = x', 'm']]),
    );
    const refusal = undoRefused(study, ANALYST, patch);
    expect(refusal.code).toBe('in-use');
    expect(refusal.message).toContain('AN-003');
  });

  it('of a removal whose surroundings are gone', () => {
    const study = smallStudy();
    edit(
      study,
      ANALYST,
      quantity(idOf(80), 'x', '1', 'm'),
      formulaAnalysis(idOf(81), 'a', [{ name: 'x', from: { quantityId: idOf(80) } }], [['y = x', 'm']]),
    );
    const removed = edit(study, ANALYST, { type: 'analysis.remove', id: idOf(81), version: 1 });
    edit(study, ANALYST, { type: 'quantity.remove', id: idOf(80), version: 1 });
    expect(undoRefused(study, ANALYST, removed)).toMatchObject({ code: 'conflict' });
  });

  it('of a change of dimension that others have come to rest on', () => {
    const study = smallStudy();
    edit(study, ANALYST, quantity(idOf(80), 'x', null, 'm'));
    const patch = edit(study, ANALYST, { type: 'quantity.revise', id: idOf(80), version: 1, changes: { unit: 'kg' } });
    edit(
      study,
      ANALYST,
      formulaAnalysis(idOf(81), 'a', [{ name: 'x', from: { quantityId: idOf(80) } }], [['y = x', 'kg']]),
    );
    expect(undoRefused(study, ANALYST, patch).message).toContain('AN-003');
  });

  it('of a line that a requirement has come to rest on', () => {
    const study = smallStudy();
    const lines = [
      ...study.get('analysis', ID.rollUp)!.lines,
      { name: 'm_2', expression: '2 * m_dry', unit: 't', label: '' },
    ];
    const patch = edit(study, ANALYST, { type: 'analysis.revise', id: ID.rollUp, version: 1, changes: { lines } });
    edit(study, ANALYST, verifiedBy(idOf(80), ID.mass, ID.rollUp, 'm_2'));
    expect(undoRefused(study, ANALYST, patch)).toMatchObject({ code: 'conflict' });
  });

  it('where it would make a circle in the flow-down or in the product tree', () => {
    const study = smallStudy();
    edit(study, OWNER, { type: 'trace.link', id: idOf(80), parentId: ID.mass, childId: ID.outbound });
    const unlinked = edit(study, OWNER, { type: 'trace.unlink', id: idOf(80), version: 1 });
    edit(study, OWNER, { type: 'trace.link', id: idOf(81), parentId: ID.outbound, childId: ID.mass });
    expect(undoRefused(study, OWNER, unlinked).message).toContain('flow-down');

    const moved = edit(study, OWNER, {
      type: 'element.revise',
      id: ID.propulsion,
      version: 1,
      changes: { parentId: null },
    });
    edit(study, OWNER, { type: 'element.revise', id: ID.vehicle, version: 1, changes: { parentId: ID.propulsion } });
    expect(undoRefused(study, OWNER, moved).message).toContain('below itself');
  });

  it('where a code, a pair, a deciding mark or a policy row has been given again', () => {
    const study = smallStudy();
    const element = (id: string): Command => ({
      type: 'element.create',
      id,
      key: 'RAD',
      name: 'R',
      parentId: null,
      description: '',
    });
    edit(study, OWNER, element(idOf(80)));
    const removed = edit(study, OWNER, { type: 'element.remove', id: idOf(80), version: 1 });
    edit(study, OWNER, element(idOf(81)));
    expect(undoRefused(study, OWNER, removed).message).toContain('RAD');

    const unlinked = edit(study, ANALYST, { type: 'verification.unlink', id: ID.massByAnalysis, version: 1 });
    edit(study, ANALYST, verifiedBy(idOf(82), ID.mass, ID.rollUp, 'm_0'));
    expect(undoRefused(study, ANALYST, unlinked).message).toContain('linked to VEH-002 again');

    const row = { parameter: 'delta-v', maturity: 'concept', percent: 5, absolute: null, definition: 'd', source: 's' };
    const policy = edit(study, OWNER, { type: 'policy.remove', id: ID.policy, version: 1 });
    edit(study, OWNER, { type: 'policy.create', id: idOf(83), ...row });
    expect(undoRefused(study, OWNER, policy).message).toContain('margin policy');
  });

  it('of a limit that a budget has come to share out', () => {
    const study = smallStudy();
    edit(study, OWNER, requirement({ id: idOf(80), title: 'a' }));
    const patch = edit(study, OWNER, {
      type: 'requirement.revise',
      id: idOf(80),
      version: 1,
      changes: { limit: limit('at most', '1', 't') },
    });
    edit(study, OWNER, { type: 'budget.set', id: idOf(80), version: 2, budget: { rule: 'sum', sense: 'shares' } });
    // The budget raised the version of the requirement, so that is what is said.
    expect(undoRefused(study, OWNER, patch)).toMatchObject({ code: 'conflict' });
  });
});
