import { EXTENT, MASS } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { EVERY } from '../vocabulary';

/** Specific power (W/kg) and specific mass (kg/W) of a power or propulsion system. */
export const specificPower: Method = defineMethod({
  id: 'specific-power',
  version: '1.0.0',
  family: 'M5',
  name: 'Specific power',
  summary: 'Power per mass of a power or propulsion system, and its inverse.',
  equation: '\\alpha = \\frac{P}{m}',
  inputs: {
    P: { tex: 'P', label: 'power', unit: 'kW', bounds: EXTENT },
    m: { tex: 'm', label: 'mass of the system that delivers it', unit: 'kg', bounds: MASS },
  },
  outputs: {
    alpha: { tex: '\\alpha', label: 'specific power', unit: 'W/kg' },
    a_s: { tex: 'a_s', label: 'specific mass', unit: 'kg/kW' },
  },
  proof: [line('alpha', '\\alpha', 'P / m', 'W/kg'), line('a_s', 'a_s', 'm / P', 'kg/W')],
  validity: 'Power and mass of the same boundary.',
  reference: 'Definition.',
  cautions: [
    'State whether the power is electric, thermal or jet power and whether the mass counts radiators and shielding.',
  ],
  concepts: EVERY,
  checks: [],
  solve: ({ P, m }) => ({ alpha: P / m, a_s: m / P }),
});
