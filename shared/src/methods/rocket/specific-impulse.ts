import { EXTENT, THRUST } from '../bounds';
import { c, constantIds, g_0 } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { ROCKETS } from '../vocabulary';

/** Specific impulse (s) and exhaust speed (m/s) from thrust and mass flow. */
export const specificImpulse: Method = defineMethod({
  id: 'specific-impulse',
  version: '1.0.0',
  family: 'M1',
  name: 'Specific impulse from thrust and mass flow',
  summary: 'Effective exhaust speed and specific impulse of an engine of known thrust and mass flow.',
  equation: 'I_{sp} = \\frac{F}{\\dot m\\, g_0}',
  inputs: {
    F: { tex: 'F', label: 'thrust', unit: 'N', bounds: THRUST },
    mdot: { tex: '\\dot m', label: 'mass flow', unit: 'kg/s', bounds: EXTENT },
  },
  outputs: {
    v_e: { tex: 'v_e', label: 'effective exhaust speed', unit: 'km/s' },
    I_sp: { tex: 'I_{sp}', label: 'specific impulse', unit: 's' },
  },
  proof: [line('v_e', 'v_e', 'F / mdot', 'm/s'), line('I_sp', 'I_{sp}', 'v_e / g_0', 's')],
  constants: constantIds('g_0'),
  validity: 'Thrust and mass flow of the same operating point, all of the expelled mass counted.',
  reference: 'Definition; G. P. Sutton and O. Biblarz, Rocket Propulsion Elements, ch. 2 (chapter from memory).',
  cautions: [],
  concepts: ROCKETS,
  checks: ['M1-05'],
  solve({ F, mdot }, { warn }) {
    const v_e = F / mdot;
    if (v_e > c)
      warn('The exhaust speed comes out above the speed of light: thrust and mass flow do not belong together.');
    return { v_e, I_sp: v_e / g_0 };
  },
});
