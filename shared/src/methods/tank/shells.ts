import { EXTENT } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { PRESSURE_CAUTION } from '../vocabulary';
import {
  TANK_CONCEPTS,
  TANK_REFERENCE,
  allowableStress,
  fittings,
  tankPressure,
  thickWallWarning,
  wallDensity,
  weldEfficiency,
} from './ports';

const piLine = line('pi', '\\pi', '3.141592653589793', '1');
const thickness = { tex: 't', label: 'wall thickness', unit: 'mm' };
const radius = { tex: 'r', label: 'radius', unit: 'm', bounds: EXTENT };
const VALIDITY = 'Thin membrane (wall below a tenth of the radius), inner pressure only, no bending at joints.';

/** Radius (m), wall thickness (m) and mass (kg) of a spherical tank for a volume (m³) and pressure (Pa). */
export const sphericalTank: Method = defineMethod({
  id: 'spherical-tank',
  version: '1.0.0',
  family: 'M14',
  name: 'Spherical tank',
  summary: 'Radius, wall thickness and mass of a spherical tank that holds a volume under pressure.',
  equation: 't = \\frac{p r}{2 s e_w},\\quad m = \\tfrac32 k_f\\,\\frac{p V \\rho}{s e_w}',
  inputs: {
    p: tankPressure,
    V: { tex: 'V', label: 'tank volume', unit: 'm^3', bounds: EXTENT },
    s: allowableStress,
    rho: wallDensity,
    e_w: weldEfficiency,
    k_f: fittings,
  },
  outputs: {
    r: { tex: 'r', label: 'tank radius', unit: 'm' },
    t: thickness,
    m: { tex: 'm', label: 'tank mass', unit: 'kg' },
  },
  proof: [
    piLine,
    line('r', 'r', 'cbrt(3 * V / (4 * pi))', 'm'),
    line('t', 't', 'p * r / (2 * s * e_w)', 'm'),
    line('m', 'm', 'k_f * 1.5 * p * V * rho / (s * e_w)', 'kg'),
  ],
  validity: VALIDITY,
  reference: TANK_REFERENCE,
  cautions: [PRESSURE_CAUTION],
  concepts: TANK_CONCEPTS,
  checks: ['M14-10'],
  solve({ p, V, s, rho, e_w, k_f }, { warn }) {
    const r = Math.cbrt((3 * V) / (4 * Math.PI));
    const t = (p * r) / (2 * s * e_w);
    const thick = thickWallWarning(t, r);
    if (thick) warn(thick);
    return { r, t, m: (k_f * 1.5 * p * V * rho) / (s * e_w) };
  },
});

/** Wall thickness (m) and mass (kg) of a cylindrical tank section by hoop stress. */
export const cylindricalTankWall: Method = defineMethod({
  id: 'cylindrical-tank-wall',
  version: '1.0.0',
  family: 'M14',
  name: 'Cylindrical tank section',
  summary: 'Wall thickness and mass of the cylindrical section of a tank under pressure.',
  equation: 't = \\frac{p r}{s e_w},\\quad m = 2\\pi r l\\, t \\rho',
  inputs: {
    p: tankPressure,
    r: radius,
    l: { tex: 'l', label: 'length of the section', unit: 'm', bounds: EXTENT },
    s: allowableStress,
    rho: wallDensity,
    e_w: weldEfficiency,
  },
  outputs: { t: thickness, m: { tex: 'm', label: 'mass of the section', unit: 'kg' } },
  proof: [piLine, line('t', 't', 'p * r / (s * e_w)', 'm'), line('m', 'm', '2 * pi * r * l * t * rho', 'kg')],
  validity: VALIDITY,
  reference: TANK_REFERENCE,
  cautions: [PRESSURE_CAUTION],
  concepts: TANK_CONCEPTS,
  checks: ['M14-01'],
  solve({ p, r, l, s, rho, e_w }, { warn }) {
    const t = (p * r) / (s * e_w);
    const thick = thickWallWarning(t, r);
    if (thick) warn(thick);
    return { t, m: 2 * Math.PI * r * l * t * rho };
  },
});

/** Mass (kg) of a cylindrical shell of given wall thickness (m). */
export const cylindricalShellMass: Method = defineMethod({
  id: 'cylindrical-shell-mass',
  version: '1.0.0',
  family: 'M14',
  name: 'Mass of a cylindrical shell',
  summary: 'Mass of a cylindrical shell whose wall thickness is known.',
  equation: 'm = 2\\pi r l\\, t \\rho',
  inputs: {
    r: radius,
    l: { tex: 'l', label: 'length', unit: 'm', bounds: EXTENT },
    t: { ...thickness, bounds: EXTENT },
    rho: wallDensity,
  },
  outputs: { m: { tex: 'm', label: 'shell mass', unit: 'kg' } },
  proof: [piLine, line('m', 'm', '2 * pi * r * l * t * rho', 'kg')],
  validity: VALIDITY,
  reference: TANK_REFERENCE,
  cautions: [],
  concepts: TANK_CONCEPTS,
  checks: ['M14-06'],
  solve({ r, l, t, rho }, { warn }) {
    const thick = thickWallWarning(t, r);
    if (thick) warn(thick);
    return { m: 2 * Math.PI * r * l * t * rho };
  },
});

/** Crown and knuckle thickness (m), design factor and mass (kg) of two ellipsoidal tank ends. Huzel & Huang ch. VIII. */
export const ellipsoidalEnds: Method = defineMethod({
  id: 'ellipsoidal-ends',
  version: '1.0.0',
  family: 'M14',
  name: 'Ellipsoidal tank ends',
  summary: 'Wall thickness at crown and knuckle and the mass of both ellipsoidal ends of a tank.',
  equation:
    "t_{cr} = \\frac{p k a}{2 s e_w},\\; t_k = \\frac{K p a}{s e_w},\\; m = \\frac{\\pi a^2 t \\rho E'}{k},\\; E' = 2k + \\frac{1}{\\sqrt{k^2-1}}\\ln\\frac{k + \\sqrt{k^2-1}}{k - \\sqrt{k^2-1}}",
  inputs: {
    p: tankPressure,
    a: { tex: 'a', label: 'half of the long axis (tank radius)', unit: 'm', bounds: EXTENT },
    k: {
      tex: 'k',
      label: 'axis ratio a/b',
      unit: '1',
      bounds: {
        min: 1,
        minExclusive: true,
        reason: 'an ellipsoidal end is flatter than a sphere; use the sphere for 1',
      },
    },
    K: { tex: 'K', label: 'knuckle stress factor', unit: '1', bounds: EXTENT },
    s: allowableStress,
    rho: wallDensity,
    e_w: weldEfficiency,
  },
  outputs: {
    t_cr: { tex: 't_{cr}', label: 'crown thickness', unit: 'mm' },
    t_k: { tex: 't_k', label: 'knuckle thickness', unit: 'mm' },
    E_d: { tex: "E'", label: 'ellipse design factor', unit: '1' },
    m: { tex: 'm', label: 'mass of both ends, mean of the two thicknesses', unit: 'kg' },
  },
  proof: [
    piLine,
    line('t_cr', 't_{cr}', 'p * k * a / (2 * s * e_w)', 'm'),
    line('t_k', 't_k', 'K * p * a / (s * e_w)', 'm'),
    line('u', 'u', 'sqrt(k^2 - 1)', '1'),
    line('E_d', "E'", '2 * k + log((k + u) / (k - u)) / u', '1'),
    line('m', 'm', 'pi * a^2 * (t_cr + t_k) / 2 * rho * E_d / k', 'kg'),
  ],
  validity: `${VALIDITY} Knuckle factor K from the reference: 0.67 at k = 1, about 0.80 at k = 1.4.`,
  reference: TANK_REFERENCE,
  cautions: [PRESSURE_CAUTION],
  concepts: TANK_CONCEPTS,
  checks: ['M14-03', 'M14-04'],
  solve({ p, a, k, K, s, rho, e_w }, { warn }) {
    const t_cr = (p * k * a) / (2 * s * e_w);
    const t_k = (K * p * a) / (s * e_w);
    const thick = thickWallWarning(Math.max(t_cr, t_k), a);
    if (thick) warn(thick);
    const u = Math.sqrt(k ** 2 - 1);
    const E_d = 2 * k + Math.log((k + u) / (k - u)) / u;
    return { t_cr, t_k, E_d, m: (((Math.PI * a ** 2 * (t_cr + t_k)) / 2) * rho * E_d) / k };
  },
});

/** Allowable stress (Pa): the smaller of ultimate and yield strength over their safety factors. */
export const allowableStressMethod: Method = defineMethod({
  id: 'allowable-stress',
  version: '1.0.0',
  family: 'M14',
  name: 'Allowable stress',
  summary: 'Smaller of ultimate and yield strength, each over its safety factor.',
  equation: 's = \\min\\left(\\frac{s_u}{f_u}, \\frac{s_y}{f_y}\\right)',
  inputs: {
    s_u: { tex: 's_u', label: 'ultimate strength', unit: 'MPa', bounds: EXTENT },
    f_u: {
      tex: 'f_u',
      label: 'safety factor on ultimate',
      unit: '1',
      bounds: { min: 1, reason: 'a safety factor below 1 is none' },
    },
    s_y: { tex: 's_y', label: 'yield strength', unit: 'MPa', bounds: EXTENT },
    f_y: {
      tex: 'f_y',
      label: 'safety factor on yield',
      unit: '1',
      bounds: { min: 1, reason: 'a safety factor below 1 is none' },
    },
  },
  outputs: { s: { tex: 's', label: 'allowable stress', unit: 'MPa' } },
  proof: [line('s', 's', 'min(s_u / f_u, s_y / f_y)', 'Pa')],
  validity: 'Strengths at the temperature and condition of use.',
  reference: 'Definition.',
  cautions: [PRESSURE_CAUTION],
  concepts: TANK_CONCEPTS,
  checks: [],
  solve: ({ s_u, f_u, s_y, f_y }) => ({ s: Math.min(s_u / f_u, s_y / f_y) }),
});
