import { constantIds, g_0, R_gas } from '../constants';
import { defineMethod, line, refuse, show } from '../define';
import type { Method } from '../types';
import { CHEMICAL, NUCLEAR_THERMAL } from '../vocabulary';
import {
  NOZZLE_REFERENCE,
  NOZZLE_VALIDITY,
  areaRatio,
  chamberPressure,
  chamberTemperature,
  exitPressure,
  heatRatio,
  machFromPressures,
  molarMass,
  pressureRatio,
} from './perfect-gas';

const CONCEPTS = [CHEMICAL, NUCLEAR_THERMAL];
const machLine = line('Ma', 'M_e', 'sqrt(2 / (k - 1) * ((p_c / p_e)^((k - 1) / k) - 1))', '1');
const areaLine = line(
  'eps',
  '\\epsilon',
  '(2 / (k + 1) * (1 + (k - 1) / 2 * Ma^2))^((k + 1) / (2 * (k - 1))) / Ma',
  '1',
);

function pressuresReversed(p_c: number, p_e: number) {
  return refuse(
    'p_e',
    `The exit pressure ${show(p_e, 'kPa')} is not below the chamber pressure ${show(p_c, 'kPa')}; a nozzle expands.`,
  );
}

/** Exhaust speed (m/s) of an ideal nozzle between two pressures (Pa). Sutton & Biblarz eq. 3-16. */
export const nozzleExhaustSpeed: Method = defineMethod({
  id: 'nozzle-exhaust-speed',
  version: '1.0.0',
  family: 'M6',
  name: 'Ideal nozzle exhaust speed',
  summary: 'Exhaust speed of a hot gas that expands through an ideal nozzle, and its limit for a full expansion.',
  equation:
    'v_e = \\sqrt{\\frac{2\\gamma}{\\gamma - 1}\\frac{R T_c}{M}\\left[1 - \\left(\\frac{p_e}{p_c}\\right)^{(\\gamma-1)/\\gamma}\\right]}',
  inputs: { p_c: chamberPressure, p_e: exitPressure, T_c: chamberTemperature, k: heatRatio, M: molarMass },
  outputs: {
    R_s: { tex: 'R_s', label: 'specific gas constant', unit: 'J/(kg K)' },
    v_e: { tex: 'v_e', label: 'exhaust speed', unit: 'km/s' },
    I_sp: { tex: 'I_{sp}', label: 'specific impulse at matched ambient pressure', unit: 's' },
    I_max: { tex: 'I_{max}', label: 'specific impulse of a full expansion', unit: 's' },
  },
  proof: [
    line('R_s', 'R_s', 'R_gas / M', 'J/(kg K)'),
    line('v_max', 'v_{max}', 'sqrt(2 * k / (k - 1) * R_s * T_c)', 'm/s'),
    line('v_e', 'v_e', 'v_max * sqrt(1 - (p_e / p_c)^((k - 1) / k))', 'm/s'),
    line('I_sp', 'I_{sp}', 'v_e / g_0', 's'),
    line('I_max', 'I_{max}', 'v_max / g_0', 's'),
  ],
  constants: constantIds('R_gas', 'g_0'),
  validity: NOZZLE_VALIDITY,
  reference: NOZZLE_REFERENCE,
  cautions: ['Delivered specific impulse is lower: nozzle efficiency 0.96 to 0.98 is common practice.'],
  concepts: CONCEPTS,
  checks: ['M6-01', 'M6-07'],
  solve({ p_c, p_e, T_c, k, M }) {
    if (p_e >= p_c) return pressuresReversed(p_c, p_e);
    const R_s = R_gas / M;
    const v_max = Math.sqrt(((2 * k) / (k - 1)) * R_s * T_c);
    const v_e = v_max * Math.sqrt(-Math.expm1(((k - 1) / k) * Math.log(p_e / p_c)));
    return { R_s, v_e, I_sp: v_e / g_0, I_max: v_max / g_0 };
  },
});

/** Exit Mach number and area ratio of an ideal nozzle between two pressures (Pa). Sutton & Biblarz eq. 3-25. */
export const nozzleAreaRatio: Method = defineMethod({
  id: 'nozzle-area-ratio',
  version: '1.0.0',
  family: 'M6',
  name: 'Nozzle area ratio from pressures',
  summary: 'Exit Mach number and expansion area ratio that bring a gas from chamber to exit pressure.',
  equation:
    '\\epsilon = \\frac{1}{M_e}\\left[\\frac{2}{\\gamma+1}\\left(1 + \\frac{\\gamma-1}{2}M_e^2\\right)\\right]^{(\\gamma+1)/(2(\\gamma-1))}',
  inputs: { p_c: chamberPressure, p_e: exitPressure, k: heatRatio },
  outputs: {
    Ma: { tex: 'M_e', label: 'exit Mach number', unit: '1' },
    eps: { tex: '\\epsilon', label: 'area ratio', unit: '1' },
  },
  proof: [machLine, areaLine],
  validity: NOZZLE_VALIDITY,
  reference: NOZZLE_REFERENCE,
  cautions: [],
  concepts: CONCEPTS,
  checks: ['M6-03', 'M6-09'],
  solve({ p_c, p_e, k }, { warn }) {
    if (p_e >= p_c) return pressuresReversed(p_c, p_e);
    const Ma = machFromPressures(p_c, p_e, k);
    if (Ma < 1) warn('The exit is subsonic: at these pressures the nozzle has no diverging part.');
    return { Ma, eps: areaRatio(Ma, k) };
  },
});

/** Area, pressure and temperature ratios at a Mach number of isentropic flow. NACA Report 1135. */
export const isentropicFlow: Method = defineMethod({
  id: 'isentropic-flow',
  version: '1.0.0',
  family: 'M6',
  name: 'Isentropic flow at a Mach number',
  summary: 'Area over throat area, and static over chamber pressure and temperature, at a Mach number.',
  equation: '\\frac{p}{p_c} = \\left(1 + \\frac{\\gamma-1}{2}M^2\\right)^{-\\gamma/(\\gamma-1)}',
  inputs: {
    Ma: {
      tex: 'M_e',
      label: 'Mach number',
      unit: '1',
      bounds: { min: 0, minExclusive: true, reason: 'gas at rest has no area ratio' },
    },
    k: heatRatio,
  },
  outputs: {
    eps: { tex: '\\epsilon', label: 'area ratio', unit: '1' },
    r_p: { tex: 'p/p_c', label: 'static over chamber pressure', unit: '1' },
    r_T: { tex: 'T/T_c', label: 'static over chamber temperature', unit: '1' },
  },
  proof: [
    areaLine,
    line('r_T', 'T/T_c', '1 / (1 + (k - 1) / 2 * Ma^2)', '1'),
    line('r_p', 'p/p_c', 'r_T^(k / (k - 1))', '1'),
  ],
  validity: NOZZLE_VALIDITY,
  reference: NOZZLE_REFERENCE,
  cautions: [],
  concepts: CONCEPTS,
  checks: ['M6-11'],
  solve: ({ Ma, k }) => ({ eps: areaRatio(Ma, k), r_p: pressureRatio(Ma, k), r_T: 1 / (1 + ((k - 1) / 2) * Ma ** 2) }),
});
