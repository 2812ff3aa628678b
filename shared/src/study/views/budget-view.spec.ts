import type { Budget, BudgetView, Command, LimitInput } from '@shared/contract';
import type { Study } from '../study';
import { edit, emptyStudy, idOf, limit, OWNER, requirement, viewOf } from '../testing/small-study';
import { budgetView } from './budget-view';

const PARENT = idOf(20);

/** A parent with a budget and children with the given limits; null is a child without a limit, a fourth member "proposed" is one not adopted. */
function budgeted(
  parent: LimitInput,
  budget: Budget,
  children: readonly (readonly [LimitInput['relation'], string, string, 'proposed'?] | null)[],
): { readonly study: Study; readonly view: BudgetView } {
  const study = emptyStudy();
  edit(study, OWNER, requirement({ id: PARENT, title: 'hold the whole', limit: parent }), {
    type: 'budget.set',
    id: PARENT,
    version: 1,
    budget,
  });
  children.forEach((child, index) => {
    const commands: Command[] = [
      requirement({
        id: idOf(100 + index),
        title: `hold part ${index + 1}`,
        prefix: 'PRT',
        limit: child ? limit(child[0], child[1], child[2]) : null,
      }),
      { type: 'trace.link', id: idOf(200 + index), parentId: PARENT, childId: idOf(100 + index) },
    ];
    edit(study, OWNER, ...commands);
    // A child without a limit cannot be given a share; it can lose its limit afterwards.
    const trace = study.get('trace', idOf(200 + index))!;
    const share = child?.[3] ?? 'adopted';
    study.put('trace', { ...trace, share });
  });
  return { study, view: viewOfParent(study) };
}
function viewOfParent(study: Study): BudgetView {
  return budgetView(viewOf(study), study.get('requirement', PARENT)!)!;
}

describe('a budget', () => {
  it('of demands on a delta-v leaves limit − sum in reserve', () => {
    // 38.0 − (24.5 + 9.5 + 2.0) = 2.0 km/s
    const { view } = budgeted(limit('at least', '38.0', 'km/s'), { rule: 'sum', sense: 'demands' }, [
      ['at most', '24.5', 'km/s'],
      ['at most', '9.5', 'km/s'],
      ['at most', '2000', 'm/s'],
    ]);
    expect(view.allocated).toBeCloseTo(36_000, 9);
    expect(view.reserve).toBeCloseTo(2000, 9);
    expect(view).toMatchObject({ closes: true, problem: '', unit: 'km/s', difference: false, limit: 38_000 });
    expect(view.shares.map(({ key, value }) => [key, value])).toEqual([
      ['PRT-001', 24_500],
      ['PRT-002', 9500],
      ['PRT-003', 2000],
    ]);
  });

  it('of shares of a mass is overrun when they add up to more', () => {
    // 116 − (60 + 58) = −2 t
    const { view } = budgeted(limit('at most', '116', 't'), { rule: 'sum', sense: 'shares' }, [
      ['at most', '60', 't'],
      ['at most', '58', 't'],
    ]);
    expect(view).toMatchObject({ allocated: 118_000, reserve: -2000, closes: false });
  });

  it('of contributions to a power leaves sum − limit in reserve', () => {
    // 600 + 450 − 1000 = 50 kW
    const { view } = budgeted(limit('at least', '1', 'MW'), { rule: 'sum', sense: 'contributions' }, [
      ['at least', '600', 'kW'],
      ['at least', '450', 'kW'],
    ]);
    expect(view).toMatchObject({ allocated: 1_050_000, reserve: 50_000, closes: true });
  });

  it('closes when the shares add up to the limit through rounding', () => {
    // 0.1 + 0.2 = 0.30000000000000004
    const { view } = budgeted(limit('at most', '0.3', 'm'), { rule: 'sum', sense: 'shares' }, [
      ['at most', '0.1', 'm'],
      ['at most', '0.2', 'm'],
    ]);
    expect(view).toMatchObject({ reserve: 0, closes: true });
  });

  it('multiplies shares of other dimensions to that of the limit', () => {
    // force over mass: 30 N × 0.002 1/kg = 0.06 m/s² of at most 0.1
    const { view } = budgeted(limit('at most', '0.1', 'm/s^2'), { rule: 'product', sense: 'shares' }, [
      ['at most', '30', 'N'],
      ['at most', '0.002', '1/kg'],
    ]);
    expect(view.allocated).toBeCloseTo(0.06, 12);
    expect(view.reserve).toBeCloseTo(0.04, 12);
    expect(view.shares.map(({ unit }) => unit)).toEqual(['N', '1/kg']);
  });

  it('refuses a product of another dimension in a sentence', () => {
    const { view } = budgeted(limit('at most', '0.1', 'm/s^2'), { rule: 'product', sense: 'shares' }, [
      ['at most', '30', 'N'],
    ]);
    expect(view).toMatchObject({ allocated: null, reserve: null, closes: null });
    expect(view.problem).toBe('the shares multiply to a force; the budget is of acceleration.');
  });

  it('takes the root of the sum of squares', () => {
    // √(3² + 4²) = 5 mm of at most 6
    const { view } = budgeted(limit('at most', '6', 'mm'), { rule: 'root-sum-square', sense: 'shares' }, [
      ['at most', '3', 'mm'],
      ['at most', '4', 'mm'],
    ]);
    expect(view.allocated).toBeCloseTo(0.005, 15);
    expect(view.reserve).toBeCloseTo(0.001, 15);
  });

  it('takes the smallest or the largest share', () => {
    const children = [
      ['at least', '7', 'yr'],
      ['at least', '9', 'yr'],
    ] as const;
    const year = 365.25 * 86_400;
    const smallest = budgeted(limit('at least', '6', 'yr'), { rule: 'smallest', sense: 'contributions' }, children);
    expect(smallest.view.allocated! / year).toBeCloseTo(7, 9);
    expect(smallest.view.reserve! / year).toBeCloseTo(1, 9);
    const largest = budgeted(limit('at least', '6', 'yr'), { rule: 'largest', sense: 'contributions' }, children);
    expect(largest.view.reserve! / year).toBeCloseTo(3, 9);
  });

  it('counts a proposed share only in what the reserve would be', () => {
    const { view } = budgeted(limit('at least', '38', 'km/s'), { rule: 'sum', sense: 'demands' }, [
      ['at most', '36', 'km/s'],
      ['at most', '3', 'km/s', 'proposed'],
    ]);
    expect(view).toMatchObject({ allocated: 36_000, reserve: 2000, closes: true, reserveIfAdopted: -1000 });
    expect(view.shares.map(({ status }) => status)).toEqual(['adopted', 'proposed']);
  });

  it('does not know its reserve while a share has no limit', () => {
    const { view } = budgeted(limit('at most', '10', 't'), { rule: 'sum', sense: 'shares' }, [
      ['at most', '6', 't'],
      null,
    ]);
    expect(view).toMatchObject({ allocated: null, reserve: null, closes: null });
    expect(view.problem).toBe('PRT-002 has no limit yet, so its share is not known.');
  });

  it('names a share of another dimension', () => {
    const { view } = budgeted(limit('at most', '10', 't'), { rule: 'sum', sense: 'shares' }, [['at most', '6', 'kW']]);
    expect(view.reserve).toBeNull();
    expect(view.problem).toBe('the limit of PRT-001 is a power; the budget is of mass, for example in kg.');
    expect(view.shares[0]!.value).toBeNull();
  });

  it('says that a child bounded on the wrong side bounds nothing, and does not say that it closes', () => {
    const { view } = budgeted(limit('at most', '10', 't'), { rule: 'sum', sense: 'shares' }, [['at least', '6', 't']]);
    expect(view).toMatchObject({ allocated: 6000, reserve: 4000, closes: null });
    expect(view.problem).toBe('PRT-001 is an “at least” limit and bounds no share; state it as “at most”.');
  });

  it('holds everything in reserve while nothing is shared out', () => {
    const { view } = budgeted(limit('at most', '10', 't'), { rule: 'sum', sense: 'shares' }, []);
    expect(view).toMatchObject({ allocated: 0, reserve: 10_000, closes: true, shares: [] });
  });

  it('leaves out a withdrawn child', () => {
    const { study } = budgeted(limit('at most', '10', 't'), { rule: 'sum', sense: 'shares' }, [
      ['at most', '6', 't'],
      ['at most', '5', 't'],
    ]);
    edit(study, OWNER, { type: 'requirement.withdraw', id: idOf(101), version: 1, reason: 'not needed' });
    expect(viewOfParent(study)).toMatchObject({ allocated: 6000, closes: true });
  });

  it('is there only where one is set', () => {
    const study = emptyStudy();
    edit(study, OWNER, requirement({ id: PARENT, title: 'hold the whole', limit: limit('at most', '10', 't') }));
    expect(budgetView(viewOf(study), study.get('requirement', PARENT)!)).toBeNull();
  });
});
