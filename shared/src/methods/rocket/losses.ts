import { DELTA_V, EXHAUST_SPEED, EXTENT, EXTENT_OR_NONE, MASS_RATIO } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { ROCKETS } from '../vocabulary';

const REFERENCE =
  'G. P. Sutton and O. Biblarz, Rocket Propulsion Elements, ch. 4 (from memory); closed form checked by integration.';

function loss(tex: string, label: string) {
  return { tex, label, unit: 'km/s', bounds: DELTA_V, default: 0 };
}

/** Speed (m/s) and height (m) at burnout of a vertical burn under constant gravity (m/s²). */
export const verticalBurn: Method = defineMethod({
  id: 'vertical-burn',
  version: '1.0.0',
  family: 'M1',
  name: 'Vertical burn with gravity loss',
  summary: 'Speed and height at the end of a vertical burn from rest, with the gravity loss taken off.',
  equation: 'v = v_e\\ln R - g t_b,\\quad x = v_e t_b\\left(1 - \\frac{\\ln R}{R - 1}\\right) - \\tfrac12 g t_b^2',
  inputs: {
    v_e: { tex: 'v_e', label: 'effective exhaust speed', unit: 'km/s', bounds: EXHAUST_SPEED },
    R: { tex: 'R', label: 'mass ratio', unit: '1', bounds: { ...MASS_RATIO, minExclusive: true } },
    t_b: { tex: 't_b', label: 'burn time', unit: 's', bounds: EXTENT },
    g: { tex: 'g', label: 'gravity', unit: 'm/s^2', bounds: EXTENT_OR_NONE },
  },
  outputs: {
    dv: { tex: '\\Delta v', label: 'ideal delta-v', unit: 'km/s' },
    dv_g: { tex: '\\Delta v_g', label: 'gravity loss', unit: 'km/s' },
    v: { tex: 'v', label: 'speed at burnout', unit: 'km/s' },
    x: { tex: 'x', label: 'height at burnout', unit: 'km' },
  },
  proof: [
    line('dv', '\\Delta v', 'v_e * log(R)', 'm/s'),
    line('dv_g', '\\Delta v_g', 'g * t_b', 'm/s'),
    line('v', 'v', 'dv - dv_g', 'm/s'),
    line('x', 'x', 't_b * (v_e - dv / (R - 1)) - g * t_b^2 / 2', 'm'),
  ],
  validity: 'Constant mass flow, exhaust speed and gravity; no drag; vertical flight.',
  reference: REFERENCE,
  cautions: [],
  concepts: ROCKETS,
  checks: ['M1-09'],
  solve({ v_e, R, t_b, g }, { warn }) {
    const dv = v_e * Math.log(R);
    const dv_g = g * t_b;
    if (dv_g > dv) warn('The gravity loss exceeds the ideal delta-v: the vehicle does not rise.');
    return { dv, dv_g, v: dv - dv_g, x: t_b * (v_e - dv / (R - 1)) - (g * t_b ** 2) / 2 };
  },
});

/** Delta-v to provide (m/s): the ideal one plus losses and margin. */
export const deltaVWithLosses: Method = defineMethod({
  id: 'delta-v-with-losses',
  version: '1.0.0',
  family: 'M1',
  name: 'Delta-v with losses',
  summary:
    'Delta-v that the propulsion has to provide: ideal demand plus gravity, drag and steering losses and margin.',
  equation: '\\Delta v = (\\Delta v_i + \\Delta v_g + \\Delta v_d + \\Delta v_s)(1 + f)',
  inputs: {
    dv_i: { tex: '\\Delta v_i', label: 'ideal delta-v', unit: 'km/s', bounds: DELTA_V },
    dv_g: loss('\\Delta v_g', 'gravity loss'),
    dv_d: loss('\\Delta v_d', 'drag loss'),
    dv_s: loss('\\Delta v_s', 'steering loss'),
    f: {
      tex: 'f',
      label: 'margin on the sum',
      unit: '%',
      bounds: { min: 0, reason: 'a margin adds to the demand' },
      default: 0,
    },
  },
  outputs: { dv: { tex: '\\Delta v', label: 'delta-v to provide', unit: 'km/s' } },
  proof: [line('dv', '\\Delta v', '(dv_i + dv_g + dv_d + dv_s) * (1 + f)', 'm/s')],
  validity: 'Losses of the same trajectory; margin applied once.',
  reference: 'Budget sum; names of the losses are common practice, no source.',
  cautions: [],
  concepts: ROCKETS,
  checks: [],
  solve: ({ dv_i, dv_g, dv_d, dv_s, f }) => ({ dv: (dv_i + dv_g + dv_d + dv_s) * (1 + f) }),
});
