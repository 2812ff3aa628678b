import { METHOD_CHECKS } from '../checks';
import { parseUnit, toSi } from '@shared/units';
import type { Given } from '../checks/check';

function si(given: Given): number {
  if (typeof given === 'number') return given;
  const unit = parseUnit(given[1]);
  if (!unit.ok) throw new Error(unit.message);
  return toSi(given[0], unit.unit);
}

const YEAR = 31_557_600;
const LIGHT = 299_792_458;
const LEAD = { mu_rho: 0.007102, rho: 11350 };

/** Inputs of methods that no published check exercises, in SI. */
const OWN: Readonly<Record<string, Readonly<Record<string, number>>[]>> = {
  'rocket-equation': [{ I_sp: 6500, m_0: 120e3, m_p: 55e3 }],
  'propellant-for-delta-v': [{ dv: 38000, I_sp: 6500, m_f: 65e3 }],
  'propellant-load': [{ m_p: 55e3, f_r: 0.01, f_v: 0.02, f_b: 0 }],
  'relativistic-propellant': [
    { w: 0.35 * LIGHT, v: 0.3 * LIGHT, m_f: 100e3 },
    { w: LIGHT, v: 0.9 * LIGHT, m_f: 100e3, n: 2 },
  ],
  'electric-thrust': [{ P: 1e6, eta: 0.68, I_sp: 6500 }],
  'electric-thrust-exhaust-speed': [{ P: 1e6, eta: 0.68, v_e: 63743 }],
  'electric-thrusting-time': [{ P: 1e6, eta: 0.68, I_sp: 6500, m_p: 55e3 }],
  'relativistic-jet-power': [{ F: 1e5, v_e: 0.6 * LIGHT }],
  'specific-power': [{ P: 1e6, m: 20e3 }],
  'start-acceleration': [{ F: 21.3, m: 120e3 }],
  'radiator-heat-rejection': [{ A: 139, eps: 0.88, T_r: 812, T_s: 200, eta_f: 0.95 }],
  'radiator-convex-envelope': [{ A_f: 1, A_c: 4, eps: 0.9, T_r: 800, T_s: 100 }],
  'implied-efficiency': [{ P: 7.7e11, Q: 9.74e9 }],
  'annihilation-power': [{ m: 142e3, t: 2 * YEAR, f_g: 0.38, f_abs: 0.01 }],
  'gamma-transmission': [{ ...LEAD, x: 0.05, B: 2 }],
  'gamma-shield': [{ ...LEAD, K: 1e4, A: 12, B: 3 }],
  'mixture-attenuation': [{ rho: 3000, w_1: 0.6, mu_rho_1: 0.0071, w_2: 0.4, mu_rho_2: 0.0063 }],
  'interstellar-heating': [{ v: 0.3 * LIGHT, n: 2e5, f_d: 0.01, eps: 0.8 }],
  'dust-impact': [{ v: 0.3 * LIGHT, d: 1e-6, rho: 2500, n_d: 1e-6, A: 700 }],
  'accelerate-over-distance': [{ a: 9.80665, x: 1e16 }],
  'trip-with-cruise': [
    { a: 9.80665, d: 4e16, v_m: 0.2 * LIGHT },
    { a: 0.01, d: 1e13, v_m: 0.5 * LIGHT },
  ],
  'integrated-efficiency': [{ R: 3 }, { R: 1 }],
  'relativistic-integrated-efficiency': [{ v_e: LIGHT, R: 2 }],
  'power-limited-payload': [{ dv: 2000, C: 14000, t: 8640000, eta: 0.7, a_s: 0.05 }],
  'thruster-efficiency': [{ F: 0.236, v_e: 41100, P: 6900 }],
  'heat-engine-radiator': [{ P: 1e6, T_h: 1400, T_r: 812, T_s: 200, eps: 0.88, k: 0.6 }],
  'nozzle-performance': [{ p_c: 7e6, p_e: 5e3, T_c: 2700, k: 1.3, M: 0.002016, eta_n: 0.97 }],
  'heat-sink-cooling': [{ m: 500, c_p: 900, A: 10, eps: 0.85, T_1: 1200, T_2: 600, T_s: 7 }],
  'heat-sink-warming': [{ m: 500, c_p: 900, A: 10, eps: 0.85, Q: 5e5, T_1: 300, T_2: 900, T_s: 100 }],
  'heat-sink-storage': [{ m: 50, c_p: 900, T_1: 300, T_2: 900, Q: 1e3, m_L: 20, L: 4e5 }],
  'fusion-energy-d-d-p': [{ m: 3 }],
  'fuel-specific-energy': [{ Q: 8.7 * 1.602176634e-13, m_1: 1.6726e-27, m_2: 1.82767e-26 }],
  'light-pressure': [{ S: 1361, A: 900, r: 0.85, theta: 0.4, eps_f: 0.05, eps_b: 0.6 }],
  'beamed-sail': [{ P: 6.5e10, m: 1000, r: 0.8, alpha: 0.1, v: 0.1 * LIGHT }],
  'beam-diffraction': [{ lambda: 1e-6, L: 4e13, D: 1e6 }],
  'acceleration-distance': [{ v: 2e6, a: 0.36 }],
  'irradiance-at-distance': [{ d: 1.4959787e11 }],
  'bielliptic-transfer': [{ mu: 3.986e14, r_1: 7e6, r_b: 2.1e8, r_2: 1.05e8, R_b: 6378137 }],
  'edelbaum-transfer': [{ mu: 3.986e14, a_0: 7e6, a_f: 4.2e7, di: 2.5, f: 1e-4 }],
  'plane-change': [{ v_1: 1600, v_2: 3070, di: 0.5 }],
  'plane-angle': [{ i_1: 0.9, i_2: 0.4, dO: 1.1 }],
  'circular-orbit': [{ mu: 3.986e14, r: 7e6 }],
  'boil-off': [{ Q_l: 30, h_fg: 446e3, m: 20e3, t: 8.64e6 }],
  'performance-factor-tank': [{ p: 1e7, f_b: 1.5, V: 2, phi_t: 14e3 }],
  'spherical-tank': [{ p: 3e5, V: 100, rho: 2700, s: 2e8, e_w: 0.9, k_f: 1.2 }],
  'allowable-stress': [{ s_u: 4.5e8, f_u: 1.4, s_y: 4e8, f_y: 1.1 }],
  'cylinder-buckling': [
    { a: 1, l: 2, t: 0.004, E: 7e10 },
    { a: 1, l: 200, t: 0.004, E: 7e10 },
  ],
  'sphere-buckling': [{ a: 1, t: 0.003, E: 7e10 }],
  'axial-buckling': [{ a: 1, l: 2, t: 0.004, E: 7e10, p: 2e5 }],
  'delta-v-with-losses': [{ dv_i: 7800, dv_g: 1200, dv_d: 150, dv_s: 50, f: 0.02 }],
  'staged-rocket': [
    { m_pl: 5e3, m_p_1: 1e5, m_s_1: 8e3, v_e_1: 2900, m_p_2: 2e4, m_s_2: 2e3, v_e_2: 4400 },
    { m_pl: 5e3, m_p_1: 1e5, m_s_1: 8e3, v_e_1: 2900 },
  ],
  'exhaust-with-losses': [
    { e_j: 0.6, r_j: 0.2, eta_n: 0.9 },
    { e_j: 1, r_j: 0, eta_n: 1 },
  ],
};

function collect(): Record<string, Readonly<Record<string, number>>[]> {
  const examples: Record<string, Readonly<Record<string, number>>[]> = {};
  for (const [method, given] of Object.entries(OWN)) examples[method] = [...given];
  for (const check of METHOD_CHECKS) {
    const inputs = Object.fromEntries(Object.entries(check.inputs).map(([name, given]) => [name, si(given)]));
    (examples[check.method] ??= []).push(inputs);
  }
  return examples;
}

/** Inputs for each method, in SI, by which its proof lines are compared with its computation. */
export const EXAMPLES: Readonly<Record<string, readonly Readonly<Record<string, number>>[]>> = collect();
