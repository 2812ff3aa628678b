import { modelOf, valueOf } from './testing-models';

describe('derivative', () => {
  const model = modelOf(
    { x: 2, y: 3, zero: 0, none: null },
    {
      cubic: 'x^3 + y',
      wave: 'sin(y) * exp(x)',
      root: 'sqrt(x - 2)',
      edge: 'log(x - 1.9999999)',
      at0: 'zero^2 + 5*zero',
      n: 'none * x',
      kink: 'abs(x - 2)',
    },
  );

  it('equals the analytic slope', () => {
    // d(x³)/dx = 3·2² = 12; d/dy = 1; d(sin y eˣ)/dy = cos 3 · e². Richardson over 1e-4 steps: within 1e-10.
    expect(model.derivative('cubic', 'x')).toBeCloseTo(12, 9);
    expect(model.derivative('cubic', 'y')).toBeCloseTo(1, 9);
    expect(model.derivative('wave', 'y')).toBeCloseTo(Math.cos(3) * Math.exp(2), 8);
    expect(model.derivative('at0', 'zero')).toBeCloseTo(5, 8);
    expect(model.derivative('cubic', 'zero')).toBe(0);
  });

  it('shrinks its step at the edge of the domain, and gives none on it or without a value', () => {
    // 1/(2 - 1.9999999) = 1e7; the third derivative is large here: within 1 %.
    expect(model.derivative('edge', 'x')).toBeGreaterThan(0.99e7);
    expect(model.derivative('edge', 'x')).toBeLessThan(1.01e7);
    expect(model.derivative('root', 'x')).toBeNull();
    expect(model.derivative('n', 'x')).toBeNull();
    expect(model.derivative('n', 'none')).toBeNull();
  });

  it('leaves the model as it was', () => {
    expect(valueOf(model, 'cubic')).toBe(11);
    expect(() => model.derivative('cubic', 'wave')).toThrow('is computed');
  });
});

describe('turningPoint', () => {
  it('finds where a delta-v reaches its limit', () => {
    const model = modelOf({ I_sp: 450, g_0: 9.80665, m_0: 100, m_f: 40 }, { dv: 'I_sp * g_0 * log(m_0 / m_f)' });
    // I_sp = 5000 / (9.80665 · ln 2.5) and m_0 = 40 · exp(5000 / (450 · 9.80665))
    expect(model.turningPoint('dv', 'I_sp', 5000)).toBeCloseTo(5000 / (9.80665 * Math.log(2.5)), 8);
    expect(model.turningPoint('dv', 'm_0', 5000)).toBeCloseTo(40 * Math.exp(5000 / (450 * 9.80665)), 8);
    expect(valueOf(model, 'I_sp')).toBe(450);
  });

  it('gives the nearest of several roots', () => {
    const model = modelOf({ x: 2.2 }, { y: '(x - 1) * (x - 2) * (x - 5)' });
    expect(model.turningPoint('y', 'x', 0)).toBeCloseTo(2, 12);
    model.set(new Map([['x', 4]]));
    expect(model.turningPoint('y', 'x', 0)).toBeCloseTo(5, 12);
  });

  it('gives the present value when the target is already reached', () => {
    const model = modelOf({ x: 3 }, { y: '2*x' });
    expect(model.turningPoint('y', 'x', 6)).toBe(3);
  });

  it('reaches far, across zero and from zero', () => {
    const model = modelOf({ x: 1, o: 0 }, { y: 'x', z: 'o' });
    expect(model.turningPoint('y', 'x', 1e6)).toBeCloseTo(1e6, 3);
    expect(model.turningPoint('y', 'x', -40)).toBeCloseTo(-40, 9);
    expect(model.turningPoint('z', 'o', 0.25)).toBeCloseTo(0.25, 12);
  });

  it('stays within bounds', () => {
    const model = modelOf({ x: 1 }, { y: 'x' });
    expect(model.turningPoint('y', 'x', 3, { max: 2 })).toBeNull();
    expect(model.turningPoint('y', 'x', -3, { min: 0 })).toBeNull();
    expect(model.turningPoint('y', 'x', 2, { max: 2 })).toBeCloseTo(2, 12);
  });

  it('goes up to the edge of the domain and no further', () => {
    const model = modelOf({ x: 1 }, { y: 'sqrt(x)', z: '1 / x', s: 'sqrt(1 - x^2 / 4)' });
    expect(model.turningPoint('y', 'x', 0.001)).toBeCloseTo(1e-6, 12);
    expect(model.turningPoint('y', 'x', -1)).toBeNull();
    // sqrt(1 - x²/4) = 0.01 at x = 2 sqrt(1 - 1e-4), just inside the edge x = 2
    expect(model.turningPoint('s', 'x', 0.01)).toBeCloseTo(2 * Math.sqrt(1 - 1e-4), 9);
  });

  it('does not take a pole for a root, but a jump that turns the verdict', () => {
    const model = modelOf({ x: 1 }, { pole: '1 / (x - 1.9)', jump: 'x > 1.5 ? 10 : 1' });
    expect(model.turningPoint('pole', 'x', 0)).toBeNull();
    expect(model.turningPoint('jump', 'x', 5)).toBeCloseTo(1.5, 9);
  });

  it('is null for an output that does not depend on the input or has no value', () => {
    const model = modelOf({ x: 1, y: 1, n: null }, { a: 'y', b: 'x * n' });
    expect(model.turningPoint('a', 'x', 2)).toBeNull();
    expect(model.turningPoint('b', 'x', 2)).toBeNull();
    expect(model.turningPoint('b', 'n', 2)).toBeNull();
  });
});
