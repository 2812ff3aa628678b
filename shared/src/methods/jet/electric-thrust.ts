import { EFFICIENCY_ABOVE_ZERO, EXHAUST_SPEED, EXTENT, MASS_OR_NONE, SPECIFIC_IMPULSE } from '../bounds';
import { c, constantIds, g_0 } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { ELECTRIC } from '../vocabulary';

const VALIDITY =
  'Constant power and efficiency; exhaust speed far below c; power counted at the input of the thruster chain.';
const REFERENCE =
  'R. G. Jahn, Physics of Electric Propulsion, 1968, ch. 1; P. Lozano, MIT 16.522 notes, eqs. 3-5 to 3-13 (both from memory).';
const POWER_CAUTION =
  'State with the power where it is measured: bus, thruster input or jet. The efficiency must cover the same chain.';

const power = { tex: 'P', label: 'electric power to the thrusters', unit: 'MW', bounds: EXTENT };
const efficiency = { tex: '\\eta', label: 'thruster total efficiency', unit: '1', bounds: EFFICIENCY_ABOVE_ZERO };
const impulse = { tex: 'I_{sp}', label: 'specific impulse', unit: 's', bounds: SPECIFIC_IMPULSE };
const exhaustSpeed = { tex: 'v_e', label: 'effective exhaust speed', unit: 'km/s' };
const jetResults = {
  P_j: { tex: 'P_j', label: 'jet power', unit: 'MW' },
  F: { tex: 'F', label: 'thrust', unit: 'N' },
  mdot: { tex: '\\dot m', label: 'mass flow', unit: 'kg/s' },
};
const exhaustLine = line('v_e', 'v_e', 'I_sp * g_0', 'm/s');
const jetLines = [
  line('P_j', 'P_j', 'eta * P', 'W'),
  line('F', 'F', '2 * P_j / v_e', 'N'),
  line('mdot', '\\dot m', 'F / v_e', 'kg/s'),
];

function jet(P: number, eta: number, v_e: number, warn: (text: string) => void) {
  if (v_e > 0.1 * c) warn('The exhaust speed is above 0.1 c; use the relativistic jet.');
  const P_j = eta * P;
  const F = (2 * P_j) / v_e;
  return { P_j, F, mdot: F / v_e };
}

/** Thrust (N) and mass flow (kg/s) from electric power (W), efficiency and specific impulse (s). Jahn 1968. */
export const electricThrust: Method = defineMethod({
  id: 'electric-thrust',
  version: '1.0.0',
  family: 'M5',
  name: 'Thrust from electric power and specific impulse',
  summary: 'Thrust, jet power and mass flow of thrusters that turn electric power into a jet.',
  equation: 'F = \\frac{2\\,\\eta P}{I_{sp}\\, g_0}',
  inputs: { P: power, eta: efficiency, I_sp: impulse },
  outputs: { v_e: exhaustSpeed, ...jetResults },
  proof: [exhaustLine, ...jetLines],
  constants: constantIds('g_0'),
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [POWER_CAUTION],
  concepts: ELECTRIC,
  checks: [],
  solve: ({ P, eta, I_sp }, { warn }) => ({ v_e: I_sp * g_0, ...jet(P, eta, I_sp * g_0, warn) }),
});

/** Thrust (N) and mass flow (kg/s) from electric power (W), efficiency and exhaust speed (m/s). Jahn 1968. */
export const electricThrustExhaustSpeed: Method = defineMethod({
  id: 'electric-thrust-exhaust-speed',
  version: '1.0.0',
  family: 'M5',
  name: 'Thrust from electric power and exhaust speed',
  summary: 'Thrust, jet power and mass flow of thrusters from power, efficiency and effective exhaust speed.',
  equation: 'F = \\frac{2\\,\\eta P}{v_e}',
  inputs: { P: power, eta: efficiency, v_e: { ...exhaustSpeed, bounds: EXHAUST_SPEED } },
  outputs: jetResults,
  proof: jetLines,
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [POWER_CAUTION],
  concepts: ELECTRIC,
  checks: [],
  solve: ({ P, eta, v_e }, { warn }) => jet(P, eta, v_e, warn),
});

/** Time under thrust (s) that spends a propellant mass (kg) at constant electric power (W). Jahn 1968. */
export const electricThrustingTime: Method = defineMethod({
  id: 'electric-thrusting-time',
  version: '1.0.0',
  family: 'M5',
  name: 'Thrusting time from electric power',
  summary: 'Time under thrust that spends a propellant mass at constant electric power.',
  equation: 't = \\frac{m_p (I_{sp}\\, g_0)^2}{2\\,\\eta P}',
  inputs: {
    P: power,
    eta: efficiency,
    I_sp: impulse,
    m_p: { tex: 'm_p', label: 'propellant mass spent', unit: 't', bounds: MASS_OR_NONE },
  },
  outputs: { v_e: exhaustSpeed, ...jetResults, t: { tex: 't', label: 'thrusting time', unit: 'yr' } },
  proof: [exhaustLine, ...jetLines, line('t', 't', 'm_p / mdot', 's')],
  constants: constantIds('g_0'),
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [POWER_CAUTION],
  concepts: ELECTRIC,
  checks: [],
  solve({ P, eta, I_sp, m_p }, { warn }) {
    const v_e = I_sp * g_0;
    const flow = jet(P, eta, v_e, warn);
    return { v_e, ...flow, t: m_p / flow.mdot };
  },
});
