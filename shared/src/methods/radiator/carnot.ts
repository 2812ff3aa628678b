import { EFFICIENCY_ABOVE_ZERO, EXTENT } from '../bounds';
import { constantIds, sigma } from '../constants';
import { defineMethod, line, refuse, show } from '../define';
import { bisect } from '../numerics';
import type { Method } from '../types';
import { NUCLEAR_ELECTRIC, REACTOR_CAUTION, SOLAR_ELECTRIC } from '../vocabulary';
import {
  RADIATION_REFERENCE,
  RADIATION_VALIDITY,
  emissivity,
  radiatorTemperature,
  sinkTemperature,
  sinkTooWarm,
} from './ports';

const CONCEPTS = [NUCLEAR_ELECTRIC, SOLAR_ELECTRIC];
const power = { tex: 'P', label: 'electric power delivered', unit: 'MW', bounds: EXTENT };
const hotTemperature = { ...radiatorTemperature, tex: 'T_h', label: 'hot-side temperature' };
const secondLaw = {
  tex: 'k',
  label: 'share of the Carnot efficiency reached',
  unit: '1',
  bounds: EFFICIENCY_ABOVE_ZERO,
  default: 1,
};
const results = {
  eta: { tex: '\\eta', label: 'conversion efficiency', unit: '1' },
  Q: { tex: 'Q', label: 'heat rejected', unit: 'MW' },
  A: { tex: 'A', label: 'emitting area', unit: 'm^2' },
};

/** Emitting area (m²) of the radiator of a heat engine that delivers a power (W) between two temperatures (K). */
export const heatEngineRadiator: Method = defineMethod({
  id: 'heat-engine-radiator',
  version: '1.0.0',
  family: 'M7',
  name: 'Radiator of a heat engine',
  summary: 'Efficiency, rejected heat and emitting area of a power conversion between a hot side and its radiator.',
  equation:
    '\\eta = k\\left(1 - \\frac{T_r}{T_h}\\right),\\quad A = \\frac{P(1/\\eta - 1)}{\\varepsilon\\sigma(T_r^4 - T_s^4)}',
  inputs: {
    P: power,
    T_h: hotTemperature,
    T_r: radiatorTemperature,
    eps: emissivity,
    T_s: sinkTemperature,
    k: secondLaw,
  },
  outputs: results,
  proof: [
    line('eta', '\\eta', 'k * (1 - T_r / T_h)', '1'),
    line('Q', 'Q', 'P * (1 / eta - 1)', 'W'),
    line('A', 'A', 'Q / (eps * sigma * (T_r^4 - T_s^4))', 'm^2'),
  ],
  constants: constantIds('sigma'),
  validity: RADIATION_VALIDITY,
  reference: `Carnot efficiency; ${RADIATION_REFERENCE}`,
  cautions: [REACTOR_CAUTION],
  concepts: CONCEPTS,
  checks: [],
  solve({ P, T_h, T_r, eps, T_s, k }) {
    if (T_r <= T_s) return sinkTooWarm(T_r, T_s);
    if (T_r >= T_h) {
      return refuse(
        'T_r',
        `The radiator temperature ${show(T_r, 'K')} is not below the hot side ${show(T_h, 'K')}; no work comes out.`,
      );
    }
    const eta = k * (1 - T_r / T_h);
    const Q = P * (1 / eta - 1);
    return { eta, Q, A: Q / (eps * sigma * (T_r ** 4 - T_s ** 4)) };
  },
});

/** Radiator temperature (K) of least area for a heat engine: 3/4 of the hot side for a Carnot engine without sink. */
export const heatEngineRadiatorOptimum: Method = defineMethod({
  id: 'heat-engine-radiator-optimum',
  version: '1.0.0',
  family: 'M7',
  name: 'Radiator temperature of least area',
  summary: 'Radiator temperature at which a power conversion needs the least emitting area, and that area.',
  equation: '\\min_{T_r} \\frac{1/\\eta - 1}{T_r^4 - T_s^4},\\quad \\eta = k\\left(1 - \\frac{T_r}{T_h}\\right)',
  inputs: { P: power, T_h: hotTemperature, eps: emissivity, T_s: sinkTemperature, k: secondLaw },
  outputs: {
    T_r: { tex: 'T_r', label: 'radiator temperature of least area', unit: 'K', temperature: 'absolute' },
    ...results,
  },
  validity: RADIATION_VALIDITY,
  reference: `C. Borgnakke and R. E. Sonntag, Fundamentals of Thermodynamics, problem 7.1 (page seen); ${RADIATION_REFERENCE}`,
  cautions: [REACTOR_CAUTION],
  concepts: CONCEPTS,
  checks: ['M7-02', 'M7-03'],
  solve({ P, T_h, eps, T_s, k }) {
    if (T_h <= T_s) {
      return refuse(
        'T_h',
        `The hot side ${show(T_h, 'K')} is not above the sink temperature ${show(T_s, 'K')}; no work comes out.`,
      );
    }
    // Logarithmic derivative of the area by temperature: −∞ at the sink, +∞ at the hot side, rising in between.
    const slope = (T: number) => {
      const eta = k * (1 - T / T_h);
      return (k / T_h) * (1 / (1 - eta) + 1 / eta) - (4 * T ** 3) / (T ** 4 - T_s ** 4);
    };
    const margin = 1e-9 * (T_h - T_s);
    const T_r = bisect(slope, T_s + margin, T_h - margin);
    const eta = k * (1 - T_r / T_h);
    const Q = P * (1 / eta - 1);
    return { T_r, eta, Q, A: Q / (eps * sigma * (T_r ** 4 - T_s ** 4)) };
  },
});
