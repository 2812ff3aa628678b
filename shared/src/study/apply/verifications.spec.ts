import type { Command } from '@shared/contract';
import { proveAll } from '../prove';
import { refused } from '../testing/refused';
import { reviewedStudy, seen } from '../testing/reviewed-study';
import {
  ANALYST,
  ID,
  OWNER,
  edit,
  formulaAnalysis,
  idOf,
  limit,
  quantity,
  requirement,
  smallStudy,
  verifiedBy,
} from '../testing/small-study';

const V = idOf(80);
const bare = { analysisId: null, output: null } as const;

describe('verifications', () => {
  it('cannot compare with a limit that is not there', () => {
    const study = smallStudy();
    edit(study, OWNER, requirement({ id: idOf(81), title: 'float' }));
    const refusal = refused(study, ANALYST, verifiedBy(V, idOf(81), ID.rollUp, 'm_0'));
    expect(refusal.details).toMatchObject({ field: 'requirementId', value: 'VEH-003' });
    expect(refusal.message).toContain('has no limit');
  });

  it('take an analysis only where the method of verification is analysis', () => {
    const refusal = refused(smallStudy(), ANALYST, verifiedBy(V, ID.outbound, ID.transfer, 'v_e', { method: 'test' }));
    expect(refusal.details).toMatchObject({ field: 'analysisId', value: 'test' });
  });

  it('keep a limit on a temperature apart from one on a difference', () => {
    const study = smallStudy();
    edit(
      study,
      ANALYST,
      quantity(idOf(82), 'T', '900', 'K'),
      formulaAnalysis(idOf(83), 'a', [{ name: 'T', from: { quantityId: idOf(82) } }], [['T_r = T', 'K']]),
    );
    edit(
      study,
      OWNER,
      requirement({
        id: idOf(81),
        title: 'stay level',
        limit: limit('at most', '10', 'K', { temperature: 'difference' }),
      }),
    );
    expect(refused(study, ANALYST, verifiedBy(V, idOf(81), idOf(83), 'T_r')).message).toMatch(
      /a temperature; .* on a temperature difference/,
    );
    edit(study, OWNER, {
      type: 'requirement.revise',
      id: idOf(81),
      version: 1,
      changes: { limit: limit('at most', '950', 'K') },
    });
    edit(study, ANALYST, verifiedBy(V, idOf(81), idOf(83), 'T_r'));
    const back = { limit: limit('at most', '10', 'K', { temperature: 'difference' }) };
    expect(
      refused(study, OWNER, { type: 'requirement.revise', id: idOf(81), version: 2, changes: back }).details.field,
    ).toBe('changes.limit.temperature');
  });

  it('let one decide: marking another takes the mark away', () => {
    const study = smallStudy();
    edit(study, ANALYST, {
      type: 'verification.revise',
      id: ID.deltaVByAnalysis,
      version: 1,
      changes: { deciding: true },
    });
    edit(study, ANALYST, verifiedBy(V, ID.deltaV, ID.transfer, 'v_e', { deciding: true }));
    expect(study.get('verification', ID.deltaVByAnalysis)).toMatchObject({ deciding: false, version: 3 });
    // v_e = 63.7 km/s is above 38 km/s with margin, so the verdict is that of the marked one.
    expect(proveAll(study).proven.get(ID.deltaV)).toMatchObject({ verdict: 'compliant', verificationId: V });
  });

  it('of a baselined requirement change only by change request', () => {
    const study = reviewedStudy();
    const at = seen(study, 'verification', ID.massByAnalysis);
    for (const command of [
      verifiedBy(V, ID.mass, ID.transfer, 'm_f'),
      { type: 'verification.revise', ...at, changes: { gate: 'x' } },
      { type: 'verification.unlink', ...at },
    ] as Command[])
      expect(refused(study, ANALYST, command)).toMatchObject({ code: 'controlled' });
  });

  it('of a withdrawn requirement change no more, findings included', () => {
    const study = smallStudy();
    edit(study, ANALYST, verifiedBy(V, ID.outbound, '', '', { ...bare, method: 'test' }));
    edit(study, OWNER, { type: 'requirement.withdraw', ...seen(study, 'requirement', ID.outbound), reason: 'no' });
    expect(refused(study, ANALYST, { type: 'verification.unlink', id: V, version: 1 }).code).toBe('state');
    const finding: Command = {
      type: 'verification.record',
      id: V,
      version: 1,
      met: true,
      document: 'R',
      issue: '1',
      note: '',
    };
    expect(refused(study, ANALYST, finding).code).toBe('state');
  });
});

describe('a finding', () => {
  const record = (id: string, met: boolean): Command => ({
    type: 'verification.record',
    id,
    version: 1,
    met,
    document: 'REP-7',
    issue: '2',
    note: '',
  });

  it('is computed, not recorded, where a limit is verified by analysis', () => {
    const refusal = refused(smallStudy(), ANALYST, record(ID.massByAnalysis, true));
    expect(refusal.message).toContain('its verdict is computed, not recorded');
  });

  it('decides by test, with its evidence, and is void when the method changes', () => {
    const study = smallStudy();
    edit(study, ANALYST, verifiedBy(V, ID.outbound, '', '', { ...bare, method: 'test' }), record(V, false));
    expect(proveAll(study).proven.get(ID.outbound)).toMatchObject({
      verdict: 'non-compliant',
      basis: 'demonstrated',
      reason: 'found not met by test, REP-7 issue 2',
    });
    edit(study, ANALYST, { type: 'verification.revise', id: V, version: 2, changes: { method: 'inspection' } });
    expect(study.get('verification', V)!.finding).toBeNull();
  });
});
