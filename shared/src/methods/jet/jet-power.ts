import { EXHAUST_SPEED, EXTENT, MASS_OR_NONE, THRUST } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { FAST, ROCKETS } from '../vocabulary';

const thrust = { tex: 'F', label: 'thrust', unit: 'N', bounds: THRUST };
const exhaustSpeed = { tex: 'v_e', label: 'exhaust speed', unit: 'km/s', bounds: EXHAUST_SPEED };

/** Jet power (W) and mass flow (kg/s) from thrust (N) and exhaust speed (m/s), classical. Sutton & Biblarz ch. 2. */
export const jetPower: Method = defineMethod({
  id: 'jet-power',
  version: '1.0.0',
  family: 'M5',
  name: 'Jet power from thrust',
  summary: 'Power in the jet and mass flow that a thrust needs at a given exhaust speed.',
  equation: 'P_j = \\tfrac12 F v_e',
  inputs: { F: thrust, v_e: exhaustSpeed },
  outputs: {
    P_j: { tex: 'P_j', label: 'jet power', unit: 'MW' },
    mdot: { tex: '\\dot m', label: 'mass flow', unit: 'kg/s' },
  },
  proof: [line('P_j', 'P_j', 'F * v_e / 2', 'W'), line('mdot', '\\dot m', 'F / v_e', 'kg/s')],
  validity: 'Uniform exhaust speed far below c.',
  reference: 'G. P. Sutton and O. Biblarz, Rocket Propulsion Elements, ch. 2 (from memory).',
  cautions: [],
  concepts: ROCKETS,
  checks: ['M5-01'],
  solve({ F, v_e }, { warn }) {
    if (v_e > 0.1 * c) warn('The exhaust speed is above 0.1 c; use the relativistic jet.');
    return { P_j: (F * v_e) / 2, mdot: F / v_e };
  },
});

/** Jet power (W), ship frame, from thrust (N) and particle exhaust speed (m/s) up to c. Energy and momentum of the exhaust. */
export const relativisticJetPower: Method = defineMethod({
  id: 'relativistic-jet-power',
  version: '1.0.0',
  family: 'M5',
  name: 'Relativistic jet power from thrust',
  summary: 'Kinetic power in the ship frame of a jet of any speed up to that of light.',
  equation: 'P_j = \\frac{\\gamma_e}{\\gamma_e + 1} F v_e',
  inputs: { F: thrust, v_e: { ...exhaustSpeed, label: 'speed of the exhaust particles', unit: 'c' } },
  outputs: { P_j: { tex: 'P_j', label: 'jet power', unit: 'GW' } },
  proof: [line('P_j', 'P_j', 'F * v_e / (1 + sqrt(1 - (v_e / c)^2))', 'W')],
  constants: constantIds('c'),
  validity: 'One exhaust speed, momentum along the axis; at c the jet is light and the power is F c.',
  reference: 'Energy and momentum of a relativistic jet; second route by its limits F v_e/2 and F c.',
  cautions: ['Kinetic power only; the rest mass that leaves with the jet is counted in the mass flow, not here.'],
  concepts: FAST,
  checks: [],
  solve({ F, v_e }) {
    const beta = v_e / c;
    return { P_j: (F * v_e) / (1 + Math.sqrt((1 - beta) * (1 + beta))) };
  },
});

/** Thrust (N) of a beam of light carrying power P (W) off the ship: P/c. */
export const photonThrust: Method = defineMethod({
  id: 'photon-thrust',
  version: '1.0.0',
  family: 'M5',
  name: 'Photon thrust',
  summary: 'Thrust of light sent off along the axis: about 300 MW for one newton.',
  equation: 'F = P/c',
  inputs: { P: { tex: 'P', label: 'power sent off as a collimated beam', unit: 'MW', bounds: EXTENT } },
  outputs: { F: { tex: 'F', label: 'thrust', unit: 'N' } },
  proof: [line('F', 'F', 'P / c', 'N')],
  constants: constantIds('c'),
  validity: 'Perfect collimation along the axis.',
  reference: 'Momentum of light; the 300 MW per newton rule is common practice, from memory.',
  cautions: [],
  concepts: FAST,
  checks: ['M5-09'],
  solve: ({ P }) => ({ F: P / c }),
});

/** Thrust (N) and jet power (W) from mass flow (kg/s) and exhaust speed (m/s); burn time (s) of a propellant mass (kg). */
export const massFlowThrust: Method = defineMethod({
  id: 'mass-flow-thrust',
  version: '1.0.0',
  family: 'M5',
  name: 'Thrust from mass flow',
  summary: 'Thrust, jet power and burn time from mass flow and effective exhaust speed.',
  equation: 'F = \\dot m\\, v_e',
  inputs: {
    mdot: { tex: '\\dot m', label: 'mass flow', unit: 'kg/s', bounds: EXTENT },
    v_e: { ...exhaustSpeed, label: 'effective exhaust speed' },
    m_p: { tex: 'm_p', label: 'propellant mass spent', unit: 't', bounds: MASS_OR_NONE, default: 0 },
  },
  outputs: {
    F: { tex: 'F', label: 'thrust', unit: 'N' },
    P_j: { tex: 'P_j', label: 'jet power', unit: 'MW' },
    t: { tex: 't', label: 'burn time', unit: 's' },
  },
  proof: [line('F', 'F', 'mdot * v_e', 'N'), line('P_j', 'P_j', 'F * v_e / 2', 'W'), line('t', 't', 'm_p / mdot', 's')],
  validity: 'Constant mass flow; exhaust speed far below c.',
  reference: 'G. P. Sutton and O. Biblarz, Rocket Propulsion Elements, ch. 2 (from memory).',
  cautions: [],
  concepts: ROCKETS,
  checks: ['M5-10'],
  solve({ mdot, v_e, m_p }, { warn }) {
    if (v_e > 0.1 * c) warn('The exhaust speed is above 0.1 c; use the relativistic jet.');
    return { F: mdot * v_e, P_j: (mdot * v_e ** 2) / 2, t: m_p / mdot };
  },
});
