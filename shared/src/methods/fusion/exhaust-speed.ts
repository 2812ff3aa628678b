import { BURN_FRACTION, EFFICIENCY, EFFICIENCY_ABOVE_ZERO, FUEL_SPECIFIC_ENERGY } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { FUSION, REACTOR_CAUTION } from '../vocabulary';

/** Exhaust speed (m/s) from fuel energy (J/kg), burn fraction, charged share, coupling and dilution; classical and relativistic. */
export const fusionExhaustSpeed: Method = defineMethod({
  id: 'fusion-exhaust-speed',
  version: '1.0.0',
  family: 'M10',
  name: 'Fusion exhaust speed',
  summary: 'Exhaust speed that the burned share of a fuel gives to all that is expelled.',
  equation:
    'v_e = \\sqrt{\\frac{2\\,\\eta f_c b\\, q}{1 + d}},\\quad w = c\\sqrt{2f - f^2},\\; f = \\frac{\\eta f_c b\\, q}{(1 + d) c^2}',
  inputs: {
    q: { tex: 'q', label: 'energy per mass of fuel', unit: 'J/kg', bounds: FUEL_SPECIFIC_ENERGY },
    b: { tex: 'b', label: 'burn fraction', unit: '1', bounds: BURN_FRACTION },
    f_c: { tex: 'f_c', label: 'share of the energy in charged products', unit: '1', bounds: EFFICIENCY, default: 1 },
    eta: { tex: '\\eta', label: 'nozzle and coupling efficiency', unit: '1', bounds: EFFICIENCY_ABOVE_ZERO },
    d: {
      tex: 'd',
      label: 'inert mass per fuel mass',
      unit: '1',
      bounds: { min: 0, reason: 'a ratio of masses; it may exceed 1' },
      default: 0,
    },
  },
  outputs: {
    f: { tex: 'f', label: 'share of the expelled mass that becomes jet energy', unit: '1' },
    v_e: { tex: 'v_e', label: 'exhaust speed, classical', unit: 'km/s' },
    w: { tex: 'w', label: 'effective exhaust speed, relativistic', unit: 'c' },
  },
  proof: [
    line('f', 'f', 'eta * f_c * b * q / ((1 + d) * c^2)', '1'),
    line('v_e', 'v_e', 'sqrt(2 * f) * c', 'm/s'),
    line('w', 'w', 'sqrt(f * (2 - f)) * c', 'm/s'),
  ],
  constants: constantIds('c'),
  validity:
    'Fully expanded exhaust. The relativistic speed holds when the unused energy stays with the exhaust; where it is lost as neutrons or X-rays use the exhaust with losses.',
  reference: 'Energy and momentum balance of the exhaust; Project Daedalus, JBIS supplement 1978 (from memory).',
  cautions: [REACTOR_CAUTION],
  concepts: [FUSION],
  checks: ['M10-10', 'M10-11', 'M10-13'],
  solve({ q, b, f_c, eta, d }, { warn }) {
    const f = (eta * f_c * b * q) / ((1 + d) * c ** 2);
    const v_e = Math.sqrt(2 * f) * c;
    if (v_e > 0.1 * c) warn('The classical exhaust speed is above 0.1 c; take the relativistic one.');
    return { f, v_e, w: Math.sqrt(f * (2 - f)) * c };
  },
});
