import { DELTA_V, EXHAUST_SPEED, MASS, MASS_OR_NONE } from '../bounds';
import { defineMethod, line, refuse } from '../define';
import type { Method } from '../types';
import { ROCKETS } from '../vocabulary';

const REFERENCE =
  'H. D. Curtis, Orbital Mechanics for Engineering Students, ch. 11 (formula seen in code); G. P. Sutton and O. Biblarz, Rocket Propulsion Elements, ch. 4 (from memory).';
const exhaustSpeed = { tex: 'v_e', label: 'effective exhaust speed', unit: 'km/s', bounds: EXHAUST_SPEED };
const structuralRatio = {
  tex: '\\varepsilon',
  label: 'structural ratio, structure over structure and propellant',
  unit: '1',
  bounds: { min: 0, max: 1, maxExclusive: true, reason: 'a stage needs propellant besides structure' },
};

/** Payload fraction of one stage for a delta-v (m/s); refused when structure and propellant use up the vehicle. */
export const stagePayloadFraction: Method = defineMethod({
  id: 'stage-payload-fraction',
  version: '1.0.0',
  family: 'M1',
  name: 'Payload fraction of one stage',
  summary: 'Share of the initial mass left for payload by a single stage.',
  equation: '\\pi = \\frac{e^{-\\Delta v/v_e} - \\varepsilon}{1 - \\varepsilon}',
  inputs: {
    dv: { tex: '\\Delta v', label: 'delta-v', unit: 'km/s', bounds: DELTA_V },
    v_e: exhaustSpeed,
    eps: structuralRatio,
  },
  outputs: { pi_s: { tex: '\\pi', label: 'payload fraction', unit: '1' } },
  proof: [line('pi_s', '\\pi', '(exp(-dv / v_e) - eps) / (1 - eps)', '1')],
  validity: 'Constant exhaust speed, no losses beyond the given delta-v.',
  reference: REFERENCE,
  cautions: [],
  concepts: ROCKETS,
  checks: ['M1-12'],
  solve({ dv, v_e, eps }) {
    const pi_s = (Math.exp(-dv / v_e) - eps) / (1 - eps);
    if (pi_s <= 0) {
      return refuse(
        'eps',
        `Infeasible: the structural ratio ${eps} is not below exp(−Δv/v_e) = ${Math.exp(-dv / v_e).toPrecision(3)}, so no payload is left. Lower it, or use more stages.`,
      );
    }
    return { pi_s };
  },
});

/** Delta-v (m/s) of n equal stages for a total payload fraction. */
export const equalStages: Method = defineMethod({
  id: 'equal-stages',
  version: '1.0.0',
  family: 'M1',
  name: 'Equal stages',
  summary: 'Delta-v of a vehicle of equal stages for a total payload fraction, and the limit for very many stages.',
  equation: '\\Delta v = n v_e\\ln\\frac{1}{\\pi_T^{1/n}(1 - \\varepsilon) + \\varepsilon}',
  inputs: {
    n: {
      tex: 'n',
      label: 'number of stages',
      unit: '1',
      bounds: { min: 1, reason: 'a vehicle has at least one stage' },
    },
    v_e: exhaustSpeed,
    eps: structuralRatio,
    pi_T: {
      tex: '\\pi_T',
      label: 'total payload fraction',
      unit: '1',
      bounds: {
        min: 0,
        minExclusive: true,
        max: 1,
        maxExclusive: true,
        reason: 'payload is a proper part of the vehicle',
      },
    },
  },
  outputs: {
    dv: { tex: '\\Delta v', label: 'delta-v', unit: 'km/s' },
    dv_inf: { tex: '\\Delta v_\\infty', label: 'delta-v of very many stages', unit: 'km/s' },
  },
  proof: [
    line('dv', '\\Delta v', '-n * v_e * log(pi_T^(1 / n) * (1 - eps) + eps)', 'm/s'),
    line('dv_inf', '\\Delta v_\\infty', '-v_e * (1 - eps) * log(pi_T)', 'm/s'),
  ],
  validity: 'Equal structural ratio, payload ratio and exhaust speed of every stage.',
  reference: REFERENCE,
  cautions: [],
  concepts: ROCKETS,
  checks: ['M1-10'],
  solve({ n, v_e, eps, pi_T }) {
    if (!Number.isInteger(n)) return refuse('n', `The number of stages is ${n}; give a whole number.`);
    const dv = -n * v_e * Math.log(pi_T ** (1 / n) * (1 - eps) + eps);
    return { dv, dv_inf: -v_e * (1 - eps) * Math.log(pi_T) };
  },
});

/** Delta-v (m/s) of stages burned one after the other; the payload of each stage is all that sits above it. */
export const stagedRocket: Method = defineMethod({
  id: 'staged-rocket',
  version: '1.0.0',
  family: 'M1',
  name: 'Staged rocket',
  summary: 'Delta-v and initial mass of a vehicle whose stages burn one after the other, first stage first.',
  equation: '\\Delta v = \\sum_i v_{e,i}\\ln\\frac{m_{0,i}}{m_{0,i} - m_{p,i}}',
  inputs: { m_pl: { tex: 'm_{pl}', label: 'payload mass', unit: 't', bounds: MASS_OR_NONE } },
  group: {
    name: 'stages',
    label: 'stages, first to burn first',
    ports: {
      m_p: { tex: 'm_p', label: 'usable propellant of the stage', unit: 't', bounds: MASS },
      m_s: { tex: 'm_s', label: 'mass of the stage without propellant', unit: 't', bounds: MASS },
      v_e: exhaustSpeed,
    },
    atLeast: 1,
    atMost: 8,
  },
  outputs: {
    m_0: { tex: 'm_0', label: 'initial mass', unit: 't' },
    dv: { tex: '\\Delta v', label: 'delta-v', unit: 'km/s' },
  },
  proofFor: (count) => {
    const lines = [];
    const terms: string[] = [];
    for (let i = count; i >= 1; i -= 1) {
      const above = i === count ? 'm_pl' : `M_${i + 1}`;
      lines.push(line(`M_${i}`, `M_{${i}}`, `${above} + m_s_${i} + m_p_${i}`, 'kg'));
      terms.push(`v_e_${i} * log(M_${i} / (M_${i} - m_p_${i}))`);
    }
    return [...lines, line('m_0', 'm_0', 'M_1', 'kg'), line('dv', '\\Delta v', terms.reverse().join(' + '), 'm/s')];
  },
  validity: 'Each stage is dropped before the next burns; constant exhaust speed in each; delta-v far below c.',
  reference: REFERENCE,
  cautions: [],
  concepts: ROCKETS,
  checks: [],
  solve({ m_pl }, { items }) {
    let mass = m_pl;
    let dv = 0;
    for (const stage of [...items].reverse()) {
      mass += stage.m_s + stage.m_p;
      dv -= stage.v_e * Math.log1p(-stage.m_p / mass);
    }
    return { m_0: mass, dv };
  },
});
