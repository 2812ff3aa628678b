import { DELTA_V, EXHAUST_SPEED, MASS, SPECIFIC_IMPULSE } from '../bounds';
import { c, constantIds, g_0 } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { ROCKETS } from '../vocabulary';

const VALIDITY = 'Constant exhaust speed, no external force, delta-v far below c.';
const REFERENCE =
  'K. E. Tsiolkovsky, 1903; G. P. Sutton and O. Biblarz, Rocket Propulsion Elements, ch. 4 (chapter from memory).';

const deltaV = { tex: '\\Delta v', label: 'delta-v', unit: 'km/s', bounds: DELTA_V };
const finalMass = { tex: 'm_f', label: 'final mass', unit: 't', bounds: MASS };
const results = {
  m_p: { tex: 'm_p', label: 'propellant mass', unit: 't' },
  m_0: { tex: 'm_0', label: 'initial mass', unit: 't' },
  R: { tex: 'R', label: 'mass ratio', unit: '1' },
};
const lines = [
  line('R', 'R', 'exp(dv / v_e)', '1'),
  line('m_p', 'm_p', 'm_f * expm1(dv / v_e)', 'kg'),
  line('m_0', 'm_0', 'm_f + m_p', 'kg'),
];

function load(dv: number, v_e: number, m_f: number, warn: (text: string) => void) {
  if (dv > 0.1 * c) warn('The delta-v is above 0.1 c; use the relativistic rocket equation.');
  const m_p = m_f * Math.expm1(dv / v_e);
  return { m_p, m_0: m_f + m_p, R: Math.exp(dv / v_e) };
}

/** Propellant mass (kg) for a delta-v and a mass at its end, from specific impulse. Tsiolkovsky 1903. */
export const propellantForDeltaV: Method = defineMethod({
  id: 'propellant-for-delta-v',
  version: '1.0.0',
  family: 'M1',
  name: 'Propellant for a delta-v from specific impulse',
  summary: 'Propellant and initial mass that give a known final mass a delta-v.',
  equation: 'm_p = m_f\\left(e^{\\Delta v/(I_{sp} g_0)} - 1\\right)',
  inputs: {
    dv: deltaV,
    I_sp: { tex: 'I_{sp}', label: 'specific impulse', unit: 's', bounds: SPECIFIC_IMPULSE },
    m_f: finalMass,
  },
  outputs: { v_e: { tex: 'v_e', label: 'effective exhaust speed', unit: 'km/s' }, ...results },
  proof: [line('v_e', 'v_e', 'I_sp * g_0', 'm/s'), ...lines],
  constants: constantIds('g_0'),
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [],
  concepts: ROCKETS,
  checks: [],
  solve: ({ dv, I_sp, m_f }, { warn }) => ({ v_e: I_sp * g_0, ...load(dv, I_sp * g_0, m_f, warn) }),
});

/** Propellant mass (kg) for a delta-v and a mass at its end, from exhaust speed. Tsiolkovsky 1903. */
export const propellantForDeltaVExhaustSpeed: Method = defineMethod({
  id: 'propellant-for-delta-v-exhaust-speed',
  version: '1.0.0',
  family: 'M1',
  name: 'Propellant for a delta-v from exhaust speed',
  summary: 'Propellant and initial mass that give a known final mass a delta-v, from the effective exhaust speed.',
  equation: 'm_p = m_f\\left(e^{\\Delta v/v_e} - 1\\right)',
  inputs: {
    dv: deltaV,
    v_e: { tex: 'v_e', label: 'effective exhaust speed', unit: 'km/s', bounds: EXHAUST_SPEED },
    m_f: finalMass,
  },
  outputs: results,
  proof: lines,
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [],
  concepts: ROCKETS,
  checks: ['M1-02'],
  solve: ({ dv, v_e, m_f }, { warn }) => load(dv, v_e, m_f, warn),
});
