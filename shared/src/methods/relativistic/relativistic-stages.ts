import { EXHAUST_SPEED, MASS } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line, refuse, show } from '../define';
import type { Method } from '../types';
import { FAST } from '../vocabulary';

/** Final speed (m/s) of stages burned one after the other; their rapidities add. Ackeret 1946. */
export const relativisticStages: Method = defineMethod({
  id: 'relativistic-stages',
  version: '1.0.0',
  family: 'M2',
  name: 'Relativistic stages',
  summary: 'Speed of a vehicle whose stages burn one after the other, each with its own masses and exhaust speed.',
  equation: '\\phi = \\sum_i \\frac{w_i}{c}\\ln\\frac{m_{0,i}}{m_{f,i}},\\quad \\beta = \\tanh\\phi',
  inputs: {},
  group: {
    name: 'stages',
    label: 'stages, first to burn first',
    ports: {
      m_0: { tex: 'm_0', label: 'mass of the vehicle when the stage ignites', unit: 't', bounds: MASS },
      m_f: { tex: 'm_f', label: 'mass of the vehicle when the stage is spent', unit: 't', bounds: MASS },
      w: { tex: 'w', label: 'effective exhaust speed', unit: 'km/s', bounds: EXHAUST_SPEED },
    },
    atLeast: 1,
    atMost: 8,
  },
  outputs: {
    phi: { tex: '\\phi', label: 'rapidity', unit: '1' },
    beta: { tex: '\\beta', label: 'speed over c', unit: '1' },
    v: { tex: 'v', label: 'speed', unit: 'c' },
  },
  proofFor: (count) => [
    line(
      'phi',
      '\\phi',
      Array.from({ length: count }, (_, i) => `w_${i + 1} / c * log(m_0_${i + 1} / m_f_${i + 1})`).join(' + '),
      '1',
    ),
    line('beta', '\\beta', 'tanh(phi)', '1'),
    line('v', 'v', 'beta * c', 'm/s'),
  ],
  constants: constantIds('c'),
  validity: 'Special relativity; constant effective exhaust speed in each stage; no external force.',
  reference: 'J. Ackeret, Zur Theorie der Raketen, Helvetica Physica Acta 19 (1946) 103.',
  cautions: [],
  concepts: FAST,
  checks: ['M2-13'],
  solve(_inputs, { items }) {
    let phi = 0;
    for (const [index, { m_0, m_f, w }] of items.entries()) {
      if (m_f > m_0) {
        return refuse(
          `m_f_${index + 1}`,
          `The mass of the vehicle with stage ${index + 1} spent, ${show(m_f, 't')}, is above its mass at ignition, ${show(m_0, 't')}.`,
        );
      }
      phi += (w / c) * Math.log(m_0 / m_f);
    }
    const beta = Math.tanh(phi);
    return { phi, beta, v: beta * c };
  },
});
