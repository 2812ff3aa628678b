import { MASS_OR_NONE, PROBABILITY } from '../bounds';
import { defineMethod, line, refuse } from '../define';
import type { Method } from '../types';
import { ROCKETS } from '../vocabulary';

function share(tex: string, label: string) {
  return { tex, label, unit: '%', bounds: { ...PROBABILITY, reason: 'a share of the loaded mass' }, default: 0 };
}

/** Propellant to load (kg): usable propellant plus residual, reserve and boil-off shares of the load. */
export const propellantLoad: Method = defineMethod({
  id: 'propellant-load',
  version: '1.0.0',
  family: 'M1',
  name: 'Propellant to load',
  summary: 'Loaded propellant from the usable propellant, with shares of the load for residual, reserve and boil-off.',
  equation: 'm_{load} = \\frac{m_p}{1 - f_r - f_v - f_b}',
  inputs: {
    m_p: { tex: 'm_p', label: 'usable propellant mass', unit: 't', bounds: MASS_OR_NONE },
    f_r: share('f_r', 'residual share of the load'),
    f_v: share('f_v', 'reserve share of the load'),
    f_b: share('f_b', 'boil-off share of the load'),
  },
  outputs: {
    m_load: { tex: 'm_{load}', label: 'loaded propellant mass', unit: 't' },
    m_un: { tex: 'm_{un}', label: 'propellant not used', unit: 't' },
  },
  proof: [
    line('m_load', 'm_{load}', 'm_p / (1 - f_r - f_v - f_b)', 'kg'),
    line('m_un', 'm_{un}', 'm_load * (f_r + f_v + f_b)', 'kg'),
  ],
  validity: 'All three shares refer to the loaded mass.',
  reference: 'Mass balance; names of the shares are common practice, no source.',
  cautions: [],
  concepts: ROCKETS,
  checks: [],
  solve({ m_p, f_r, f_v, f_b }) {
    const unused = f_r + f_v + f_b;
    if (unused >= 1)
      return refuse(
        'f_r',
        'Residual, reserve and boil-off shares add up to the whole load; their sum must be below 1.',
      );
    const m_load = m_p / (1 - f_r - f_v - f_b);
    return { m_load, m_un: m_load * unused };
  },
});
