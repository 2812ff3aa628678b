import { EXHAUST_SPEED, MASS, MASS_OR_NONE, SPECIFIC_IMPULSE } from '../bounds';
import { c, constantIds, g_0 } from '../constants';
import { defineMethod, line, refuse, show } from '../define';
import type { Method } from '../types';
import { ROCKETS } from '../vocabulary';

const VALIDITY =
  'Constant exhaust speed, no external force, exhaust speed and delta-v far below c: the relative error is about (delta-v/c)².';
const REFERENCE =
  'K. E. Tsiolkovsky, 1903; G. P. Sutton and O. Biblarz, Rocket Propulsion Elements, ch. 4 (chapter from memory).';

const initialMass = { tex: 'm_0', label: 'initial mass', unit: 't', bounds: MASS };
const propellant = { tex: 'm_p', label: 'propellant mass expelled', unit: 't', bounds: MASS_OR_NONE };
const results = {
  m_f: { tex: 'm_f', label: 'final mass', unit: 't' },
  R: { tex: 'R', label: 'mass ratio', unit: '1' },
  dv: { tex: '\\Delta v', label: 'delta-v', unit: 'km/s' },
};
const massLines = [line('m_f', 'm_f', 'm_0 - m_p', 'kg'), line('R', 'R', 'm_0 / m_f', '1')];
const deltaVLine = line('dv', '\\Delta v', 'v_e * log(R)', 'm/s');

function propellantTooLarge(m_0: number, m_p: number) {
  return refuse(
    'm_p',
    `The propellant mass ${show(m_p, 't')} is not below the initial mass ${show(m_0, 't')}; the initial mass includes the propellant.`,
  );
}
function warnIfFast(dv: number, warn: (text: string) => void): void {
  if (dv > 0.1 * c) warn('The delta-v is above 0.1 c; use the relativistic rocket equation.');
}

/** Delta-v (m/s) from specific impulse and masses; refuses propellant that is not below the initial mass. Tsiolkovsky 1903. */
export const rocketEquation: Method = defineMethod({
  id: 'rocket-equation',
  version: '1.0.0',
  family: 'M1',
  name: 'Rocket equation from specific impulse',
  summary: 'Delta-v that a propellant load gives a vehicle of known initial mass.',
  equation: '\\Delta v = I_{sp}\\, g_0 \\ln\\frac{m_0}{m_0 - m_p}',
  inputs: {
    I_sp: { tex: 'I_{sp}', label: 'specific impulse', unit: 's', bounds: SPECIFIC_IMPULSE },
    m_0: initialMass,
    m_p: propellant,
  },
  outputs: { v_e: { tex: 'v_e', label: 'effective exhaust speed', unit: 'km/s' }, ...results },
  proof: [line('v_e', 'v_e', 'I_sp * g_0', 'm/s'), ...massLines, deltaVLine],
  constants: constantIds('g_0'),
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [],
  concepts: ROCKETS,
  checks: [],
  solve({ I_sp, m_0, m_p }, { warn }) {
    if (m_p >= m_0) return propellantTooLarge(m_0, m_p);
    const v_e = I_sp * g_0;
    const dv = -v_e * Math.log1p(-m_p / m_0);
    warnIfFast(dv, warn);
    return { v_e, m_f: m_0 - m_p, R: m_0 / (m_0 - m_p), dv };
  },
});

/** Delta-v (m/s) from exhaust speed and masses; refuses propellant that is not below the initial mass. Tsiolkovsky 1903. */
export const rocketEquationExhaustSpeed: Method = defineMethod({
  id: 'rocket-equation-exhaust-speed',
  version: '1.0.0',
  family: 'M1',
  name: 'Rocket equation from exhaust speed',
  summary: 'Delta-v that a propellant load gives a vehicle of known initial mass, from the effective exhaust speed.',
  equation: '\\Delta v = v_e \\ln\\frac{m_0}{m_0 - m_p}',
  inputs: {
    v_e: { tex: 'v_e', label: 'effective exhaust speed', unit: 'km/s', bounds: EXHAUST_SPEED },
    m_0: initialMass,
    m_p: propellant,
  },
  outputs: results,
  proof: [...massLines, deltaVLine],
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [],
  concepts: ROCKETS,
  checks: ['M1-01', 'M1-06', 'M1-07'],
  solve({ v_e, m_0, m_p }, { warn }) {
    if (m_p >= m_0) return propellantTooLarge(m_0, m_p);
    const dv = -v_e * Math.log1p(-m_p / m_0);
    warnIfFast(dv, warn);
    return { m_f: m_0 - m_p, R: m_0 / (m_0 - m_p), dv };
  },
});
