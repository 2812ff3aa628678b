import { EXTENT, EXTENT_OR_NONE } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { PRESSURE_CAUTION } from '../vocabulary';
import { TANK_CONCEPTS, TANK_REFERENCE, modulus, thickWallWarning } from './ports';

const VALIDITY = 'Thin elastic shell, no stiffeners; knock-down included only through the stated coefficients.';
const radius = { tex: 'a', label: 'tank radius', unit: 'm', bounds: EXTENT };
const length = { tex: 'l', label: 'length of the section', unit: 'm', bounds: EXTENT };
const thickness = { tex: 't', label: 'wall thickness', unit: 'mm', bounds: EXTENT };
const poisson = {
  tex: '\\nu',
  label: 'Poisson ratio',
  unit: '1',
  bounds: { min: 0, max: 0.5, reason: 'elastic metals and composites lie between 0 and 1/2' },
  default: 0.3,
};
const critical = { tex: 'p_{cr}', label: 'critical outer pressure', unit: 'kPa' };
const CAUTIONS = ['Buckling loads scatter widely below theory; take knock-down factors from tests.', PRESSURE_CAUTION];

/** Critical outer pressure (Pa) of an ellipsoidal end with crown radius a²/b. Huzel & Huang ch. VIII. */
export const endBuckling: Method = defineMethod({
  id: 'end-buckling',
  version: '1.0.0',
  family: 'M14',
  name: 'Buckling of a tank end under outer pressure',
  summary: 'Outer pressure at which an ellipsoidal tank end buckles.',
  equation: 'p_{cr} = \\frac{2 C_b E t^2}{R^2},\\quad R = \\frac{a^2}{b}',
  inputs: {
    a: radius,
    b: { tex: 'b', label: 'half of the short axis (end height)', unit: 'm', bounds: EXTENT },
    t: thickness,
    E: modulus,
    C_b: { tex: 'C_b', label: 'buckling coefficient', unit: '1', bounds: EXTENT, default: 0.05 },
  },
  outputs: { R: { tex: 'R', label: 'crown radius', unit: 'm' }, p_cr: critical },
  proof: [line('R', 'R', 'a^2 / b', 'm'), line('p_cr', 'p_{cr}', '2 * C_b * E * t^2 / R^2', 'Pa')],
  validity: `${VALIDITY} Coefficient between 0.05 and 0.10.`,
  reference: TANK_REFERENCE,
  cautions: CAUTIONS,
  concepts: TANK_CONCEPTS,
  checks: ['M14-07'],
  solve({ a, b, t, E, C_b }, { warn }) {
    const R = a ** 2 / b;
    const thick = thickWallWarning(t, R);
    if (thick) warn(thick);
    return { R, p_cr: (2 * C_b * E * t ** 2) / R ** 2 };
  },
});

/** Critical outer pressure (Pa) of a cylindrical section, short or long by l < 4.9 a sqrt(a/t). Huzel & Huang ch. VIII. */
export const cylinderBuckling: Method = defineMethod({
  id: 'cylinder-buckling',
  version: '1.0.0',
  family: 'M14',
  name: 'Buckling of a cylinder under outer pressure',
  summary: 'Outer pressure at which a short or long cylindrical section buckles.',
  equation:
    'p_{cr} = 0.807\\,\\frac{E t^2}{l a}\\left[\\frac{(t/a)^2}{(1-\\nu^2)^3}\\right]^{1/4}\\text{ where }l < 4.9\\,a\\sqrt{a/t},\\quad p_{cr} = \\frac{E t^3}{4(1-\\nu^2)a^3}\\text{ else}',
  inputs: { a: radius, l: length, t: thickness, E: modulus, nu: poisson },
  outputs: {
    l_c: { tex: 'l_c', label: 'length that separates short from long', unit: 'm' },
    p_cr: critical,
  },
  proof: [
    line('l_c', 'l_c', '4.9 * a * sqrt(a / t)', 'm'),
    line(
      'p_cr',
      'p_{cr}',
      'l < l_c ? 0.807 * E * t^2 / (l * a) * ((t / a)^2 / (1 - nu^2)^3)^0.25 : E * t^3 / (4 * (1 - nu^2) * a^3)',
      'Pa',
    ),
  ],
  validity: VALIDITY,
  reference: TANK_REFERENCE,
  cautions: CAUTIONS,
  concepts: TANK_CONCEPTS,
  checks: [],
  solve({ a, l, t, E, nu }, { warn }) {
    const thick = thickWallWarning(t, a);
    if (thick) warn(thick);
    const l_c = 4.9 * a * Math.sqrt(a / t);
    const short = ((0.807 * E * t ** 2) / (l * a)) * ((t / a) ** 2 / (1 - nu ** 2) ** 3) ** 0.25;
    const long = (E * t ** 3) / (4 * (1 - nu ** 2) * a ** 3);
    return { l_c, p_cr: l < l_c ? short : long };
  },
});

/** Critical outer pressure (Pa) of a sphere: classical value times a knock-down factor. */
export const sphereBuckling: Method = defineMethod({
  id: 'sphere-buckling',
  version: '1.0.0',
  family: 'M14',
  name: 'Buckling of a sphere under outer pressure',
  summary: 'Outer pressure at which a thin sphere buckles, with a knock-down factor.',
  equation: 'p_{cr} = k_d\\,\\frac{2 E t^2}{a^2\\sqrt{3(1-\\nu^2)}}',
  inputs: {
    a: radius,
    t: thickness,
    E: modulus,
    nu: poisson,
    k_d: {
      tex: 'k_d',
      label: 'knock-down factor',
      unit: '1',
      bounds: { min: 0, minExclusive: true, max: 1, reason: 'real shells buckle below the classical load' },
      default: 0.2,
    },
  },
  outputs: { p_cr: critical },
  proof: [line('p_cr', 'p_{cr}', 'k_d * 2 * E * t^2 / (a^2 * sqrt(3 * (1 - nu^2)))', 'Pa')],
  validity: VALIDITY,
  reference: `R. Zoelly’s classical value (from memory); ${TANK_REFERENCE}`,
  cautions: CAUTIONS,
  concepts: TANK_CONCEPTS,
  checks: [],
  solve({ a, t, E, nu, k_d }, { warn }) {
    const thick = thickWallWarning(t, a);
    if (thick) warn(thick);
    return { p_cr: (k_d * 2 * E * t ** 2) / (a ** 2 * Math.sqrt(3 * (1 - nu ** 2))) };
  },
});

/** Critical axial load (N) of a cylinder, raised by inner pressure (Pa). Huzel & Huang ch. VIII. */
export const axialBuckling: Method = defineMethod({
  id: 'axial-buckling',
  version: '1.0.0',
  family: 'M14',
  name: 'Buckling of a cylinder under axial load',
  summary: 'Axial load at which a cylindrical section buckles, with the help of inner pressure.',
  equation:
    'F_{cr} = \\left[9\\left(\\tfrac{t}{a}\\right)^{1.6} + 0.16\\left(\\tfrac{t}{l}\\right)^{1.3}\\right] 2\\pi a t E + \\pi a^2 p',
  inputs: {
    a: radius,
    l: length,
    t: thickness,
    E: modulus,
    p: { tex: 'p', label: 'inner pressure over ambient', unit: 'kPa', bounds: EXTENT_OR_NONE, default: 0 },
  },
  outputs: { F_cr: { tex: 'F_{cr}', label: 'critical axial load', unit: 'kN' } },
  proof: [
    line('pi', '\\pi', '3.141592653589793', '1'),
    line('F_cr', 'F_{cr}', '(9 * (t / a)^1.6 + 0.16 * (t / l)^1.3) * 2 * pi * a * t * E + pi * a^2 * p', 'N'),
  ],
  validity: VALIDITY,
  reference: TANK_REFERENCE,
  cautions: CAUTIONS,
  concepts: TANK_CONCEPTS,
  checks: ['M14-09'],
  solve({ a, l, t, E, p }, { warn }) {
    const thick = thickWallWarning(t, a);
    if (thick) warn(thick);
    const slender = 9 * (t / a) ** 1.6 + 0.16 * (t / l) ** 1.3;
    return { F_cr: slender * 2 * Math.PI * a * t * E + Math.PI * a ** 2 * p };
  },
});
