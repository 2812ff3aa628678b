import { COMMAND_ROLES, COMMAND_TYPES, type Command, type CommandType } from '@shared/contract';
import type { Study } from '../study';
import {
  ANALYST,
  CHAIR,
  ID,
  MEMBER,
  OWNER,
  READER,
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
import { refused } from '../testing/refused';

const TEST = idOf(83);
const seenIn = (study: Study) => ({
  requirement: (id: string) => ({ id, version: study.get('requirement', id)!.version }),
  quantity: (id: string) => ({ id, version: study.get('quantity', id)!.version }),
  analysis: (id: string) => ({ id, version: study.get('analysis', id)!.version }),
  verification: (id: string) => ({ id, version: study.get('verification', id)!.version }),
  trace: (id: string) => ({ id, version: study.get('trace', id)!.version }),
  change: (id: string) => ({ id, version: study.get('change', id)!.version }),
  departure: (id: string) => ({ id, version: study.get('departure', id)!.version }),
});

/** A working life in which every command is given once, by somebody who may; gives the types in order. */
function workingLife(): { accepted: Set<CommandType>; study: Study } {
  const study = smallStudy();
  const accepted = new Set<CommandType>();
  const at = seenIn(study);
  const give = (person: Somebody, ...commands: Command[]): void => {
    for (const command of commands) {
      edit(study, person, command);
      accepted.add(command.type);
    }
  };
  give(OWNER, { type: 'study.configure', id: ID.settings, version: 1, changes: { k: 3 } });
  give(OWNER, {
    type: 'policy.create',
    id: idOf(70),
    parameter: 'mass',
    maturity: 'concept',
    percent: 10,
    absolute: null,
    definition: 'd',
    source: 's',
  });
  give(OWNER, {
    type: 'policy.revise',
    id: idOf(70),
    version: 1,
    percent: 12,
    absolute: null,
    definition: 'd',
    source: 's',
  });
  give(OWNER, { type: 'policy.remove', id: idOf(70), version: 2 });
  give(ANALYST, {
    type: 'element.create',
    id: idOf(71),
    key: 'RAD',
    name: 'Radiators',
    parentId: ID.vehicle,
    description: '',
  });
  give(ANALYST, { type: 'element.revise', id: idOf(71), version: 1, changes: { parentId: ID.propulsion } });
  give(ANALYST, { type: 'element.remove', id: idOf(71), version: 2 });
  give(OWNER, requirement({ id: idOf(80), title: 'survive', limit: limit('at most', '2', 'km/s') }));
  give(OWNER, { type: 'requirement.revise', ...at.requirement(idOf(80)), changes: { title: 'survive it' } });
  give(OWNER, { type: 'trace.link', id: idOf(81), parentId: ID.deltaV, childId: idOf(80) });
  give(OWNER, { type: 'budget.set', ...at.requirement(ID.mass), budget: { rule: 'sum', sense: 'shares' } });
  give(OWNER, { type: 'budget.propose', ...at.trace(idOf(81)), share: 'proposed' });
  give(OWNER, { type: 'budget.adopt', ...at.trace(idOf(81)) });
  give(OWNER, { type: 'trace.unlink', ...at.trace(idOf(81)) });
  give(ANALYST, quantity(idOf(84), 'x', '1', 'm'));
  give(ANALYST, { type: 'quantity.set', id: idOf(84), version: 1, value: { text: '2', unit: 'm' } });
  give(ANALYST, { type: 'quantity.revise', id: idOf(84), version: 2, changes: { name: 'reach' } });
  give(
    ANALYST,
    formulaAnalysis(idOf(85), 'Twice', [{ name: 'x', from: { quantityId: idOf(84) } }], [['y = 2 * x', 'm']]),
  );
  give(ANALYST, { type: 'analysis.revise', id: idOf(85), version: 1, changes: { purpose: 'to see' } });
  give(ANALYST, { type: 'analysis.remove', id: idOf(85), version: 2 });
  give(ANALYST, { type: 'quantity.remove', id: idOf(84), version: 3 });
  give(MEMBER, { type: 'analysis.check', ...at.analysis(ID.rollUp), remark: 'by hand' });
  give(ANALYST, verifiedBy(TEST, idOf(80), ID.rollUp, '', { method: 'test', analysisId: null, output: null }));
  give(ANALYST, { type: 'verification.revise', ...at.verification(TEST), changes: { stage: 'acceptance' } });
  give(ANALYST, {
    type: 'verification.record',
    ...at.verification(TEST),
    met: true,
    document: 'REP-1',
    issue: '1',
    note: '',
  });
  give(
    ANALYST,
    verifiedBy(idOf(86), idOf(80), ID.rollUp, '', { method: 'inspection', analysisId: null, output: null }),
  );
  give(ANALYST, { type: 'verification.unlink', ...at.verification(idOf(86)) });
  give(OWNER, { type: 'requirement.submit', ...at.requirement(idOf(80)) });
  give(OWNER, { type: 'requirement.return', ...at.requirement(idOf(80)), reason: 'not yet' });
  give(OWNER, { type: 'requirement.withdraw', ...at.requirement(ID.outbound), reason: 'not needed' });
  give(OWNER, { type: 'requirement.submit', ...at.requirement(idOf(80)) });
  give(OWNER, { type: 'requirement.submit', ...at.requirement(ID.mass) });
  give(CHAIR, {
    type: 'baseline.take',
    id: idOf(90),
    name: 'Concept',
    review: 'Concept review',
    note: '',
    requirementIds: [idOf(80), ID.mass],
    quantityIds: [ID.isp],
    openItems: 'listed',
  });
  give(CHAIR, { type: 'assessment.close', ...at.requirement(idOf(80)), reason: 'shown' });
  give(CHAIR, { type: 'assessment.reopen', ...at.requirement(idOf(80)), reason: 'look again' });
  give(CHAIR, { type: 'assessment.lower', ...at.requirement(idOf(80)), to: 'partial', reason: 'one article only' });
  give(OWNER, {
    type: 'departure.request',
    id: idOf(91),
    kind: 'deviation',
    class: 'minor',
    requirementId: ID.mass,
    title: 'Heavier once',
    reason: 'first flight',
    effectivity: 'flight 1',
    expires: null,
  });
  give(CHAIR, { type: 'departure.decide', ...at.departure(idOf(91)), decision: 'in force', reason: 'fine' });
  give(CHAIR, { type: 'departure.expire', ...at.departure(idOf(91)) });
  const set = {
    type: 'quantity.set',
    id: ID.isp,
    version: study.get('quantity', ID.isp)!.version,
    value: { text: '6600', unit: 's' },
  } as const;
  give(ANALYST, { type: 'change.write', id: idOf(92), title: 'More', reason: '', due: null, edits: [set] });
  give(ANALYST, { type: 'change.revise', ...at.change(idOf(92)), changes: { reason: 'needed' } });
  give(ANALYST, { type: 'change.amend', ...at.change(idOf(92)), edits: [{ ...set, version: set.version + 1 }] });
  give(ANALYST, { type: 'change.drop', ...at.change(idOf(92)), index: 1 });
  give(ANALYST, { type: 'change.rebase', ...at.change(idOf(92)) });
  give(ANALYST, { type: 'change.submit', ...at.change(idOf(92)) });
  give(CHAIR, { type: 'change.assess', ...at.change(idOf(92)) });
  give(CHAIR, { type: 'change.refer', ...at.change(idOf(92)), due: '2026-12-09' });
  give(MEMBER, { type: 'change.vote', ...at.change(idOf(92)), vote: 'for', remark: '' });
  give(CHAIR, { type: 'change.dispose', ...at.change(idOf(92)), decision: 'approved', reason: '' });
  give(ANALYST, { type: 'change.write', id: idOf(93), title: 'Less', reason: '', due: null, edits: [] });
  give(ANALYST, { type: 'change.withdraw', ...at.change(idOf(93)), reason: 'no' });
  const patch = edit(study, ANALYST, quantity(idOf(94), 'z', '1', 'm'));
  const fork = study.fork();
  const context = editingAs(ANALYST, { patchOf: () => ({ patch, actorId: ANALYST.id }) });
  applyCommands(fork, [{ type: 'edit.undo', revision: 1 }], context, factsOf(study));
  accepted.add('edit.undo');
  return { accepted, study };
}

describe('every command', () => {
  it('is accepted once from somebody who may give it', () => {
    expect([...workingLife().accepted].sort()).toEqual([...COMMAND_TYPES].sort());
  });

  it.each(COMMAND_TYPES)('%s is refused to a reader, who has no role for it', (type) => {
    const refusal = refused(smallStudy(), READER, { type, id: idOf(1), version: 1, revision: 1 } as unknown as Command);
    expect(refusal.code).toBe('forbidden');
    expect(refusal.message).toContain('your role here is reader');
    expect(refusal.details.expected).toContain('the role of');
    expect(COMMAND_ROLES[type]).not.toContain('reader');
  });

  it('is refused in a batch with the position of the culprit, and none of the batch is applied', () => {
    const study = smallStudy();
    const good: Command = { type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6600', unit: 's' } };
    const bad: Command = { type: 'quantity.set', id: ID.dry, version: 1, value: { text: '60', unit: 's' } };
    expect(refused(study, ANALYST, [good, bad]).command).toBe(1);
    expect(study.get('quantity', ID.isp)!.value!.text).toBe('6500');
  });

  it.each(['quantity', 'requirement', 'analysis', 'verification', 'trace', 'element', 'change', 'policy'] as const)(
    'on a %s of another study is refused',
    (kind) => {
      const type = {
        quantity: 'quantity.remove',
        requirement: 'requirement.withdraw',
        analysis: 'analysis.remove',
        verification: 'verification.unlink',
        trace: 'trace.unlink',
        element: 'element.remove',
        change: 'change.submit',
        policy: 'policy.remove',
      }[kind];
      const person = ['quantity', 'analysis'].includes(kind) ? ANALYST : OWNER;
      const refusal = refused(smallStudy(), person, { type, id: idOf(777), version: 1, reason: 'x' } as Command);
      expect(refusal.code).toBe('not-found');
      expect(refusal.message).toMatch(/There is no such .+ in this study/);
      expect(refusal.details).toMatchObject({ field: 'id', value: idOf(777) });
    },
  );

  it('that creates something is refused under an identifier in use', () => {
    const study = smallStudy();
    const creations: [Somebody, Command][] = [
      [OWNER, requirement({ id: ID.mass, title: 'take over' })],
      [ANALYST, quantity(ID.isp, 'I_sp', '1', 's')],
      [ANALYST, formulaAnalysis(ID.rollUp, 'Take over', [], [['y = 1', '']])],
      [OWNER, verifiedBy(ID.massByAnalysis, ID.outbound, ID.transfer, 'v_e')],
      [OWNER, { type: 'trace.link', id: ID.share, parentId: ID.deltaV, childId: ID.mass }],
      [OWNER, { type: 'element.create', id: ID.vehicle, key: 'XXX', name: 'x', parentId: null, description: '' }],
    ];
    for (const [person, command] of creations) expect(refused(study, person, command).message).toContain('already a');
  });
});
