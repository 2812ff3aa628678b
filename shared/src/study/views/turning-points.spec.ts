import {
  ANALYST,
  edit,
  emptyStudy,
  formulaAnalysis,
  ID,
  idOf,
  limit,
  OWNER,
  quantity,
  requirement,
  smallStudy,
  verifiedBy,
  viewOf,
} from '../testing/small-study';
import type { Study } from '../study';
import { turningPoints } from './turning-points';

function pointsOf(study: Study, id: string) {
  return turningPoints(viewOf(study), study.get('requirement', id)!);
}

describe('turning points', () => {
  it('are where one input alone brings the output to the limit, and to the required margin', () => {
    const v_e = 9.80665 * 6500;
    const points = new Map(pointsOf(smallStudy(), ID.deltaV).map((point) => [point.symbol, point]));
    // Δv = g₀ I_sp ln(120/65) = 38 000, and 39 900 with 5 %
    expect(points.get('I_sp')!.atLimit).toBeCloseTo(38_000 / (9.80665 * Math.log(120 / 65)), 6);
    expect(points.get('I_sp')!.atRequired).toBeCloseTo(39_900 / (9.80665 * Math.log(120 / 65)), 6);
    expect(points.get('I_sp')!.now).toEqual({ si: 6500, unit: 's' });
    // 6320.165/6500 − 1
    expect(points.get('I_sp')!.percent).toBeCloseTo(-2.7667, 4);
    // Δv = v_e ln((65 t + m_p)/65 t): m_p = 65 t (exp(Δv/v_e) − 1)
    expect(points.get('m_p')!.atLimit).toBeCloseTo(65_000 * Math.expm1(38_000 / v_e), 5);
    expect(points.get('m_p')!.atRequired).toBeCloseTo(65_000 * Math.expm1(39_900 / v_e), 5);
    // Δv = v_e ln(1 + 55 t/m_dry): m_dry = 55 t/(exp(Δv/v_e) − 1)
    expect(points.get('m_dry')!.atLimit).toBeCloseTo(55_000 / Math.expm1(38_000 / v_e), 5);
  });

  it('come with the smallest change first', () => {
    expect(pointsOf(smallStudy(), ID.deltaV).map(({ symbol }) => symbol)).toEqual(['I_sp', 'm_p', 'm_dry']);
  });

  it('have no required one where policy asks for no margin', () => {
    // m_dry + m_p = 116 t: 61 t or 51 t
    expect(
      pointsOf(smallStudy(), ID.mass).map(({ symbol, atLimit, atRequired }) => [
        symbol,
        Math.round(atLimit!),
        atRequired,
      ]),
    ).toEqual([
      ['m_dry', 61_000, null],
      ['m_p', 51_000, null],
    ]);
  });

  it('stay within the physical bounds of the quantity’s kind', () => {
    const study = emptyStudy();
    edit(study, OWNER, requirement({ id: ID.mass, title: 'radiate', limit: limit('at least', '2', 'kW') }));
    edit(
      study,
      ANALYST,
      quantity(idOf(81), 'eps', '0.8', '', { kind: 'emissivity' }),
      quantity(idOf(82), 'q', '1', 'kW'),
      formulaAnalysis(
        idOf(85),
        'Radiated',
        [
          { name: 'eps', from: { quantityId: idOf(81) } },
          { name: 'q', from: { quantityId: idOf(82) } },
        ],
        [['Q = eps * q', 'kW']],
      ),
      verifiedBy(idOf(86), ID.mass, idOf(85), 'Q'),
    );
    // The emissivity would have to be 2, above the bound of 1; the flux 2 kW/0.8 = 2.5 kW. The unreachable comes last.
    const points = pointsOf(study, ID.mass);
    expect(points.map(({ symbol }) => symbol)).toEqual(['q', 'eps']);
    expect(points[0]!.atLimit).toBeCloseTo(2500, 8);
    expect(points[1]).toMatchObject({ atLimit: null, percent: null });
  });

  it('of a range are the nearest of its edges', () => {
    const study = emptyStudy();
    const range = limit('between', '10', 'm', { upper: { text: '30', unit: 'm' } });
    edit(study, OWNER, requirement({ id: ID.mass, title: 'fit', limit: range }));
    edit(
      study,
      ANALYST,
      quantity(idOf(81), 'x', '13', 'm'),
      quantity(idOf(82), 'z', '-4', 'm'),
      formulaAnalysis(
        idOf(85),
        'Sum',
        [
          { name: 'x', from: { quantityId: idOf(81) } },
          { name: 'z', from: { quantityId: idOf(82) } },
        ],
        [['y = x - z', 'm']],
      ),
      verifiedBy(idOf(86), ID.mass, idOf(85), 'y'),
    );
    // y = 13 + 4 = 17: 7 to the lower edge, 13 to the upper. x = 6 (−53.8 %), z = 3 (+175 % of |−4|)
    const points = pointsOf(study, ID.mass);
    expect(points.map(({ symbol, atLimit }) => [symbol, Math.round(atLimit! * 1e9) / 1e9])).toEqual([
      ['x', 6],
      ['z', 3],
    ]);
    expect(points[1]!.percent).toBeCloseTo(175, 8);
  });

  it('are none where nothing is computed', () => {
    const study = smallStudy();
    expect(pointsOf(study, ID.outbound)).toEqual([]);
    edit(study, ANALYST, { type: 'quantity.set', id: ID.isp, version: 1, value: null });
    expect(pointsOf(study, ID.deltaV)).toEqual([]);
  });
});
