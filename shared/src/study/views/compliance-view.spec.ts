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
  smallStudy,
  verifiedBy,
  viewOf,
} from '../testing/small-study';
import { complianceView } from './compliance-view';

const versionOf = (study: Study, id: string): number => study.get('requirement', id)!.version;
function rowOf(study: Study, key: string) {
  return complianceView(viewOf(study)).rows.find((row) => row.key === key)!;
}

describe('the compliance matrix', () => {
  it('has one row for each requirement in force, the bad news first', () => {
    const study = smallStudy();
    expect(
      complianceView(viewOf(study)).rows.map(({ key, verdict, compliance }) => [key, verdict, compliance]),
    ).toEqual([
      ['VEH-002', 'non-compliant', 'no'],
      ['PRP-001', 'no evidence', 'not assessed'],
      ['VEH-001', 'short margin', 'partial'],
    ]);
    edit(study, ANALYST, { type: 'quantity.set', id: ID.isp, version: 1, value: null });
    expect(complianceView(viewOf(study)).rows.map(({ key }) => key)).toEqual(['VEH-002', 'VEH-001', 'PRP-001']);
  });

  it('fills the columns of a computed row', () => {
    const study = smallStudy();
    const row = rowOf(study, 'VEH-001');
    expect(row).toMatchObject({
      version: 2,
      text: 'The vehicle shall provide total delta-v.',
      parents: [],
      method: 'analysis',
      level: 'vehicle',
      stage: 'qualification',
      k: 2,
      policy: '+5.0 %, per cent of the limit (for tests)',
      basis: 'predicted',
      evidence: 'AN-002 version 1',
      placard: 'AN-002 not checked',
      departure: '',
      closeOut: 'open',
      owner: 'Ines Okafor',
      signature: '',
      element: 'VEH Vehicle',
      state: 'in preparation',
    });
    expect(row.limit!.value.text).toBe('38.0');
    expect(row.value!.unit).toBe('km/s');
    // U = 2 × 9.80665 × 50 s × ln(120/65)
    expect(row.expanded).toBeCloseTo(2 * 9.80665 * 50 * Math.log(120 / 65), 4);
    expect(rowOf(study, 'PRP-001')).toMatchObject({
      parents: ['VEH-001'],
      method: '',
      level: 'system',
      basis: null,
      value: null,
      reason: 'nothing is linked that verifies it',
    });
    expect(rowOf(study, 'VEH-002').placard).toBe('AN-001 not checked; no uncertainty stated');
  });

  it('carries signatures, departures, lowering and close-out', () => {
    const study = smallStudy();
    edit(study, MEMBER, { type: 'analysis.check', id: ID.rollUp, version: 1, remark: '' });
    takeBaseline(study, [ID.mass]);
    edit(study, ANALYST, {
      type: 'departure.request',
      id: idOf(95),
      kind: 'deviation',
      class: 'minor',
      requirementId: ID.mass,
      title: 'heavier',
      reason: 'first flight',
      effectivity: 'the first flight',
      expires: '2027-01-31',
    });
    expect(rowOf(study, 'VEH-002').departure).toBe('');
    edit(study, CHAIR, { type: 'departure.decide', id: idOf(95), version: 1, decision: 'in force', reason: 'agreed' });
    edit(study, MEMBER, {
      type: 'assessment.close',
      id: ID.mass,
      version: versionOf(study, ID.mass),
      reason: 'departed',
    });
    expect(rowOf(study, 'VEH-002')).toMatchObject({
      placard: 'no uncertainty stated',
      departure: 'deviation DEV-001 in force until 2027-01-31 for the first flight',
      closeOut: 'closed',
      reason: 'closed: departed',
      signature: 'Lena Brandt, 2026-03-02, checked AN-001; Lena Brandt, 2026-03-02, closed',
    });
    expect(complianceView(viewOf(study)).header).toMatchObject({ closedRows: 1, departuresInForce: 1 });

    edit(study, CHAIR, { type: 'departure.expire', id: idOf(95), version: 2 });
    expect(rowOf(study, 'VEH-002')).toMatchObject({
      departure: '',
      closeOut: 'reopened',
      reason: 'reopened: what its close-out signed has changed',
      signature: 'Lena Brandt, 2026-03-02, checked AN-001',
    });
  });

  it('names evidence that a person found, and says demonstrated', () => {
    const study = smallStudy();
    edit(
      study,
      OWNER,
      verifiedBy(idOf(70), ID.outbound, '', '', {
        method: 'test',
        stage: 'acceptance',
        analysisId: null,
        output: null,
      }),
      { type: 'verification.record', id: idOf(70), version: 1, met: true, document: 'TR-1', issue: 'A', note: '' },
    );
    expect(rowOf(study, 'PRP-001')).toMatchObject({
      compliance: 'yes',
      basis: 'demonstrated',
      evidence: 'TR-1 issue A',
      stage: 'acceptance',
      signature: 'Ines Okafor, 2026-03-02, found',
    });
    expect(complianceView(viewOf(study)).header.basis).toBe('predicted and demonstrated');
  });

  it('has a header with counts, the decision rule and the caution', () => {
    const study = smallStudy();
    edit(study, OWNER, {
      type: 'requirement.revise',
      id: ID.mass,
      version: 1,
      changes: { limit: limit('at most', '130', 't') },
    });
    const { header } = complianceView(viewOf(study, READER));
    expect(header).toMatchObject({
      study: 'Small tug',
      studyKey: 'SMALL',
      phase: 'Phase A',
      standpoint: 'Now',
      baseline: '',
      revision: 7,
      basis: 'predicted',
      counts: { yes: 1, partial: 1, no: 0, 'not assessed': 1 },
      verdicts: { compliant: 1, 'short margin': 1, 'no evidence': 1, 'non-compliant': 0 },
      closedRows: 0,
      openItems: 0,
    });
    expect(header.decisionRule).toContain('(k = 2)');
    expect(header.caution).toContain(
      'does not replace licensed engineering, range safety, radiation protection or local codes',
    );
  });
});
