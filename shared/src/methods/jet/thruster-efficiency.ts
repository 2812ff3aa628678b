import { EXHAUST_SPEED, EXTENT, THRUST } from '../bounds';
import { defineMethod, line, refuse } from '../define';
import type { Method } from '../types';
import { ELECTRIC } from '../vocabulary';

/** Thruster total efficiency from thrust (N), exhaust speed (m/s) and electric power (W); above 1 is refused. */
export const thrusterEfficiency: Method = defineMethod({
  id: 'thruster-efficiency',
  version: '1.0.0',
  family: 'M5',
  name: 'Thruster total efficiency',
  summary: 'Jet power over electric power; shows whether thrust, exhaust speed and power belong together.',
  equation: '\\eta = \\frac{F v_e}{2 P}',
  inputs: {
    F: { tex: 'F', label: 'thrust', unit: 'N', bounds: THRUST },
    v_e: { tex: 'v_e', label: 'effective exhaust speed', unit: 'km/s', bounds: EXHAUST_SPEED },
    P: { tex: 'P', label: 'electric power to the thruster', unit: 'kW', bounds: EXTENT },
  },
  outputs: { eta: { tex: '\\eta', label: 'thruster total efficiency', unit: '1' } },
  proof: [line('eta', '\\eta', 'F * v_e / (2 * P)', '1')],
  validity: 'Exhaust speed far below c; on-board power only, not for reflected beams.',
  reference: 'R. G. Jahn, Physics of Electric Propulsion, 1968, ch. 1 (from memory).',
  cautions: [],
  concepts: ELECTRIC,
  checks: [],
  solve({ F, v_e, P }) {
    const eta = (F * v_e) / (2 * P);
    if (eta > 1) {
      return refuse(
        'F',
        `Thrust, exhaust speed and power give an efficiency of ${eta.toPrecision(3)}; the jet cannot carry more power than goes in.`,
      );
    }
    return { eta };
  },
});
