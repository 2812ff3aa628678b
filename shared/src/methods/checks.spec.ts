import { parseUnit, toSi } from '@shared/units';
import { METHOD_CHECKS, METHODS, methodById, newestVersion, type Given } from '.';

function si(given: Given): number {
  if (typeof given === 'number') return given;
  const unit = parseUnit(given[1]);
  if (!unit.ok) throw new Error(unit.message);
  return toSi(given[0], unit.unit);
}

describe('reference values', () => {
  it.each(METHOD_CHECKS.map((check) => [check.id, check] as const))('%s is reproduced', (_id, check) => {
    const method = methodById(check.method);
    if (!method) throw new Error(`${check.method} is not in the library`);
    const inputs = Object.fromEntries(Object.entries(check.inputs).map(([name, given]) => [name, si(given)]));
    const result = method.compute(inputs);
    if (!result.ok) throw new Error(result.message);
    const expected = si(check.expected);
    const actual = result.outputs[check.output] ?? Number.NaN;
    expect(Math.abs(actual - expected)).toBeLessThanOrEqual(check.tolerance * Math.abs(expected));
  });

  it('stand once each', () => {
    const ids = METHOD_CHECKS.map((check) => check.id);
    expect(new Set(ids).size).toBe(ids.length);
  });

  it.each(METHODS.map((method) => [method.id, method] as const))(
    '%s claims the checks it has and no others',
    (id, method) => {
      const passed = METHOD_CHECKS.filter((check) => check.method === id).map((check) => check.id);
      expect([...method.checks].sort()).toEqual(passed.sort());
    },
  );
});

describe('registry', () => {
  it('finds a method by id, by version, and not what is not there', () => {
    expect(methodById('rocket-equation')?.version).toBe(newestVersion('rocket-equation'));
    expect(methodById('rocket-equation', '1.0.0')?.id).toBe('rocket-equation');
    expect(methodById('rocket-equation', '9.9.9')).toBeUndefined();
    expect(methodById('no-such-method')).toBeUndefined();
    expect(newestVersion('no-such-method')).toBeUndefined();
  });

  it('holds each version of a method once', () => {
    const keys = METHODS.map((method) => `${method.id} ${method.version}`);
    expect(new Set(keys).size).toBe(keys.length);
  });
});
