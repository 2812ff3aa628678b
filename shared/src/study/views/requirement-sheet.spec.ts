import type { CommandType } from '@shared/contract';
import type { Study } from '../study';
import { takeBaseline } from '../testing/baselines';
import {
  ANALYST,
  CHAIR,
  edit,
  ID,
  idOf,
  limit,
  MEMBER,
  OWNER,
  READER,
  requirement,
  smallStudy,
  verifiedBy,
  viewOf,
  type Somebody,
} from '../testing/small-study';
import { requirementSheet } from './requirement-sheet';
import type { ViewContext } from './view-context';

const NO_HISTORY = { moves: [], turnedBy: null };
function sheetOf(study: Study, key: string, person: Somebody = READER, over: Partial<ViewContext> = {}) {
  return requirementSheet(viewOf(study, person, over), key, NO_HISTORY)!;
}
function baselined(...requirementIds: string[]): Study {
  const study = smallStudy();
  takeBaseline(study, requirementIds);
  return study;
}
const versionOf = (study: Study, id: string): number => study.get('requirement', id)!.version;

describe('a requirement’s sheet', () => {
  it('is not there for a key that the study does not have', () => {
    expect(requirementSheet(viewOf(smallStudy()), 'VEH-009', NO_HISTORY)).toBeNull();
  });

  it('brings statement, people, verdict, proof, turning points and wording findings together', () => {
    const sheet = sheetOf(smallStudy(), 'VEH-001');
    expect(sheet).toMatchObject({
      path: 'VEH-001',
      depth: 0,
      hasChildren: true,
      text: 'The vehicle shall provide total delta-v.',
      owner: { id: OWNER.id, name: 'Ines Okafor' },
      verdict: 'short margin',
      comparison: { text: 'margin +2.8 %, required +5.0 %' },
      baselinedIn: null,
      lowered: null,
      closed: null,
      turnedBy: null,
      findings: [],
    });
    expect(sheet.proof).toHaveLength(4);
    expect(sheet.turningPoints).toHaveLength(3);
  });

  it('shows each verification with what it says on its own', () => {
    const study = smallStudy();
    edit(study, ANALYST, verifiedBy(idOf(70), ID.deltaV, '', '', { method: 'test', analysisId: null, output: null }));
    const sheet = sheetOf(study, 'VEH-001');
    expect(sheet.verdict).toBe('no evidence');
    expect(
      sheet.verifications.map(({ method, analysisKey, verdict }) => [method, analysisKey, verdict.verdict]),
    ).toEqual([
      ['analysis', 'AN-002', 'short margin'],
      ['test', null, 'no evidence'],
    ]);
    edit(study, OWNER, {
      type: 'verification.record',
      id: idOf(70),
      version: 1,
      met: true,
      document: 'TR-1',
      issue: 'A',
      note: '',
    });
    const recorded = sheetOf(study, 'VEH-001');
    expect(recorded.verdict).toBe('short margin');
    expect(recorded.verifications[1]).toMatchObject({
      person: { name: 'Ines Okafor' },
      verdict: { verdict: 'compliant', basis: 'demonstrated', computedCompliance: 'yes' },
    });
  });

  it('lists what is above it to the top, itself, and its children, with the traces next to it', () => {
    const study = smallStudy();
    edit(
      study,
      OWNER,
      requirement({ id: idOf(25), title: 'deliver cargo', prefix: 'MIS', level: 'mission' }),
      requirement({ id: idOf(26), title: 'burn long', prefix: 'PRP', level: 'unit' }),
      { type: 'trace.link', id: idOf(35), parentId: idOf(25), childId: ID.deltaV },
      { type: 'trace.link', id: idOf(36), parentId: ID.outbound, childId: idOf(26) },
    );
    const { flowDown } = sheetOf(study, 'PRP-001');
    expect(flowDown.map(({ key, depth, here, traceId, share }) => [key, depth, here, traceId, share])).toEqual([
      ['MIS-001', 0, false, null, 'none'],
      ['VEH-001', 1, false, ID.share, 'adopted'],
      ['PRP-001', 2, true, null, 'none'],
      ['PRP-002', 3, false, idOf(36), 'none'],
    ]);
  });

  it('names the baseline it is in, its departures, and who lowered it', () => {
    const study = baselined(ID.mass);
    edit(study, ANALYST, {
      type: 'departure.request',
      kind: 'deviation',
      class: 'minor',
      requirementId: ID.mass,
      title: 'heavier',
      reason: 'first flight',
      effectivity: 'first flight',
      expires: null,
    });
    const baseline = { key: 'B1', revision: 5, verdicts: new Map([[ID.mass, 'compliant' as const]]) };
    edit(study, OWNER, {
      type: 'assessment.lower',
      id: ID.mass,
      version: versionOf(study, ID.mass),
      to: 'not assessed',
      reason: 'awaits a report',
    });
    const context = viewOf(study, READER, { baseline });
    const sheet = requirementSheet(context, 'VEH-002', { moves: [], turnedBy: { revision: 6, direct: true } })!;
    expect(sheet).toMatchObject({
      baselinedIn: 'B1',
      departures: [{ key: 'DEV-001', state: 'requested' }],
      lowered: { to: 'not assessed', reason: 'awaits a report', person: { name: 'Ines Okafor' } },
      compliance: 'not assessed',
      computedCompliance: 'no',
      turnedBy: { revision: 6, direct: true, baselineVerdict: 'compliant' },
    });
    // Not turned against the baseline: nothing to say.
    const same = { ...baseline, verdicts: new Map([[ID.mass, 'non-compliant' as const]]) };
    const still = requirementSheet(viewOf(study, READER, { baseline: same }), 'VEH-002', {
      moves: [],
      turnedBy: { revision: 6, direct: true },
    })!;
    expect(still.turnedBy).toBeNull();
  });
});

describe('what a person may do on a requirement', () => {
  const may = (study: Study, key: string, person: Somebody, over: Partial<ViewContext> = {}): CommandType[] => [
    ...sheetOf(study, key, person, over).may,
  ];
  const EDITS: CommandType[] = ['requirement.revise', 'requirement.submit', 'budget.set', 'trace.link'];

  it('is all editing for the owner in preparation, and none for others', () => {
    const study = smallStudy();
    expect(may(study, 'VEH-001', OWNER)).toEqual(expect.arrayContaining(EDITS));
    const another: Somebody = { id: idOf(999), name: 'Another', roles: ['requirements-owner'] };
    for (const command of EDITS) expect(may(study, 'VEH-001', another)).not.toContain(command);
    expect(may(study, 'VEH-001', READER)).toEqual([]);
  });

  it('is linking verifications for an analyst, and recording findings only where there is something to record', () => {
    const study = smallStudy();
    expect(may(study, 'VEH-001', ANALYST)).toEqual(
      expect.arrayContaining(['verification.link', 'verification.revise', 'verification.unlink', 'change.write']),
    );
    expect(may(study, 'VEH-001', ANALYST)).not.toContain('verification.record');
    edit(study, ANALYST, verifiedBy(idOf(70), ID.deltaV, '', '', { method: 'test', analysisId: null, output: null }));
    expect(may(study, 'VEH-001', ANALYST)).toContain('verification.record');
  });

  it('is not withdrawing over children, nor a budget without a limit', () => {
    const study = smallStudy();
    expect(may(study, 'VEH-001', OWNER)).not.toContain('requirement.withdraw');
    expect(may(study, 'PRP-001', OWNER)).toContain('requirement.withdraw');
    edit(study, OWNER, requirement({ id: idOf(27), title: 'be nice' }));
    expect(may(study, 'VEH-003', OWNER)).not.toContain('budget.set');
  });

  it('is returning while in review', () => {
    const study = smallStudy();
    edit(study, OWNER, { type: 'requirement.submit', id: ID.mass, version: versionOf(study, ID.mass) });
    expect(may(study, 'VEH-002', CHAIR)).toContain('requirement.return');
    expect(may(study, 'VEH-002', OWNER)).not.toContain('requirement.revise');
  });

  it('is only proposing, asking and closing when baselined', () => {
    const study = baselined(ID.mass, ID.outbound);
    const owners = may(study, 'VEH-002', OWNER);
    for (const command of [...EDITS, 'verification.link'] as const) expect(owners).not.toContain(command);
    expect(owners).toEqual(expect.arrayContaining(['change.write', 'departure.request', 'assessment.lower']));
    // Non-compliant and not departed: its row does not close.
    expect(may(study, 'VEH-002', MEMBER)).not.toContain('assessment.close');
    const heavier = smallStudy();
    edit(heavier, OWNER, {
      type: 'requirement.revise',
      id: ID.mass,
      version: 1,
      changes: { limit: limit('at most', '130', 't') },
    });
    expect(may(heavier, 'VEH-002', MEMBER)).not.toContain('assessment.close');
    takeBaseline(heavier, [ID.mass]);
    expect(may(heavier, 'VEH-002', MEMBER)).toContain('assessment.close');
    // The owner does not sign the close-out of an own requirement.
    const both: Somebody = { ...OWNER, roles: ['requirements-owner', 'board-member'] };
    expect(may(heavier, 'VEH-002', both)).not.toContain('assessment.close');
  });

  it('is deciding on a departure for the chair who did not ask for it', () => {
    const study = baselined(ID.mass);
    edit(study, ANALYST, {
      type: 'departure.request',
      kind: 'waiver',
      class: 'minor',
      requirementId: ID.mass,
      title: 'heavier',
      reason: 'first flight',
      effectivity: 'first flight',
      expires: null,
    });
    expect(may(study, 'VEH-002', CHAIR)).toContain('departure.decide');
    const asking: Somebody = { ...ANALYST, roles: ['board-chair'] };
    expect(may(study, 'VEH-002', asking)).not.toContain('departure.decide');
  });

  it('is nothing at a standpoint that cannot be edited, and only proposals in a draft', () => {
    const study = baselined(ID.mass);
    const past = { text: 'revision:3', label: 'r3', revision: 3, editable: false };
    expect(may(study, 'VEH-002', OWNER, { standpoint: past })).toEqual([]);
    const draft = { text: 'draft:CR-001', label: 'Draft CR-001', revision: 7, editable: true };
    const inDraft = may(study, 'VEH-002', OWNER, { standpoint: draft });
    expect(inDraft).toEqual(expect.arrayContaining(['requirement.revise', 'budget.set', 'verification.link']));
    expect(inDraft).not.toContain('departure.request');
  });
});
