import katex from 'katex';
import type { ProofLine } from '@shared/contract';
import type { Study } from '../study';
import {
  ANALYST,
  edit,
  emptyStudy,
  formulaAnalysis,
  ID,
  idOf,
  limit,
  MEMBER,
  OWNER,
  quantity,
  requirement,
  smallStudy,
  verifiedBy,
  viewOf,
} from '../testing/small-study';
import { proofView } from './proof-view';

function proofOf(study: Study, requirementId: string) {
  return proofView(viewOf(study), study.get('requirement', requirementId)!);
}
const typeset = ({ symbols, numbers }: ProofLine): string => (numbers ? `${symbols} = ${numbers}` : symbols);

/** Every piece of TeX must be taken by the typesetter with trust off. */
function expectTypesettable(lines: readonly ProofLine[], comparison: string | undefined): void {
  for (const tex of [...lines.map(typeset), comparison ?? ''])
    expect(() => katex.renderToString(tex, { throwOnError: true, strict: 'error' })).not.toThrow();
}

describe('the proof of a formula', () => {
  it('goes from what feeds it to the output, with symbols, numbers in their authors’ units and results', () => {
    const { proof, comparison } = proofOf(smallStudy(), ID.deltaV);
    expect(proof.map(({ number, analysis }) => `${number} ${analysis}`)).toEqual([
      '1 AN-001',
      '2 AN-002',
      '3 AN-002',
      '4 AN-002',
    ]);
    expect(proof.map(typeset)).toEqual([
      'm_{0} = m_{dry} + m_{p} = 65.0\\,\\mathrm{t} + 55.0\\,\\mathrm{t}',
      'v_{e} = g_{0}\\,I_{sp} = 9.80665\\,\\mathrm{m/s^{2}} \\times 6\\,500\\,\\mathrm{s}',
      'm_{f} = m_{0} - m_{p} = 120\\,\\mathrm{t} - 55.0\\,\\mathrm{t}',
      '\\Delta v = v_{e}\\,\\ln\\left(\\frac{m_{0}}{m_{f}}\\right) = 63.74\\,\\mathrm{km/s} \\times \\ln\\left(\\frac{120\\,\\mathrm{t}}{65\\,\\mathrm{t}}\\right)',
    ]);
    // 9.80665 × 6500 = 63 743.225 m/s
    expect(proof[1]!.result).toEqual({ si: 63_743.225, unit: 'km/s' });
    expect(proof[3]!.result!.si).toBeCloseTo(63_743.225 * Math.log(120 / 65), 9);
    expect(comparison).toEqual({
      tex: '39.08 \\ge 38.0\\ \\mathrm{km/s}',
      text: 'margin +2.8 %, required +5.0 %',
    });
    expectTypesettable(proof, comparison?.tex);
  });

  it('leaves out lines that the output does not rest on', () => {
    const study = smallStudy();
    edit(study, ANALYST, verifiedBy(idOf(70), ID.outbound, ID.transfer, 'v_e'));
    expect(proofOf(study, ID.outbound).proof.map(({ symbols }) => symbols)).toEqual(['v_{e} = g_{0}\\,I_{sp}']);
  });

  it('shows a relation that does not hold as one', () => {
    expect(proofOf(smallStudy(), ID.mass).comparison).toEqual({
      tex: '120 \\nleq 116\\ \\mathrm{t}',
      // 1 − 120/116 = −3.448 %
      text: 'margin −3.4 %',
    });
  });

  it('gives a value enough digits to tell it from the limit', () => {
    const study = smallStudy();
    edit(study, ANALYST, { type: 'quantity.set', id: ID.dry, version: 1, value: { text: '61.0004', unit: 't' } });
    expect(proofOf(study, ID.mass).comparison!.tex).toBe('116.0004 \\nleq 116\\ \\mathrm{t}');
  });

  it('shows where a value is missing, and why each line has no result', () => {
    const study = smallStudy();
    edit(study, ANALYST, { type: 'quantity.set', id: ID.isp, version: 1, value: null });
    const { proof, comparison } = proofOf(study, ID.deltaV);
    expect(proof[1]).toMatchObject({
      numbers: '9.80665\\,\\mathrm{m/s^{2}} \\times \\text{no value}',
      result: null,
      failure: 'specific impulse (Q-001) has no value',
    });
    expect(proof[2]!.result!.si).toBe(65_000);
    expect(proof[3]!.failure).toBe('specific impulse (Q-001) has no value');
    expect(comparison).toBeNull();
    expectTypesettable(proof, undefined);
  });

  it('keeps each number in its own unit when units are mixed, and converts the result', () => {
    const study = emptyStudy();
    edit(study, OWNER, requirement({ id: ID.mass, title: 'weigh', limit: limit('at most', '10', 't') }));
    edit(
      study,
      ANALYST,
      quantity(idOf(81), 'a', '2', 't'),
      quantity(idOf(82), 'b', '-500', 'kg'),
      quantity(idOf(83), 'T', '26.85', 'degC'),
      quantity(idOf(84), 'n', '1.5e3', ''),
      formulaAnalysis(
        idOf(85),
        'Mixed',
        [
          { name: 'a', from: { quantityId: idOf(81) } },
          { name: 'b', from: { quantityId: idOf(82) } },
          { name: 'T', from: { quantityId: idOf(83) } },
          { name: 'n', from: { quantityId: idOf(84) } },
        ],
        [['m = a + b + 0 * n * a * T / T', 'kg']],
      ),
      verifiedBy(idOf(86), ID.mass, idOf(85), 'm'),
    );
    const { proof, comparison } = proofOf(study, ID.mass);
    expect(proof[0]!.numbers).toContain('2\\,\\mathrm{t} + \\left(-500\\,\\mathrm{kg}\\right)');
    expect(proof[0]!.numbers).toContain('26.85\\,\\mathrm{^{\\circ}C}');
    expect(proof[0]!.numbers).toContain('1\\,500');
    expect(proof[0]!.result).toEqual({ si: 1500, unit: 'kg' });
    expect(comparison!.tex).toBe('1.5 \\le 10\\ \\mathrm{t}');
    expectTypesettable(proof, comparison?.tex);
  });
});

describe('the proof of a method', () => {
  const inputs = [
    { name: 'I_sp', from: { quantityId: ID.isp } },
    { name: 'm_0', from: { analysisId: ID.rollUp, output: 'm_0' } },
    { name: 'm_p', from: { quantityId: ID.propellant } },
  ];
  function withMethod(id: string, bound: typeof inputs): Study {
    const study = smallStudy();
    edit(
      study,
      ANALYST,
      {
        type: 'analysis.create',
        id: idOf(90),
        kind: 'method',
        name: 'By the book',
        purpose: '',
        elementId: null,
        inputs: bound,
        lines: [],
        method: { id, version: '1.0.0' },
        results: [],
        assumptions: '',
      },
      verifiedBy(idOf(91), ID.deltaV, idOf(90), 'dv', { deciding: true }),
    );
    return study;
  }

  it('shows the lines that the method brings, after what feeds it, and says whose method it is', () => {
    const study = withMethod('rocket-equation', inputs);
    const { proof, proofNote, comparison } = proofOf(study, ID.deltaV);
    expect(proof.map(typeset).slice(1)).toEqual([
      'v_e = I_{sp}\\,g_0 = 6\\,500\\,\\mathrm{s} \\times 9.80665\\,\\mathrm{m/s^{2}}',
      'm_f = m_0 - m_p = 120\\,\\mathrm{t} - 55.0\\,\\mathrm{t}',
      'R = \\frac{m_0}{m_f} = \\frac{120\\,\\mathrm{t}}{65\\,\\mathrm{t}}',
      '\\Delta v = v_e\\,\\ln\\left(R\\right) = 63.74\\,\\mathrm{km/s} \\times \\ln\\left(1.846\\right)',
    ]);
    expect(proof.at(-1)!.result!.si).toBeCloseTo(39_081.256, 3);
    expect(proof.at(-1)!.result!.unit).toBe('km/s');
    expect(proofNote).toContain(
      'Analysis AN-003 “By the book”, Rocket equation from specific impulse (K. E. Tsiolkovsky',
    );
    expect(proofNote).toContain('not checked yet. Predicted by analysis.');
    expectTypesettable(proof, comparison?.tex);
    edit(study, MEMBER, { type: 'analysis.check', id: idOf(90), version: 1, remark: '' });
    expect(proofOf(study, ID.deltaV).proofNote).toContain('checked by Lena Brandt on 2026-03-02');
  });

  it('shows which lines still hold when an input is missing', () => {
    const study = withMethod('rocket-equation', inputs);
    edit(study, ANALYST, { type: 'quantity.set', id: ID.isp, version: 1, value: null });
    const { proof } = proofOf(study, ID.deltaV);
    expect(proof.at(-1)).toMatchObject({ result: null, failure: 'specific impulse (Q-001) has no value' });
    expectTypesettable(proof, undefined);
  });
});

describe('the comparison', () => {
  function compared(relation: Parameters<typeof limit>[0], text: string, unit: string, more: object, value: string) {
    const study = emptyStudy();
    edit(study, OWNER, requirement({ id: ID.mass, title: 'be so', limit: limit(relation, text, unit, more) }));
    const temperature = 'temperature' in more ? { temperature: 'difference' as const } : {};
    edit(
      study,
      ANALYST,
      quantity(idOf(81), 'x', value, unit, temperature),
      formulaAnalysis(idOf(85), 'As is', [{ name: 'x', from: { quantityId: idOf(81) } }], [['y = x', unit]]),
      verifiedBy(idOf(86), ID.mass, idOf(85), 'y'),
    );
    const { comparison } = proofOf(study, ID.mass);
    expectTypesettable([], comparison?.tex);
    return comparison;
  }

  it('of a range names both edges, or the one that is broken', () => {
    const upper = { upper: { text: '30', unit: 'm' } };
    expect(compared('between', '10', 'm', upper, '14')).toEqual({
      tex: '10 \\le 14 \\le 30\\ \\mathrm{m}',
      text: 'margin +40.0 % of the half-width',
    });
    expect(compared('between', '10', 'm', upper, '33')!.tex).toBe('33 \\nleq 30\\ \\mathrm{m}');
    expect(compared('between', '10', 'm', upper, '9')!.tex).toBe('9 \\ngeq 10\\ \\mathrm{m}');
  });

  it('of a target shows the distance from it', () => {
    const tolerance = { tolerance: { text: '50', unit: 'cm' } };
    expect(compared('equal within', '10', 'm', tolerance, '10.2')).toEqual({
      tex: '\\left|10.2 - 10\\right| \\le 0.5\\ \\mathrm{m}',
      text: 'margin +60.0 % of the tolerance',
    });
  });

  it('says that a value is at its limit', () => {
    expect(compared('at most', '10', 'm', {}, '10')!.text).toBe('margin 0.0 %, at the limit');
  });

  it('is absolute where no per cent can be stated', () => {
    expect(compared('at least', '0', 'm', {}, '2.5')!.text).toBe('margin +2.5 m');
    expect(compared('at most', '10', 'K', { temperature: 'difference' }, '8')!.text).toBe('margin +2 K');
  });

  it('of a temperature is in kelvin and says so', () => {
    // 100 °C − 80 °C over 373.15 K = 5.36 %
    expect(compared('at most', '100', 'degC', {}, '80')).toEqual({
      tex: '80 \\le 100\\ \\mathrm{^{\\circ}C}',
      text: 'margin +5.4 % of the limit in kelvin',
    });
  });
});
