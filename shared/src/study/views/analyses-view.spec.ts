import { ANALYST, ID, MEMBER, OWNER, edit, idOf, limit, requirement, smallStudy, viewOf } from '../testing/small-study';
import { analysesView } from './analyses-view';
import { analysisSheet } from './analysis-sheet';

describe('analyses', () => {
  it('are listed with what they verify and what they give', () => {
    const { rows } = analysesView(viewOf(smallStudy()));
    expect(rows.map(({ key, state, controlled }) => [key, state, controlled])).toEqual([
      ['AN-001', 'draft', false],
      ['AN-002', 'draft', false],
    ]);
    expect(rows[1]!.verifies).toEqual([{ key: 'VEH-001', title: 'provide total delta-v', verdict: 'short margin' }]);
    const output = rows[1]!.outputs.find(({ name }) => name === 'Delta_v')!;
    expect(output.shown).toEqual({ si: expect.closeTo(39081.0, 0), unit: 'km/s' });
    // u = 9.80665 × 50 s × ln(120/65): half of U = 601.2 m/s with k = 2
    expect(output.standard).toBeCloseTo(9.80665 * 50 * Math.log(120 / 65), 4);
    expect(rows[0]!.outputs[0]!.standard).toBeNull();
  });
});

describe('the sheet of an analysis', () => {
  it('shows inputs with their source and value, and its own proof lines', () => {
    const sheet = analysisSheet(viewOf(smallStudy()), 'AN-002')!;
    expect(sheet.inputs.map(({ name, sourceKey, dimension }) => [name, sourceKey, dimension])).toEqual([
      ['g_0', 'g_0', 'acceleration'],
      ['I_sp', 'Q-001', 'time'],
      ['m_0', 'AN-001 m_0', 'mass'],
      ['m_p', 'Q-003', 'mass'],
    ]);
    expect(sheet.inputs[1]).toMatchObject({ shown: { si: 6500, unit: 's' }, failure: '', tex: 'I_{sp}' });
    expect(sheet.inputs[1]!.uncertainty!.halfWidth.si).toBe(100);
    expect(sheet.proof).toHaveLength(3);
  });

  it('says why an input has no value', () => {
    const study = smallStudy();
    edit(study, ANALYST, { type: 'quantity.set', id: ID.isp, version: 1, value: null });
    const sheet = analysisSheet(viewOf(study), 'AN-002')!;
    expect(sheet.inputs[1]).toMatchObject({ shown: null });
    expect(sheet.inputs[1]!.failure).toContain('Q-001');
    expect(sheet.outputs.at(-1)!.failure).toContain('Q-001');
  });

  it('offers the requirements of a matching dimension with the verdict that each would get', () => {
    const study = smallStudy();
    edit(
      study,
      OWNER,
      requirement({ id: idOf(80), title: 'keep mass on the pad', limit: limit('at most', '130', 't') }),
    );
    const { couldVerify } = analysisSheet(viewOf(study), 'AN-001')!;
    // (130 − 120) / 130 = 7.692 %
    expect(couldVerify).toEqual([
      {
        id: idOf(80),
        version: 1,
        key: 'VEH-003',
        title: 'keep mass on the pad',
        output: 'm_0',
        verdict: 'compliant',
        percent: expect.closeTo(1000 / 130, 6),
      },
    ]);
    // Delta-v is linked to VEH-001 already; v_e (63.7 km/s) would fit it too, and both fit PRP-001.
    const offers = analysisSheet(viewOf(study), 'AN-002')!.couldVerify;
    expect(offers.map(({ key, output, verdict }) => [key, output, verdict])).toEqual([
      ['PRP-001', 'v_e', 'non-compliant'],
      ['PRP-001', 'Delta_v', 'non-compliant'],
      ['VEH-003', 'm_f', 'compliant'],
      ['VEH-001', 'v_e', 'compliant'],
      ['VEH-002', 'm_f', 'compliant'],
    ]);
  });

  it('shows whether the check still covers the definition, and who may sign', () => {
    const study = smallStudy();
    expect(analysisSheet(viewOf(study, ANALYST), 'AN-001')!.may).toEqual(['analysis.revise']);
    expect(analysisSheet(viewOf(study, MEMBER), 'AN-001')!.may).toContain('analysis.check');
    edit(study, MEMBER, { type: 'analysis.check', id: ID.rollUp, version: 1, remark: 'by hand' });
    const checked = analysisSheet(viewOf(study, MEMBER), 'AN-001')!;
    expect(checked).toMatchObject({ state: 'checked', check: { valid: true, person: { name: MEMBER.name } } });
    expect(checked.may).not.toContain('analysis.check');
    const signed = study.get('analysis', ID.rollUp)!;
    study.put('analysis', { ...signed, assumptions: 'another definition' });
    expect(analysisSheet(viewOf(study, MEMBER), 'AN-001')).toMatchObject({ state: 'draft', check: { valid: false } });
  });

  it('names the open change requests on it and is null for an unknown key', () => {
    const study = smallStudy();
    edit(study, ANALYST, {
      type: 'change.write',
      title: 'Rename',
      reason: '',
      due: null,
      edits: [{ type: 'analysis.revise', id: ID.rollUp, version: 1, changes: { name: 'Masses' } }],
    });
    expect(analysisSheet(viewOf(study), 'AN-001')!.changePending).toEqual(['CR-001']);
    expect(analysisSheet(viewOf(study), 'AN-999')).toBeNull();
  });

  it('offers nothing where the standpoint cannot be edited', () => {
    const past = { text: 'revision:3', label: 'Revision 3', revision: 3, editable: false };
    expect(analysisSheet(viewOf(smallStudy(), ANALYST, { standpoint: past }), 'AN-001')!.may).toEqual([]);
  });

  it('shows validity, reference and cautions of a library method', () => {
    const study = smallStudy();
    edit(study, ANALYST, {
      type: 'analysis.create',
      id: idOf(81),
      kind: 'method',
      name: 'By the rocket equation',
      purpose: '',
      elementId: null,
      inputs: [],
      lines: [],
      method: null,
      results: [],
      assumptions: '',
      ...rocketEquationBinding(),
    });
    const sheet = analysisSheet(viewOf(study), 'AN-003')!;
    expect(sheet.methodName).not.toBe('');
    expect(sheet.validity).not.toBe('');
    expect(sheet.reference).not.toBe('');
    expect(sheet.newerMethod).toBeNull();
    expect(sheet.outputs[0]!.failure).toBe('');
  });
});

function rocketEquationBinding(): object {
  return {
    method: { id: 'rocket-equation', version: '1.0.0' },
    inputs: [
      { name: 'm_0', from: { analysisId: ID.rollUp, output: 'm_0' } },
      { name: 'm_p', from: { quantityId: ID.propellant } },
      { name: 'I_sp', from: { quantityId: ID.isp } },
    ],
  };
}
