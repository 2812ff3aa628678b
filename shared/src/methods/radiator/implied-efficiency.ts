import { EXTENT } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { EVERY } from '../vocabulary';

/** Largest share of a power (W) that may stay on board as heat when radiators reject Q (W): Q/P, and 1 − Q/P. */
export const impliedEfficiency: Method = defineMethod({
  id: 'implied-efficiency',
  version: '1.0.0',
  family: 'M7',
  name: 'Efficiency implied by the radiators',
  summary:
    'Share of a power that the radiators can reject, as 1 part in N, and the least share the drive must send off.',
  equation: 'N = \\frac{P}{Q},\\quad \\eta \\ge 1 - \\frac{Q}{P}',
  inputs: {
    P: { tex: 'P', label: 'power released or absorbed', unit: 'GW', bounds: EXTENT },
    Q: { tex: 'Q', label: 'heat the radiators can reject', unit: 'GW', bounds: EXTENT },
  },
  outputs: {
    s: { tex: 's', label: 'share that the radiators can reject', unit: '1' },
    N: { tex: 'N', label: 'power over rejected heat (1 part in N)', unit: '1' },
    eta: { tex: '\\eta', label: 'least share that must leave the ship', unit: '1' },
  },
  proof: [line('s', 's', 'Q / P', '1'), line('N', 'N', 'P / Q', '1'), line('eta', '\\eta', 'max(0, 1 - Q / P)', '1')],
  validity: 'Steady state: what stays on board as heat has to be rejected; no heat sink.',
  reference: 'Energy balance.',
  cautions: ['An efficiency required below the implied one does not close, whatever the engine.'],
  concepts: EVERY,
  checks: [],
  solve({ P, Q }, { warn }) {
    if (Q >= P) warn('The radiators can reject the whole power; they imply no efficiency.');
    return { s: Q / P, N: P / Q, eta: Math.max(0, 1 - Q / P) };
  },
});
