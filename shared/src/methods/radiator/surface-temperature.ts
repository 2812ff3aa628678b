import { EXTENT, EXTENT_OR_NONE, POSITIVE_RATIO, TEMPERATURE } from '../bounds';
import { constantIds, sigma } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { EVERY } from '../vocabulary';
import { RADIATION_REFERENCE, RADIATION_VALIDITY, emissivity, sinkTemperature } from './ports';

const kelvin = { unit: 'K', temperature: 'absolute' as const };
const starTemperature = {
  tex: 'T_\\star',
  label: 'surface temperature of the reference star',
  ...kelvin,
  bounds: TEMPERATURE,
};
const positiveRatio = { ...POSITIVE_RATIO, reason: 'a ratio of two positive quantities; it may exceed 1' };

/** Temperature (K) of a surface from its flux relative to that of a reference star, by the fourth root. */
export const fourthRootTemperature: Method = defineMethod({
  id: 'fourth-root-temperature',
  version: '1.0.0',
  family: 'M7',
  name: 'Fourth-root temperature',
  summary: 'Temperature of a surface that must carry a multiple of the surface flux of a reference star.',
  equation: 'T = T_\\star \\left(q/q_\\star\\right)^{1/4}',
  inputs: {
    T_star: starTemperature,
    r_q: { tex: 'q/q_\\star', label: 'flux over that of the reference star', unit: '1', bounds: positiveRatio },
  },
  outputs: { T: { tex: 'T', label: 'surface temperature', ...kelvin } },
  proof: [line('T', 'T', 'T_star * r_q^0.25', 'K')],
  validity: 'Same emissivity as the reference; no flux received.',
  reference: 'Stefan–Boltzmann law; fourth-root rule of the trade, common practice, no source.',
  cautions: [],
  concepts: EVERY,
  checks: ['M7-20'],
  solve: ({ T_star, r_q }) => ({ T: T_star * Math.sqrt(Math.sqrt(r_q)) }),
});

/** Surface flux (W/m²) that a power needs on an area (m²), as a multiple of a reference star's, and its temperature (K). */
export const surfaceFluxRatio: Method = defineMethod({
  id: 'surface-flux-ratio',
  version: '1.0.0',
  family: 'M7',
  name: 'Surface flux over that of a star',
  summary: 'How many times the surface flux of a reference star an area must carry, and how hot a black one would be.',
  equation: '\\frac{q}{q_\\star} = \\frac{P/A}{\\sigma T_\\star^4}',
  inputs: {
    P: { tex: 'P', label: 'power to carry', unit: 'GW', bounds: EXTENT },
    A: { tex: 'A', label: 'emitting or absorbing area', unit: 'm^2', bounds: EXTENT },
    T_star: { ...starTemperature, default: 5772 },
  },
  outputs: {
    q: { tex: 'q', label: 'surface flux', unit: 'W/m^2' },
    q_star: { tex: 'q_\\star', label: 'surface flux of the reference star', unit: 'W/m^2' },
    r_q: { tex: 'q/q_\\star', label: 'flux over that of the reference star', unit: '1' },
    T: { tex: 'T', label: 'temperature of a black surface', ...kelvin },
  },
  proof: [
    line('q', 'q', 'P / A', 'W/m^2'),
    line('q_star', 'q_\\star', 'sigma * T_star^4', 'W/m^2'),
    line('r_q', 'q/q_\\star', 'q / q_star', '1'),
    line('T', 'T', 'T_star * r_q^0.25', 'K'),
  ],
  constants: constantIds('sigma'),
  validity:
    'Uniform flux; the temperature is that of a black surface without surroundings. Default star: Sun, 5772 K nominal.',
  reference: 'Stefan–Boltzmann law; IAU 2015 Resolution B3 (nominal solar values).',
  cautions: [],
  concepts: EVERY,
  checks: ['M7-06'],
  solve({ P, A, T_star }) {
    const q = P / A;
    const q_star = sigma * T_star ** 4;
    return { q, q_star, r_q: q / q_star, T: Math.sqrt(Math.sqrt(q / sigma)) };
  },
});

/** Temperature (K) at which an area (m²) sheds a heat (W) to its sink (K). */
export const steadySurfaceTemperature: Method = defineMethod({
  id: 'steady-surface-temperature',
  version: '1.0.0',
  family: 'M7',
  name: 'Steady temperature of a heated surface',
  summary: 'Temperature at which an emitting area sheds the heat put into it.',
  equation: 'T = \\left(\\frac{Q}{\\varepsilon\\sigma A} + T_s^4\\right)^{1/4}',
  inputs: {
    Q: { tex: 'Q', label: 'heat to shed', unit: 'MW', bounds: EXTENT_OR_NONE },
    A: { tex: 'A', label: 'emitting area', unit: 'm^2', bounds: EXTENT },
    eps: emissivity,
    T_s: sinkTemperature,
  },
  outputs: { T: { tex: 'T', label: 'surface temperature', ...kelvin } },
  proof: [line('T', 'T', '(Q / (eps * sigma * A) + T_s^4)^0.25', 'K')],
  constants: constantIds('sigma'),
  validity: RADIATION_VALIDITY,
  reference: RADIATION_REFERENCE,
  cautions: [],
  concepts: EVERY,
  checks: ['M17-07'],
  solve: ({ Q, A, eps, T_s }) => ({ T: Math.sqrt(Math.sqrt(Q / (eps * sigma * A) + T_s ** 4)) }),
});

/** Temperature (K) of a plate facing a star at a distance (m), from flux diluted by (R/d)². */
export const plateFacingStar: Method = defineMethod({
  id: 'plate-facing-star',
  version: '1.0.0',
  family: 'M7',
  name: 'Plate facing a star',
  summary: 'Temperature of a plate whose front faces a star and whose back is insulated.',
  equation: 'T = T_\\star \\sqrt{\\frac{R_\\star}{d}} \\left(\\frac{\\alpha}{\\varepsilon}\\right)^{1/4}',
  inputs: {
    T_star: { ...starTemperature, default: 5772 },
    R_star: { tex: 'R_\\star', label: 'radius of the star', unit: 'm', bounds: EXTENT, default: 6.957e8 },
    d: { tex: 'd', label: 'distance from the centre of the star', unit: 'au', bounds: EXTENT },
    r_a: {
      tex: '\\alpha/\\varepsilon',
      label: 'absorptance over emissivity',
      unit: '1',
      bounds: positiveRatio,
      default: 1,
    },
  },
  outputs: { T: { tex: 'T', label: 'plate temperature', ...kelvin } },
  proof: [line('T', 'T', 'T_star * sqrt(R_star / d) * r_a^0.25', 'K')],
  validity: 'Normal incidence, far outside the star, insulated back, black surroundings at 0 K.',
  reference: 'Stefan–Boltzmann law; IAU 2015 Resolution B3 (nominal solar values as defaults).',
  cautions: [],
  concepts: EVERY,
  checks: ['M7-12'],
  solve({ T_star, R_star, d, r_a }, { warn }) {
    if (d < R_star) warn('The distance lies inside the star.');
    return { T: T_star * Math.sqrt(R_star / d) * Math.sqrt(Math.sqrt(r_a)) };
  },
});
