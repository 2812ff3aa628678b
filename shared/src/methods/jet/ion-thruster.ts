import { EFFICIENCY_ABOVE_ZERO, EXTENT, MASS } from '../bounds';
import { c, constantIds, g_0, q_e } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { ELECTRIC } from '../vocabulary';

const beamVoltage = {
  tex: 'V',
  label: 'beam voltage',
  unit: 'V',
  bounds: { ...EXTENT, reason: 'ions are accelerated' },
};
const ionMass = { tex: 'm_i', label: 'ion mass', unit: 'u', bounds: MASS };
const VALIDITY = 'Singly charged ions unless stated, accelerated through the whole beam voltage; speed far below c.';
const REFERENCE =
  'D. M. Goebel and I. Katz, Fundamentals of Electric Propulsion, 2008, eqs. 2.3-8, 2.4-8, 2.5-7 (cited by the public library proptools).';

function ionSpeed(V: number, m_i: number): number {
  return Math.sqrt((2 * q_e * V) / m_i);
}

/** Thrust (N) and ion speed (m/s) of an electrostatic beam from voltage (V), current (A) and ion mass (kg). */
export const ionBeam: Method = defineMethod({
  id: 'ion-beam',
  version: '1.0.0',
  family: 'M5',
  name: 'Electrostatic ion beam',
  summary: 'Ion speed, thrust, mass flow and power of a beam of singly charged ions.',
  equation: 'v = \\sqrt{\\frac{2 e V}{m_i}},\\quad F = I\\sqrt{\\frac{2 m_i V}{e}}',
  inputs: {
    V: beamVoltage,
    I: { tex: 'I', label: 'beam current', unit: 'A', bounds: EXTENT },
    m_i: ionMass,
  },
  outputs: {
    v: { tex: 'v', label: 'ion speed', unit: 'km/s' },
    mdot: { tex: '\\dot m', label: 'ion mass flow', unit: 'kg/s' },
    F: { tex: 'F', label: 'thrust', unit: 'N' },
    P: { tex: 'P', label: 'beam power', unit: 'kW' },
  },
  proof: [
    line('v', 'v', 'sqrt(2 * q_e * V / m_i)', 'm/s'),
    line('mdot', '\\dot m', 'I * m_i / q_e', 'kg/s'),
    line('F', 'F', 'mdot * v', 'N'),
    line('P', 'P', 'V * I', 'W'),
  ],
  constants: constantIds('q_e'),
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [],
  concepts: ELECTRIC,
  checks: ['M5-04'],
  solve({ V, I, m_i }, { warn }) {
    const v = ionSpeed(V, m_i);
    if (v > 0.1 * c) warn('The ion speed is above 0.1 c; the classical relation does not hold.');
    const mdot = (I * m_i) / q_e;
    return { v, mdot, F: mdot * v, P: V * I };
  },
});

/** Specific impulse (s) and total efficiency of an ion thruster with divergence and doubly charged ions. Goebel & Katz. */
export const ionThruster: Method = defineMethod({
  id: 'ion-thruster',
  version: '1.0.0',
  family: 'M5',
  name: 'Ion thruster specific impulse',
  summary:
    'Specific impulse and efficiency of an ion thruster with beam divergence, double ions and unused propellant.',
  equation:
    'I_{sp} = \\frac{\\gamma_T\\,\\eta_m}{g_0}\\sqrt{\\frac{2 e V}{m_i}},\\quad \\eta_T = \\gamma_T^2\\,\\eta_e\\,\\eta_m',
  inputs: {
    V: beamVoltage,
    m_i: ionMass,
    theta: {
      tex: '\\theta',
      label: 'divergence half-angle',
      unit: 'deg',
      bounds: { min: 0, max: Math.PI / 2, maxExclusive: true, reason: 'a beam that diverges by 90° gives no thrust' },
      default: 0,
    },
    r_I: {
      tex: 'I^{++}/I^{+}',
      label: 'current of double over single ions',
      unit: '1',
      bounds: { min: 0, reason: 'a ratio of currents' },
      default: 0,
    },
    eta_m: { tex: '\\eta_m', label: 'mass utilisation', unit: '1', bounds: EFFICIENCY_ABOVE_ZERO },
    eta_e: { tex: '\\eta_e', label: 'electrical efficiency', unit: '1', bounds: EFFICIENCY_ABOVE_ZERO, default: 1 },
  },
  outputs: {
    gamma_T: { tex: '\\gamma_T', label: 'thrust correction', unit: '1' },
    v: { tex: 'v', label: 'ion speed', unit: 'km/s' },
    I_sp: { tex: 'I_{sp}', label: 'specific impulse', unit: 's' },
    eta_T: { tex: '\\eta_T', label: 'thruster total efficiency', unit: '1' },
  },
  proof: [
    line('gamma_T', '\\gamma_T', 'cos(theta) * (1 + r_I / sqrt(2)) / (1 + r_I)', '1'),
    line('v', 'v', 'sqrt(2 * q_e * V / m_i)', 'm/s'),
    line('I_sp', 'I_{sp}', 'gamma_T * eta_m * v / g_0', 's'),
    line('eta_T', '\\eta_T', 'gamma_T^2 * eta_e * eta_m', '1'),
  ],
  constants: constantIds('q_e', 'g_0'),
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: ['The correction for double ions belongs to thrust; it is not an energy correction.'],
  concepts: ELECTRIC,
  checks: ['M5-05'],
  solve({ V, m_i, theta, r_I, eta_m, eta_e }) {
    const gamma_T = (Math.cos(theta) * (1 + r_I * Math.SQRT1_2)) / (1 + r_I);
    const v = ionSpeed(V, m_i);
    return { gamma_T, v, I_sp: (gamma_T * eta_m * v) / g_0, eta_T: gamma_T ** 2 * eta_e * eta_m };
  },
});
