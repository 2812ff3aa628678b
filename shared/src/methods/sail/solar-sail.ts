import { AREAL_MASS, EMISSIVITY, EXTENT, EXTENT_OR_NONE } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { BEAMED, SOLAR_SAIL } from '../vocabulary';
import { SAIL_REFERENCE, SAIL_VALIDITY, irradiance, reflectivity } from './ports';

/** Force (N) of sunlight or a beam on a flat sail (m²) at an incidence angle, normal and tangential, with re-emission. */
export const lightPressure: Method = defineMethod({
  id: 'light-pressure',
  version: '1.0.0',
  family: 'M11',
  name: 'Light pressure on a sail',
  summary: 'Normal and tangential force of light on a flat sail that reflects, absorbs and re-emits.',
  equation:
    'F_n = \\frac{S A}{c}\\left[(1 + r)\\cos^2\\theta + \\tfrac23 (1 - r)\\frac{\\varepsilon_f - \\varepsilon_b}{\\varepsilon_f + \\varepsilon_b}\\cos\\theta\\right]',
  inputs: {
    S: irradiance,
    A: { tex: 'A', label: 'sail area', unit: 'm^2', bounds: EXTENT },
    r: reflectivity,
    theta: {
      tex: '\\theta',
      label: 'incidence angle from the sail normal',
      unit: 'deg',
      bounds: { min: 0, max: Math.PI / 2, reason: 'beyond 90° light falls on the other face' },
      default: 0,
    },
    eps_f: { tex: '\\varepsilon_f', label: 'emissivity of the lit face', unit: '1', bounds: EMISSIVITY, default: 1 },
    eps_b: { tex: '\\varepsilon_b', label: 'emissivity of the dark face', unit: '1', bounds: EMISSIVITY, default: 1 },
  },
  outputs: {
    F_n: { tex: 'F_n', label: 'force along the sail normal', unit: 'N' },
    F_t: { tex: 'F_t', label: 'force along the sail', unit: 'N' },
    p: { tex: 'p', label: 'normal force per area', unit: 'Pa' },
  },
  proof: [
    line('B', 'B', '2 / 3 * (eps_f - eps_b) / (eps_f + eps_b)', '1'),
    line('p', 'p', 'S / c * ((1 + r) * cos(theta)^2 + (1 - r) * B * cos(theta))', 'Pa'),
    line('F_n', 'F_n', 'p * A', 'N'),
    line('F_t', 'F_t', 'S * A / c * (1 - r) * sin(theta) * cos(theta)', 'N'),
  ],
  constants: constantIds('c'),
  validity: `${SAIL_VALIDITY} What is not reflected is absorbed and re-emitted diffusely by both faces; sail at rest.`,
  reference: SAIL_REFERENCE,
  cautions: [],
  concepts: [SOLAR_SAIL, BEAMED],
  checks: ['M11-01', 'M11-08', 'M11-11'],
  solve({ S, A, r, theta, eps_f, eps_b }) {
    const B = ((2 / 3) * (eps_f - eps_b)) / (eps_f + eps_b);
    const cosine = Math.cos(theta);
    const p = (S / c) * ((1 + r) * cosine ** 2 + (1 - r) * B * cosine);
    return { p, F_n: p * A, F_t: ((S * A) / c) * (1 - r) * Math.sin(theta) * cosine };
  },
});

/** Critical loading (kg/m²), lightness number and characteristic acceleration (m/s²) of a solar sail. McInnes 1999. */
export const solarSailLoading: Method = defineMethod({
  id: 'solar-sail-loading',
  version: '1.0.0',
  family: 'M11',
  name: 'Solar sail loading',
  summary:
    'Critical loading of a star, and lightness number and characteristic acceleration of a sail of given loading.',
  equation:
    '\\sigma^* = \\frac{L}{2\\pi\\, GM\\, c},\\quad \\lambda = \\frac{\\sigma^*}{\\sigma_s},\\quad a_c = \\frac{2\\eta S}{c\\,\\sigma_s}',
  inputs: {
    sigma_s: { tex: '\\sigma_s', label: 'sail loading, all mass per sail area', unit: 'g/m^2', bounds: AREAL_MASS },
    eta: {
      tex: '\\eta',
      label: 'sail efficiency',
      unit: '1',
      bounds: { min: 0, max: 1, reason: 'an ideal mirror has 1' },
      default: 1,
    },
    L: { tex: 'L', label: 'luminosity of the star', unit: 'W', bounds: EXTENT, default: 3.828e26 },
    GM: { tex: 'GM', label: 'mass parameter of the star', unit: 'm^3/s^2', bounds: EXTENT, default: 1.3271244e20 },
    S: { ...irradiance, label: 'irradiance at the reference distance', default: 1361 },
  },
  outputs: {
    sigma_c: { tex: '\\sigma^*', label: 'critical loading', unit: 'g/m^2' },
    lambda: { tex: '\\lambda', label: 'lightness number', unit: '1' },
    a_c: { tex: 'a_c', label: 'characteristic acceleration', unit: 'mm/s^2' },
  },
  proof: [
    line('pi', '\\pi', '3.141592653589793', '1'),
    line('sigma_c', '\\sigma^*', 'L / (2 * pi * GM * c)', 'kg/m^2'),
    line('lambda', '\\lambda', 'eta * sigma_c / sigma_s', '1'),
    line('a_c', 'a_c', '2 * eta * S / (c * sigma_s)', 'm/s^2'),
  ],
  constants: constantIds('c'),
  validity: `${SAIL_VALIDITY} Sail facing the star; defaults: Sun, IAU 2015 nominal values, 1361 W/m² at 1 au.`,
  reference: SAIL_REFERENCE,
  cautions: [],
  concepts: [SOLAR_SAIL],
  checks: ['M11-02'],
  solve({ sigma_s, eta, L, GM, S }) {
    const sigma_c = L / (2 * Math.PI * GM * c);
    return { sigma_c, lambda: (eta * sigma_c) / sigma_s, a_c: (2 * eta * S) / (c * sigma_s) };
  },
});

/** Irradiance (W/m²) at a distance (m) from a star by the inverse square. */
export const irradianceAtDistance: Method = defineMethod({
  id: 'irradiance-at-distance',
  version: '1.0.0',
  family: 'M11',
  name: 'Irradiance at a distance',
  summary: 'Irradiance of the Sun or another star at a distance.',
  equation: 'S = \\frac{L}{4\\pi d^2}',
  inputs: {
    d: { tex: 'd', label: 'distance from the star', unit: 'au', bounds: EXTENT },
    L: { tex: 'L', label: 'luminosity of the star', unit: 'W', bounds: EXTENT_OR_NONE, default: 3.828e26 },
  },
  outputs: { S: { tex: 'S', label: 'irradiance', unit: 'W/m^2' } },
  proof: [line('pi', '\\pi', '3.141592653589793', '1'), line('S', 'S', 'L / (4 * pi * d^2)', 'W/m^2')],
  validity: 'Far outside the star; default: Sun, IAU 2015 nominal luminosity.',
  reference: 'Inverse square law; IAU 2015 Resolution B3.',
  cautions: [],
  concepts: [SOLAR_SAIL, BEAMED],
  checks: [],
  solve: ({ d, L }) => ({ S: L / (4 * Math.PI * d ** 2) }),
});
