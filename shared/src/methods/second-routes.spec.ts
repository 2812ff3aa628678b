import { methodById } from '.';

const LIGHT = 299_792_458;
const SIGMA = 5.670374419e-8;
const YEAR = 31_557_600;

/** Outputs of a method; any name may be read, a missing one fails the comparison as NaN. */
function run(method: string, inputs: Record<string, number>): (output: string) => number {
  const result = methodById(method)?.compute(inputs);
  if (!result?.ok) throw new Error(result?.message ?? `${method} is not in the library`);
  return (output) => result.outputs[output] ?? Number.NaN;
}

function expectRelative(actual: number, expected: number, tolerance: number): void {
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(tolerance * Math.abs(expected));
}

/** Integral of f from a to b by Simpson's rule with n even intervals. */
function simpson(f: (x: number) => number, a: number, b: number, n = 20_000): number {
  const h = (b - a) / n;
  let sum = f(a) + f(b);
  for (let i = 1; i < n; i += 1) sum += f(a + i * h) * (i % 2 === 0 ? 2 : 4);
  return (sum * h) / 3;
}

/** The x of a grid at which f is largest. */
function argmax(f: (x: number) => number, a: number, b: number, n = 200_000): number {
  let best = a;
  for (let i = 0; i <= n; i += 1) {
    const x = a + ((b - a) * i) / n;
    if (f(x) > f(best)) best = x;
  }
  return best;
}

describe('figures of the demonstration studies', () => {
  it('cargo tug: 6 500 s, 120 t with 55 t of propellant, 1 MWe at 0.68', () => {
    const speed = run('rocket-equation', { I_sp: 6500, m_0: 120e3, m_p: 55e3 });
    // 6500 × 9.80665 × ln(120/65) = 39 081 m/s
    expectRelative(speed('dv'), 6500 * 9.80665 * Math.log(120 / 65), 1e-12);
    const thrust = run('electric-thrusting-time', { P: 1e6, eta: 0.68, I_sp: 6500, m_p: 55e3 });
    expectRelative(thrust('F'), 21.3, 2e-3);
    expectRelative(thrust('t') / YEAR, 5.2, 2e-3);
  });

  it('annihilation probe: 100 t to 0.3 c at 0.35 c, two years, 38 % gammas, 1 % absorbed, 1500 K radiators', () => {
    const load = run('relativistic-propellant', { w: 0.35 * LIGHT, v: 0.3 * LIGHT, m_f: 100e3 });
    expectRelative(load('R'), (1.3 / 0.7) ** (1 / 0.7), 1e-12);
    const power = run('annihilation-power', { m: load('m_p'), t: 2 * YEAR, f_g: 0.38, f_abs: 0.01 });
    expectRelative(power('P'), 2.0e14, 2e-2);
    const envelope = run('cylinder-envelope-area', { N: 2, D: 30, L: 200 });
    const radiator = run('radiator-heat-rejection', { A: envelope('A'), eps: 0.9, T_r: 1500 });
    const implied = run('implied-efficiency', { P: power('P_abs'), Q: radiator('Q') });
    expect(Math.round(implied('N'))).toBe(79);
    expectRelative(implied('s') + implied('eta'), 1, 1e-15);
  });
});

describe('second routes', () => {
  it('relativistic propellant: integrating dm/m = −c dφ/w', () => {
    const logRatio = simpson((beta) => 1 / (0.4 * (1 - beta ** 2)), 0, 0.6);
    const load = run('relativistic-propellant', { w: 0.4 * LIGHT, v: 0.6 * LIGHT, m_f: 1 });
    expectRelative(Math.log(load('R')), logRatio, 1e-12);
  });

  it('relativistic and classical rocket agree at low speed', () => {
    const inputs = { m_0: 10, m_p: 4 };
    const slow = run('relativistic-rocket-speed', { w: 3000, ...inputs });
    expectRelative(slow('v'), run('rocket-equation-exhaust-speed', { v_e: 3000, ...inputs })('dv'), 1e-9);
  });

  it('staged rocket of one stage is the rocket equation', () => {
    const staged = run('staged-rocket', { m_pl: 5, m_p_1: 60, m_s_1: 10, v_e_1: 4000 });
    expectRelative(staged('dv'), run('rocket-equation-exhaust-speed', { v_e: 4000, m_0: 75, m_p: 60 })('dv'), 1e-14);
  });

  it('relativistic jet power tends to F v/2 and F c', () => {
    expectRelative(run('relativistic-jet-power', { F: 2, v_e: 1000 })('P_j'), 1000, 1e-10);
    expectRelative(run('relativistic-jet-power', { F: 2, v_e: LIGHT })('P_j'), 2 * LIGHT, 1e-15);
  });

  it('exhaust with losses of a massive exhaust is the fusion exhaust', () => {
    const f = 0.004;
    const fusion = run('fusion-exhaust-speed', { q: f * LIGHT ** 2, b: 1, eta: 1 });
    expectRelative(run('exhaust-with-losses', { e_j: 1, r_j: 1 - f, eta_n: 1 })('w'), fusion('w'), 1e-12);
  });

  it('trip with cruise: adding up a numerically integrated burn', () => {
    const [a, d, v_m] = [9.80665, 4.37 * LIGHT * YEAR, 0.2 * LIGHT];
    const trip = run('trip-with-cruise', { a, d, v_m });
    // dt = γ³ dv/a, dτ = γ² dv/a, dx = γ³ v dv/a
    const gamma = (v: number) => 1 / Math.sqrt(1 - (v / LIGHT) ** 2);
    const t = simpson((v) => gamma(v) ** 3 / a, 0, v_m);
    const tau = simpson((v) => gamma(v) ** 2 / a, 0, v_m);
    const x = simpson((v) => (gamma(v) ** 3 * v) / a, 0, v_m);
    expectRelative(trip('x_1'), x, 1e-12);
    expectRelative(trip('t'), 2 * t + (d - 2 * x) / v_m, 1e-12);
    expectRelative(trip('tau'), 2 * tau + (d - 2 * x) / (v_m * gamma(v_m)), 1e-12);
  });

  it.each([0.05, 0.3, 0.6, 0.75])('optimum exhaust speed at Δv = %d of the characteristic speed: grid search', (u) => {
    const found = run('optimum-exhaust-speed', { dv: u * 1e4, eta: 0.5, t: 1e8, a_s: 1 });
    const payload = (C: number) => Math.exp(-u / C) - C ** 2 * (1 - Math.exp(-u / C));
    const best = argmax(payload, 0.2, 1.2);
    expect(Math.abs(found('C') / 1e4 - best)).toBeLessThan(1e-4);
    expectRelative(found('lambda'), payload(best), 1e-8);
  });

  it('least radiator area with a real engine and a sink: grid search', () => {
    const found = run('heat-engine-radiator-optimum', { P: 1e6, T_h: 1500, eps: 0.9, T_s: 300, k: 0.5 });
    const area = (T: number) => (1e6 * (1 / (0.5 * (1 - T / 1500)) - 1)) / (0.9 * SIGMA * (T ** 4 - 300 ** 4));
    const best = argmax((T) => -area(T), 400, 1450);
    expect(Math.abs(found('T_r') - best)).toBeLessThan(0.01);
    expectRelative(found('A'), area(best), 1e-8);
    expect(found('T_r')).toBeGreaterThan(0.75 * 1500);
  });

  it('an envelope larger than the faces leaves every face its own emissivity', () => {
    const inputs = { eps: 0.85, T_r: 700, T_s: 200 };
    const free = run('radiator-convex-envelope', { A_f: 12, A_c: 40, ...inputs });
    expectRelative(free('Q'), run('radiator-heat-rejection', { A: 12, ...inputs })('Q'), 1e-14);
  });

  it('sizing inverts heat rejection', () => {
    const inputs = { eps: 0.88, T_r: 812, T_s: 190, eta_f: 0.93 };
    const sized = run('radiator-sizing', { Q: 3.02e6, sigma_m: 6, ...inputs });
    expectRelative(run('radiator-heat-rejection', { A: sized('A'), ...inputs })('Q'), 3.02e6, 1e-14);
  });

  it.each([0, 1e-6, 2, 12, 250, 500, 599.9])('cooling with a sink at %d K: quadrature', (T_s) => {
    const [m, c_p, A, eps] = [500, 900, 10, 0.85];
    const cooled = run('heat-sink-cooling', { m, c_p, A, eps, T_1: 1200, T_2: 600, T_s });
    // In u = ln(T − T_s) the integrand stays smooth near the sink.
    const integrand = (u: number) => {
      const T = T_s + Math.exp(u);
      return 1 / ((T + T_s) * (T ** 2 + T_s ** 2));
    };
    const integral = simpson(integrand, Math.log(600 - T_s), Math.log(1200 - T_s));
    expectRelative(cooled('t'), ((m * c_p) / (eps * A * SIGMA)) * integral, 1e-9);
  });

  it('warming under constant heat flow: quadrature', () => {
    const [m, c_p, A, eps, Q] = [500, 900, 10, 0.85, 5e5];
    const warmed = run('heat-sink-warming', { m, c_p, A, eps, Q, T_1: 300, T_2: 900, T_s: 100 });
    const flow = (T: number) => Q - eps * A * SIGMA * (T ** 4 - 100 ** 4);
    expectRelative(
      warmed('t'),
      simpson((T) => (m * c_p) / flow(T), 300, 900),
      1e-9,
    );
  });

  it.each(['fusion-energy-d-t', 'fusion-energy-d-he3', 'fusion-energy-d-d-n', 'fusion-energy-d-d-p'])(
    '%s: the products share energy and momentum',
    (method) => {
      const reaction = run(method, {});
      const rest = (port: string) =>
        methodById(method)?.inputs.find((input) => input.name === port)?.default ?? Number.NaN;
      const momentum = (K: number, E: number) => Math.sqrt(K * (K + 2 * E));
      expectRelative(reaction('K_3') + reaction('K_4'), reaction('Q'), 1e-12);
      expectRelative(momentum(reaction('K_3'), rest('E_3')), momentum(reaction('K_4'), rest('E_4')), 1e-12);
    },
  );

  it('a gamma shield lets through what it was sized for', () => {
    const lead = { mu_rho: 0.0071, rho: 11350, B: 2.5 };
    const shield = run('gamma-shield', { ...lead, K: 1e4, A: 3 });
    expectRelative(run('gamma-transmission', { ...lead, x: shield('x') })('T'), 1e-4, 1e-12);
    expectRelative(shield('m'), 11350 * 3 * shield('x'), 1e-14);
  });

  it('the angle between planes obeys the cosine rule', () => {
    const theta = run('plane-angle', { i_1: 0.9, i_2: 0.4, dO: 1.1 })('theta');
    const cosine = Math.cos(0.9) * Math.cos(0.4) + Math.sin(0.9) * Math.sin(0.4) * Math.cos(1.1);
    expectRelative(Math.cos(theta), cosine, 1e-14);
  });

  it('ellipsoidal ends weigh the surface of the spheroid', () => {
    const [a, k] = [1.2, 1.4];
    const ends = run('ellipsoidal-ends', { p: 1e6, a, k, K: 0.7, s: 2e8, rho: 2700 });
    const b = a / k;
    // Area of the oblate spheroid by quadrature over the parametric angle.
    const strip = (u: number) => 2 * Math.PI * a * Math.cos(u) * Math.hypot(a * Math.sin(u), b * Math.cos(u));
    const area = simpson(strip, -Math.PI / 2, Math.PI / 2);
    expectRelative(ends('m'), area * 2700 * ((ends('t_cr') + ends('t_k')) / 2), 1e-9);
  });

  it('a mass roll-up leaves propellant and payload without growth', () => {
    const mass = run('mass-roll-up', { mass_1: 10, growth_1: 0.2, mass_2: 5, growth_2: 0, m_p: 100, m_pl: 7 });
    expect(mass('m_basic')).toBe(15);
    expect(mass('m_pred')).toBe(17);
    expect(mass('m')).toBe(124);
  });
});
