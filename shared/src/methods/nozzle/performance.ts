import { EFFICIENCY_ABOVE_ZERO, EXTENT } from '../bounds';
import { constantIds, g_0, R_gas } from '../constants';
import { defineMethod, line, refuse, show } from '../define';
import type { Method } from '../types';
import { CHEMICAL, NUCLEAR_THERMAL } from '../vocabulary';
import {
  NOZZLE_REFERENCE,
  NOZZLE_VALIDITY,
  ambientPressure,
  areaRatio,
  chamberPressure,
  chamberTemperature,
  criticalPressureRatio,
  exitPressure,
  flowFunction,
  heatRatio,
  machFromPressures,
  molarMass,
  momentumCoefficient,
  pressureRatio,
  separationWarning,
  supersonicMach,
} from './perfect-gas';

const CONCEPTS = [CHEMICAL, NUCLEAR_THERMAL];
const nozzleEfficiency = {
  tex: '\\eta_n',
  label: 'nozzle efficiency',
  unit: '1',
  bounds: EFFICIENCY_ABOVE_ZERO,
  default: 1,
};
const results = {
  c_star: { tex: 'c^*', label: 'characteristic velocity', unit: 'm/s' },
  C_F: { tex: 'C_F', label: 'thrust coefficient', unit: '1' },
  I_sp: { tex: 'I_{sp}', label: 'specific impulse', unit: 's' },
};
const flowLine = line('Gamma', '\\Gamma', 'sqrt(k) * (2 / (k + 1))^((k + 1) / (2 * (k - 1)))', '1');
const starLine = line('c_star', 'c^*', 'sqrt(R_gas / M * T_c) / Gamma', 'm/s');

function notChoked(p_c: number, p_a: number) {
  return refuse(
    'p_a',
    `The ambient pressure ${show(p_a, 'kPa')} is too high for a choked throat at a chamber pressure of ${show(p_c, 'kPa')}.`,
  );
}

/** Characteristic velocity (m/s) and throat area (m²) for a mass flow (kg/s). Sutton & Biblarz ch. 3. */
export const nozzleThroat: Method = defineMethod({
  id: 'nozzle-throat',
  version: '1.0.0',
  family: 'M6',
  name: 'Characteristic velocity and throat area',
  summary: 'Characteristic velocity of a hot gas and the throat area that passes a mass flow at a chamber pressure.',
  equation: 'c^* = \\frac{\\sqrt{R T_c/M}}{\\Gamma(\\gamma)},\\quad A_t = \\frac{\\dot m\\, c^*}{p_c}',
  inputs: {
    T_c: chamberTemperature,
    k: heatRatio,
    M: molarMass,
    p_c: chamberPressure,
    mdot: { tex: '\\dot m', label: 'mass flow', unit: 'kg/s', bounds: EXTENT },
  },
  outputs: { c_star: results.c_star, A_t: { tex: 'A_t', label: 'throat area', unit: 'm^2' } },
  proof: [flowLine, starLine, line('A_t', 'A_t', 'mdot * c_star / p_c', 'm^2')],
  constants: constantIds('R_gas'),
  validity: NOZZLE_VALIDITY,
  reference: NOZZLE_REFERENCE,
  cautions: [],
  concepts: CONCEPTS,
  checks: ['M6-05', 'M6-08'],
  solve({ T_c, k, M, p_c, mdot }) {
    const c_star = Math.sqrt((R_gas / M) * T_c) / flowFunction(k);
    return { c_star, A_t: (mdot * c_star) / p_c };
  },
});

/** Specific impulse (s) and thrust coefficient of a nozzle with a given exit pressure (Pa). Sutton & Biblarz eq. 3-30. */
export const nozzlePerformance: Method = defineMethod({
  id: 'nozzle-performance',
  version: '1.0.0',
  family: 'M6',
  name: 'Nozzle performance from exit pressure',
  summary: 'Thrust coefficient and specific impulse of an ideal nozzle with a given exit pressure.',
  equation: 'I_{sp} = \\frac{\\eta_n C_F\\, c^*}{g_0}',
  inputs: {
    p_c: chamberPressure,
    p_e: exitPressure,
    T_c: chamberTemperature,
    k: heatRatio,
    M: molarMass,
    p_a: ambientPressure,
    eta_n: nozzleEfficiency,
  },
  outputs: {
    Ma: { tex: 'M_e', label: 'exit Mach number', unit: '1' },
    eps: { tex: '\\epsilon', label: 'area ratio', unit: '1' },
    ...results,
  },
  proof: [
    line('Ma', 'M_e', 'sqrt(2 / (k - 1) * ((p_c / p_e)^((k - 1) / k) - 1))', '1'),
    line('eps', '\\epsilon', '(2 / (k + 1) * (1 + (k - 1) / 2 * Ma^2))^((k + 1) / (2 * (k - 1))) / Ma', '1'),
    flowLine,
    starLine,
    line(
      'C_F',
      'C_F',
      'Gamma * sqrt(2 * k / (k - 1) * (1 - (p_e / p_c)^((k - 1) / k))) + (p_e - p_a) / p_c * eps',
      '1',
    ),
    line('I_sp', 'I_{sp}', 'eta_n * C_F * c_star / g_0', 's'),
  ],
  constants: constantIds('R_gas', 'g_0'),
  validity: NOZZLE_VALIDITY,
  reference: NOZZLE_REFERENCE,
  cautions: ['Nozzle efficiency 0.96 to 0.98 is common practice; 1 is the ideal nozzle.'],
  concepts: CONCEPTS,
  checks: ['M6-10'],
  solve({ p_c, p_e, T_c, k, M, p_a, eta_n }, { warn }) {
    if (p_e >= p_c) {
      return refuse(
        'p_e',
        `The exit pressure ${show(p_e, 'kPa')} is not below the chamber pressure ${show(p_c, 'kPa')}; a nozzle expands.`,
      );
    }
    if (p_a / p_c >= criticalPressureRatio(k)) return notChoked(p_c, p_a);
    const separation = separationWarning(p_e, p_a);
    if (separation) warn(separation);
    const Ma = machFromPressures(p_c, p_e, k);
    const eps = areaRatio(Ma, k);
    const c_star = Math.sqrt((R_gas / M) * T_c) / flowFunction(k);
    const C_F = momentumCoefficient(p_e / p_c, k) + ((p_e - p_a) / p_c) * eps;
    return { Ma, eps, c_star, C_F, I_sp: (eta_n * C_F * c_star) / g_0 };
  },
});

/** Specific impulse (s) and thrust coefficient of a nozzle with a given area ratio, by the supersonic root. */
export const nozzlePerformanceAreaRatio: Method = defineMethod({
  id: 'nozzle-performance-area-ratio',
  version: '1.0.0',
  family: 'M6',
  name: 'Nozzle performance from area ratio',
  summary: 'Exit state, thrust coefficient and specific impulse of an ideal nozzle with a given area ratio.',
  equation: 'I_{sp} = \\frac{\\eta_n C_F\\, c^*}{g_0},\\quad \\epsilon(M_e) = \\epsilon',
  inputs: {
    eps: {
      tex: '\\epsilon',
      label: 'area ratio',
      unit: '1',
      bounds: { min: 1, reason: 'the exit is no smaller than the throat' },
    },
    T_c: chamberTemperature,
    k: heatRatio,
    M: molarMass,
    p_c: chamberPressure,
    p_a: ambientPressure,
    eta_n: nozzleEfficiency,
  },
  outputs: {
    Ma: { tex: 'M_e', label: 'exit Mach number', unit: '1' },
    p_e: { tex: 'p_e', label: 'exit pressure', unit: 'kPa' },
    ...results,
  },
  validity: `${NOZZLE_VALIDITY} In vacuum the specific impulse does not depend on the chamber pressure.`,
  reference: NOZZLE_REFERENCE,
  cautions: ['Nozzle efficiency 0.96 to 0.98 is common practice; 1 is the ideal nozzle.'],
  concepts: CONCEPTS,
  checks: ['M6-13'],
  solve({ eps, T_c, k, M, p_c, p_a, eta_n }, { warn }) {
    if (p_a / p_c >= criticalPressureRatio(k)) return notChoked(p_c, p_a);
    const Ma = supersonicMach(eps, k);
    const p_e = p_c * pressureRatio(Ma, k);
    const separation = separationWarning(p_e, p_a);
    if (separation) warn(separation);
    const c_star = Math.sqrt((R_gas / M) * T_c) / flowFunction(k);
    const C_F = momentumCoefficient(p_e / p_c, k) + ((p_e - p_a) / p_c) * eps;
    return { Ma, p_e, c_star, C_F, I_sp: (eta_n * C_F * c_star) / g_0 };
  },
});
