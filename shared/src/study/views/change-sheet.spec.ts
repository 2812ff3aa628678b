import type { Command, StudyMember } from '@shared/contract';
import type { Study } from '../study';
import {
  ANALYST,
  CHAIR,
  ID,
  MEMBER,
  OWNER,
  PEOPLE,
  READER,
  edit,
  editingAs,
  idOf,
  limit,
  requirement,
  smallStudy,
  viewOf,
  type Somebody,
} from '../testing/small-study';
import { changeSheet } from './change-sheet';
import { changesView } from './changes-view';
import { editSummaries } from './edit-summary';
import { impactOf } from './impact';
import { isInConflict } from './proposed-edits';

const CHANGE = idOf(70);
const members: StudyMember[] = PEOPLE.map(({ id, name, roles }) => ({ id, name, roles: [...roles] }));

function write(study: Study, person: Somebody, ...edits: Command[]): void {
  edit(study, person, {
    type: 'change.write',
    id: CHANGE,
    title: 'T',
    reason: 'because',
    due: null,
    edits: edits as never,
  });
}
function sheet(study: Study, person: Somebody) {
  const context = viewOf(study, person);
  const change = study.get('change', CHANGE)!;
  const impact = impactOf(context.proof, change, { ...editingAs(person), revision: 7 });
  return changeSheet(context, 'CR-001', impact, { members, disposedAt: 9, before: null });
}
const words = (study: Study) =>
  editSummaries(study, study.get('change', CHANGE)!, () => 'somebody').map(({ key, what, before, after }) => [
    key,
    what,
    before,
    after,
  ]);

describe('proposed edits in words', () => {
  it('say what, from and to, each after the ones before it', () => {
    const study = smallStudy();
    write(
      study,
      OWNER,
      { type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6300', unit: 's' } },
      { type: 'quantity.set', id: ID.isp, version: 2, value: { text: '6250', unit: 's' } },
      { type: 'requirement.revise', id: ID.mass, version: 1, changes: { limit: limit('at most', '118', 't') } },
      { type: 'requirement.revise', id: ID.mass, version: 2, changes: { title: 'Keep mass', level: 'mission' } },
      requirement({ id: idOf(80), title: 'spare', limit: limit('at most', '1.5', 'km/s') }),
      { type: 'trace.link', id: idOf(81), parentId: ID.deltaV, childId: idOf(80) },
      { type: 'budget.propose', id: idOf(81), version: 1, share: 'proposed' },
      { type: 'budget.adopt', id: idOf(81), version: 2 },
      { type: 'verification.unlink', id: ID.massByAnalysis, version: 1 },
      {
        type: 'policy.revise',
        id: ID.policy,
        version: 1,
        percent: 7,
        absolute: null,
        definition: 'per cent of the limit',
        source: 'for tests',
      },
    );
    expect(words(study)).toEqual([
      ['Q-001', 'Specific impulse', '6\u2009500 s', '6\u2009300 s'],
      ['Q-001', 'Specific impulse', '6\u2009300 s', '6\u2009250 s'],
      ['VEH-002', 'VEH-002 limit', '≤ 116 t', '≤ 118 t'],
      [
        'VEH-002',
        'VEH-002: title, level',
        'title keep initial mass in low orbit; level vehicle',
        'title Keep mass; level mission',
      ],
      ['VEH-003', 'New requirement', '', 'spare, ≤ 1.5 km/s'],
      ['VEH-003', 'VEH-003 in the flow-down', '', 'below VEH-001'],
      ['VEH-003', 'VEH-003 1.5 km/s into the budget of VEH-001', 'none', 'proposed'],
      ['VEH-003', 'VEH-003 1.5 km/s into the budget of VEH-001', 'proposed', 'adopted'],
      ['VEH-002', 'VEH-002 verification', 'analysis, AN-001 m_0', 'removed'],
      ['', 'Margin policy for delta-v, concept required margin', '5 %', '7 %'],
    ]);
  });

  it('say each field apart where one edit changes several', () => {
    const study = smallStudy();
    write(study, OWNER, {
      type: 'quantity.set',
      id: ID.isp,
      version: 1,
      value: { text: '6300', unit: 's' },
      source: 'bench test 12',
    });
    const [edited] = editSummaries(study, study.get('change', CHANGE)!, () => 'somebody');
    expect(edited?.what).toBe('Specific impulse: value, source');
    expect(edited?.fields).toEqual([
      { field: 'value', before: '6\u2009500 s', after: '6\u2009300 s' },
      { field: 'source', before: 'for tests', after: 'bench test 12' },
    ]);
  });

  it('name the edit whose target has moved, and not the later ones that follow on from it', () => {
    const study = smallStudy();
    write(
      study,
      OWNER,
      { type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6300', unit: 's' } },
      { type: 'quantity.set', id: ID.isp, version: 2, value: { text: '6250', unit: 's' } },
      { type: 'requirement.revise', id: ID.mass, version: 1, changes: { limit: limit('at most', '118', 't') } },
    );
    expect(isInConflict(study, study.get('change', CHANGE)!)).toBe(false);
    edit(study, ANALYST, { type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6450', unit: 's' } });
    expect(isInConflict(study, study.get('change', CHANGE)!)).toBe(true);
    const summaries = editSummaries(study, study.get('change', CHANGE)!, () => 'somebody');
    expect(summaries.map(({ conflict }) => conflict)).toEqual([
      'Q-001 has been edited since this was written: it was at version 1 and is now at 2.',
      '',
      '',
    ]);
    expect(summaries[0]).toMatchObject({ before: '6\u2009450 s', after: '6\u2009300 s' });
  });

  it('say that what an edit targets is gone', () => {
    const study = smallStudy();
    write(study, OWNER, { type: 'verification.unlink', id: ID.massByAnalysis, version: 1 });
    edit(study, ANALYST, { type: 'verification.unlink', id: ID.massByAnalysis, version: 1 });
    expect(isInConflict(study, study.get('change', CHANGE)!)).toBe(true);
    expect(editSummaries(study, study.get('change', CHANGE)!, () => '')[0]!.conflict).toContain(
      'no longer in the study',
    );
  });
});

describe('the sheet of a change request', () => {
  const step = { id: CHANGE };

  it('shows the board with the chair first, who voted, and that the author does not', () => {
    const study = smallStudy();
    write(study, MEMBER, { type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6300', unit: 's' } });
    edit(study, MEMBER, { type: 'change.submit', ...step, version: 1 });
    edit(study, CHAIR, { type: 'change.refer', ...step, version: 2, due: null });
    edit(study, CHAIR, { type: 'change.vote', ...step, version: 3, vote: 'for', remark: '' });
    const { board, votesFor, may } = sheet(study, CHAIR)!;
    expect(board.map(({ name, chair, vote, author }) => [name, chair, vote?.vote, author])).toEqual([
      [CHAIR.name, true, 'for', false],
      [MEMBER.name, false, undefined, true],
    ]);
    expect(votesFor).toBe(1);
    expect(may).toEqual(['change.vote', 'change.dispose']);
    expect(sheet(study, MEMBER)!.may).toEqual([]);
    expect(sheet(study, READER)!.may).toEqual([]);
  });

  it('offers its author to edit a draft, hides it from others, and offers to resolve only a conflict', () => {
    const study = smallStudy();
    write(study, OWNER, { type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6300', unit: 's' } });
    expect([...sheet(study, OWNER)!.may].sort()).toEqual(
      ['change.amend', 'change.drop', 'change.revise', 'change.submit', 'change.withdraw'].sort(),
    );
    expect(sheet(study, ANALYST)).toBeNull();
    expect(changesView(viewOf(study, ANALYST)).rows).toEqual([]);
    edit(study, ANALYST, { type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6450', unit: 's' } });
    const moved = sheet(study, OWNER)!;
    expect(moved.inConflict).toBe(true);
    expect(moved.may).toContain('change.rebase');
    expect(moved.impact.problem!.kind).toBe('conflict');
  });

  it('keeps the old values of an approved request when the study before it is given, and leaves them out when not', () => {
    const study = smallStudy();
    write(study, OWNER, { type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6300', unit: 's' } });
    edit(study, OWNER, { type: 'change.submit', ...step, version: 1 });
    edit(study, MEMBER, { type: 'change.refer', ...step, version: 2, due: null });
    edit(study, MEMBER, { type: 'change.vote', ...step, version: 3, vote: 'for', remark: '' });
    const before = study.fork();
    edit(before, CHAIR, { type: 'change.dispose', ...step, version: 4, decision: 'approved', reason: '' });
    const change = before.get('change', CHANGE)!;
    expect(editSummaries(before, change, () => '', study)[0]).toMatchObject({
      before: '6\u2009500 s',
      after: '6\u2009300 s',
    });
    expect(editSummaries(before, change, () => '')[0]).toMatchObject({
      before: '',
      after: '6\u2009300 s',
      conflict: '',
    });
    expect(isInConflict(before, change)).toBe(false);
  });

  it('lists open requests first', () => {
    const study = smallStudy();
    write(study, OWNER, { type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6300', unit: 's' } });
    edit(study, OWNER, { type: 'change.write', title: 'Later', reason: '', due: null, edits: [] });
    edit(study, OWNER, { type: 'change.withdraw', id: study.byKey('change', 'CR-002')!.id, version: 1, reason: 'no' });
    expect(changesView(viewOf(study, OWNER)).rows.map(({ key, state, edits }) => [key, state, edits])).toEqual([
      ['CR-001', 'draft', 1],
      ['CR-002', 'withdrawn', 0],
    ]);
  });
});
