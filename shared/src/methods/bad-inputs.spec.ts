import { METHODS, methodById } from '.';
import { EXAMPLES } from './testing/examples';

const LIGHT = 299_792_458;
const COOLING = { m: 500, c_p: 900, A: 10, eps: 0.85, T_1: 1200, T_2: 600, T_s: 250 };
const WARMING = { m: 500, c_p: 900, A: 10, eps: 0.85, Q: 5e4, T_1: 300, T_2: 900 };
const NOZZLE = { p_c: 1e7, p_e: 1e5, T_c: 3000, k: 1.2, M: 0.02 };
const LEAD = { mu_rho: 0.0071, rho: 11350 };
const SHELL = { p: 1e6, r: 1, l: 2, s: 2e8, rho: 2700 };
const SAIL = { P: 1e9, m: 10, r: 0.8 };

type Values = Record<string, number>;

function run(method: string, inputs: Values) {
  const found = methodById(method);
  if (!found) throw new Error(`${method} is not in the library`);
  return found.compute(inputs);
}

/** Each row: the rule it stands for, method, inputs, port at fault, words that say what would be right. */
const REFUSED: readonly [rule: string, method: string, inputs: Values, port: string, words: RegExp][] = [
  ['B1 no mass left', 'rocket-equation', { I_sp: 300, m_0: 100, m_p: 100 }, 'm_p', /not below the initial mass/],
  [
    'B1 more than all',
    'rocket-equation-exhaust-speed',
    { v_e: 3e3, m_0: 100, m_p: 120 },
    'm_p',
    /includes the propellant/,
  ],
  ['B1 negative', 'propellant-for-delta-v', { dv: 100, I_sp: 300, m_f: -1 }, 'm_f', /above 0/],
  ['B2 infeasible stage', 'stage-payload-fraction', { dv: 9300, v_e: 4413, eps: 0.13 }, 'eps', /Infeasible/],
  ['B3 exhaust above c', 'relativistic-mass-ratio', { w: 1.01 * LIGHT, v: 1e7 }, 'w', /at most 1 c/],
  ['B3 no exhaust speed', 'relativistic-mass-ratio', { w: 0, v: 1e7 }, 'w', /above 0 c/],
  ['B3 speed of light', 'relativistic-propellant', { w: 1e8, v: LIGHT, m_f: 1 }, 'v', /below 1 c/],
  ['B3 mass ratio', 'relativistic-rocket-speed', { w: 1e8, m_0: 1, m_p: 2 }, 'm_p', /not below/],
  [
    'B3 stage gains mass',
    'relativistic-stages',
    { m_0_1: 10, m_f_1: 12, w_1: 1e7 },
    'm_f_1',
    /above its mass at ignition/,
  ],
  [
    'B4 rest mass above energy',
    'exhaust-with-losses',
    { e_j: 0.5, r_j: 0.6, eta_n: 1 },
    'r_j',
    /includes its rest mass/,
  ],
  ['B4 energy above all', 'exhaust-with-losses', { e_j: 1.2, r_j: 0.6, eta_n: 1 }, 'e_j', /at most 1/],
  ['B5 no acceleration', 'flip-and-burn', { a: 0, d: 1e16 }, 'a', /above 0/],
  ['B5 negative distance', 'flip-and-burn', { a: 10, d: -1 }, 'd', /above 0/],
  ['B5 cap at c', 'trip-with-cruise', { a: 10, d: 1e16, v_m: LIGHT }, 'v_m', /below 1 c/],
  ['B6 speed of light', 'kinetic-energy', { m: 1, v: LIGHT }, 'v', /below/],
  ['B6 mass ratio', 'integrated-efficiency', { R: 0.9 }, 'R', /at least 1/],
  ['B7 no efficiency', 'electric-thrust', { P: 1e6, eta: 0, I_sp: 3000 }, 'eta', /above 0/],
  ['B7 more than all', 'electric-thrust', { P: 1e6, eta: 1.1, I_sp: 3000 }, 'eta', /at most 1/],
  ['B7 no exhaust speed', 'jet-power', { F: 1, v_e: 0 }, 'v_e', /above 0/],
  ['B7 no specific mass', 'characteristic-speed', { eta: 0.7, t: 1e7, a_s: 0 }, 'a_s', /above 0/],
  ['B7 no time', 'characteristic-speed', { eta: 0.7, t: 0, a_s: 0.1 }, 't', /above 0/],
  [
    'B7 infeasible',
    'optimum-exhaust-speed',
    { dv: 60e3, t: 8640000, eta: 0.7, a_s: 0.05 },
    'dv',
    /nothing for payload/,
  ],
  ['thrust beyond power', 'thruster-efficiency', { F: 1, v_e: 3e4, P: 1e4 }, 'F', /more power than goes in/],
  ['B8 heat ratio', 'nozzle-throat', { ...NOZZLE, k: 1, mdot: 1 }, 'k', /above 1/],
  ['B8 area ratio', 'nozzle-performance-area-ratio', { ...NOZZLE, eps: 0.5 }, 'eps', /at least 1/],
  ['B8 no expansion', 'nozzle-exhaust-speed', { ...NOZZLE, p_e: 1e7 }, 'p_e', /not below the chamber pressure/],
  ['B8 not choked', 'nozzle-performance', { ...NOZZLE, p_a: 7e6 }, 'p_a', /too high for a choked throat/],
  ['B10 sink too warm', 'radiator-heat-rejection', { A: 1, eps: 0.9, T_r: 300, T_s: 300 }, 'T_r', /not above the sink/],
  ['B10 emissivity', 'radiator-heat-rejection', { A: 1, eps: 1.1, T_r: 300 }, 'eps', /at most 1/],
  ['B10 no emissivity', 'radiator-sizing', { Q: 1, eps: 0, T_r: 300, sigma_m: 5 }, 'eps', /above 0/],
  [
    'B10 hotter than source',
    'heat-engine-radiator',
    { P: 1, T_h: 900, T_r: 900, eps: 0.9 },
    'T_r',
    /not below the hot side/,
  ],
  ['B10 no envelope', 'radiator-convex-envelope', { A_f: 2, A_c: 0, eps: 0.9, T_r: 500 }, 'A_c', /above 0/],
  ['B11 below sink', 'heat-sink-cooling', { ...COOLING, T_2: 250 }, 'T_2', /never reached/],
  ['B11 above steady state', 'heat-sink-warming', WARMING, 'T_2', /never reached: the body settles at/],
  ['B12 negative coefficient', 'gamma-transmission', { mu_rho: -1, rho: 1, x: 1 }, 'mu_rho', /above 0/],
  ['B12 negative thickness', 'gamma-transmission', { ...LEAD, x: -1 }, 'x', /at least 0/],
  ['B12 build-up', 'gamma-shield', { ...LEAD, K: 10, A: 1, B: 0.5 }, 'B', /at least 1/],
  ['mixture', 'mixture-attenuation', { rho: 1, w_1: 0.5, mu_rho_1: 1, w_2: 0.4, mu_rho_2: 1 }, 'w_1', /add up to 1/],
  ['B13 burn fraction', 'fusion-exhaust-speed', { q: 3e14, b: 1.2, eta: 0.9 }, 'b', /at most 1/],
  ['B13 no energy', 'fusion-energy-d-t', { E_3: 1e-9 }, 'E_3', /no energy is released/],
  ['B14 more than all light', 'beamed-sail', { ...SAIL, alpha: 0.3 }, 'alpha', /more than 1/],
  ['B14 incidence', 'light-pressure', { S: 1361, A: 1, r: 1, theta: 2 }, 'theta', /at most 90/],
  ['B14 no aperture', 'beam-diffraction', { lambda: 1e-6, L: 1e12, D: 0 }, 'D', /above 0/],
  ['B14 no wavelength', 'beam-diffraction', { lambda: 0, L: 1e12, D: 10 }, 'lambda', /above 0/],
  [
    'B15 inside the body',
    'hohmann-transfer',
    { mu: 4e14, r_1: 6e6, r_2: 8e6, R_b: 6.378e6 },
    'r_1',
    /below the radius/,
  ],
  ['B16 speed of light', 'interstellar-heating', { v: LIGHT, n: 1e6 }, 'v', /below 1 c/],
  ['B16 negative density', 'interstellar-heating', { v: 1e7, n: -1 }, 'n', /at least 0/],
  ['B17 no strength', 'spherical-tank', { p: 1e5, V: 1, s: 0, rho: 2700 }, 's', /above 0/],
  ['B17 all ullage', 'tank-volume', { m_p: 1, rho_p: 70, f_u: 1 }, 'f_u', /below 100/],
  ['B17 weld', 'cylindrical-tank-wall', { ...SHELL, e_w: 1.1 }, 'e_w', /at most 1/],
  ['B18 negative mass', 'mass-roll-up', { mass_1: -5, growth_1: 0.1 }, 'mass_1', /at least 0/],
  ['B18 negative growth', 'mass-roll-up', { mass_1: 5, growth_1: -0.1 }, 'growth_1', /at least 0/],
  ['B18 growth left out', 'mass-roll-up', { mass_1: 5 }, 'growth_1', /is missing/],
  ['B18 no items', 'mass-roll-up', {}, 'mass_1', /give at least 1/],
  ['B18 no limit', 'mass-margins', { L: 0, m_b: 1, m_pred: 1 }, 'L', /above 0/],
];

describe('bad inputs', () => {
  it.each(REFUSED)('%s: %s is refused', (_rule, method, inputs, port, words) => {
    const result = run(method, inputs);
    expect(result.ok).toBe(false);
    if (result.ok) return;
    expect(result.input).toBe(port);
    expect(result.message).toMatch(words);
  });

  it.each(METHODS.map((method) => [method.id, method] as const))(
    '%s refuses missing and non-finite inputs by name',
    (id, method) => {
      const example = EXAMPLES[id]?.[0] ?? {};
      for (const port of [
        ...method.inputs,
        ...(method.group?.ports.map((item) => ({ ...item, name: `${item.name}_1` })) ?? []),
      ]) {
        if (port.default === undefined) {
          const { [port.name]: _left, ...rest } = example;
          expect(method.compute(rest)).toMatchObject({ ok: false, input: port.name });
        }
        for (const bad of [Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]) {
          expect(method.compute({ ...example, [port.name]: bad })).toMatchObject({ ok: false, input: port.name });
        }
      }
    },
  );
});

describe('flagged results', () => {
  it.each<[rule: string, method: string, inputs: Values, words: RegExp]>([
    ['B5 cap without effect', 'trip-with-cruise', { a: 0.01, d: 1e13, v_m: 0.5 * LIGHT }, /no effect/],
    ['B9 separation', 'nozzle-performance', { ...NOZZLE, p_e: 3e4, p_a: 1e5 }, /separate/],
    ['B15 beyond 2 rad', 'edelbaum-transfer', { mu: 4e14, a_0: 7e6, a_f: 4e7, di: 2.1, f: 1e-3 }, /V_0 \+ V_f/],
    ['B17 thick wall', 'cylindrical-tank-wall', { ...SHELL, p: 3e7 }, /thin-shell/],
    ['build-up left out', 'gamma-transmission', { ...LEAD, x: 0.1 }, /build-up/],
    ['faces beyond envelope', 'radiator-convex-envelope', { A_f: 4, A_c: 2, eps: 0.9, T_r: 500 }, /envelope emits/],
    ['fast classical rocket', 'rocket-equation-exhaust-speed', { v_e: 1e8, m_0: 2, m_p: 1 }, /relativistic/],
  ])('%s: %s computes with a warning', (_rule, method, inputs, words) => {
    const result = run(method, inputs);
    if (!result.ok) throw new Error(result.message);
    expect(result.warnings.join(' ')).toMatch(words);
  });

  it('B6: the efficiency at a mass ratio of 1 is its limit, 0', () => {
    expect(run('integrated-efficiency', { R: 1 })).toMatchObject({ ok: true, outputs: { eta_int: 0 } });
    expect(run('relativistic-integrated-efficiency', { R: 1, v_e: 1e8 })).toMatchObject({
      ok: true,
      outputs: { eta_int: 0 },
    });
  });

  it('B15: the delta-v beyond 2 rad is the sum of the two speeds', () => {
    const result = run('edelbaum-transfer', { mu: 4e14, a_0: 7e6, a_f: 4e7, di: 2.5, f: 1e-3 });
    if (!result.ok) throw new Error(result.message);
    const { V_0 = 0, V_f = 0, dv } = result.outputs;
    expect(dv).toBeCloseTo(V_0 + V_f, 6);
  });

  it('a result beyond double precision is refused, not returned as infinity', () => {
    const result = run('relativistic-mass-ratio', { w: 10, v: 0.9 * LIGHT });
    expect(result).toMatchObject({ ok: false });
  });
});
