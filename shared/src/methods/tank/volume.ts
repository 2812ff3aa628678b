import { DENSITY, EXTENT, EXTENT_OR_NONE, MASS, MASS_OR_NONE } from '../bounds';
import { constantIds, g_0 } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { CRYOGEN_CAUTION, PRESSURE_CAUTION } from '../vocabulary';
import { TANK_CONCEPTS, TANK_REFERENCE, tankPressure } from './ports';

/** Tank volume (m³) from usable propellant (kg), density (kg/m³), residual and ullage fractions. */
export const tankVolume: Method = defineMethod({
  id: 'tank-volume',
  version: '1.0.0',
  family: 'M14',
  name: 'Tank volume',
  summary: 'Volume of a tank for a usable propellant mass with residual and ullage.',
  equation: 'V = \\frac{m_p (1 + f_r)}{\\rho_p (1 - f_u)}',
  inputs: {
    m_p: { tex: 'm_p', label: 'usable propellant mass', unit: 't', bounds: MASS_OR_NONE },
    rho_p: { tex: '\\rho_p', label: 'propellant density', unit: 'kg/m^3', bounds: DENSITY },
    f_u: {
      tex: 'f_u',
      label: 'ullage fraction of the volume',
      unit: '%',
      bounds: { min: 0, max: 1, maxExclusive: true, reason: 'ullage leaves room for propellant' },
    },
    f_r: {
      tex: 'f_r',
      label: 'residual over usable propellant',
      unit: '%',
      bounds: { min: 0, reason: 'a ratio of masses' },
      default: 0,
    },
  },
  outputs: {
    m: { tex: 'm', label: 'loaded propellant mass', unit: 't' },
    V: { tex: 'V', label: 'tank volume', unit: 'm^3' },
  },
  proof: [line('m', 'm', 'm_p * (1 + f_r)', 'kg'), line('V', 'V', 'm / rho_p / (1 - f_u)', 'm^3')],
  validity: 'Density at storage conditions; residual counted on the usable mass, ullage on the tank volume.',
  reference: 'Definition.',
  cautions: [CRYOGEN_CAUTION],
  concepts: TANK_CONCEPTS,
  checks: ['M14-12'],
  solve({ m_p, rho_p, f_u, f_r }) {
    const m = m_p * (1 + f_r);
    return { m, V: m / rho_p / (1 - f_u) };
  },
});

/** Boil-off (kg/s and share a day) from a heat leak (W) into a stored liquid. */
export const boilOff: Method = defineMethod({
  id: 'boil-off',
  version: '1.0.0',
  family: 'M14',
  name: 'Boil-off of a cryogenic tank',
  summary: 'Propellant that a heat leak boils off, per time and as a share of the load.',
  equation: '\\dot m_b = \\frac{Q_l}{h_{fg}}',
  inputs: {
    Q_l: { tex: 'Q_l', label: 'heat leak', unit: 'W', bounds: EXTENT_OR_NONE },
    h_fg: { tex: 'h_{fg}', label: 'heat of vaporisation', unit: 'kJ/kg', bounds: EXTENT },
    m: { tex: 'm', label: 'stored propellant mass', unit: 't', bounds: MASS },
    t: { tex: 't', label: 'storage time', unit: 'd', bounds: EXTENT_OR_NONE, default: 0 },
  },
  outputs: {
    mdot: { tex: '\\dot m_b', label: 'boil-off rate', unit: 'kg/d' },
    s: { tex: 's', label: 'share of the load lost per time', unit: '%/d' },
    m_b: { tex: 'm_b', label: 'mass boiled off', unit: 't' },
  },
  proof: [
    line('mdot', '\\dot m_b', 'Q_l / h_fg', 'kg/s'),
    line('s', 's', 'mdot / m', '1/s'),
    line('m_b', 'm_b', 'mdot * t', 'kg'),
  ],
  validity: 'Constant heat leak, saturated liquid, vapour vented at saturation.',
  reference:
    'Energy balance; heats of vaporisation, common handbook values: hydrogen 446, methane 511, oxygen 213 kJ/kg.',
  cautions: [CRYOGEN_CAUTION],
  concepts: TANK_CONCEPTS,
  checks: [],
  solve({ Q_l, h_fg, m, t }, { warn }) {
    const mdot = Q_l / h_fg;
    if (mdot * t > m) warn('The tank boils dry before the storage time ends.');
    return { mdot, s: mdot / m, m_b: mdot * t };
  },
});

/** Tank mass (kg) from burst pressure (Pa), volume (m³) and a performance factor (m). */
export const performanceFactorTank: Method = defineMethod({
  id: 'performance-factor-tank',
  version: '1.0.0',
  family: 'M14',
  name: 'Tank mass from performance factor',
  summary: 'Mass of a pressure vessel from burst pressure, volume and the performance factor of its construction.',
  equation: 'm = \\frac{p_b V}{g_0\\,\\phi_t}',
  inputs: {
    p: tankPressure,
    f_b: {
      tex: 'f_b',
      label: 'burst over tank pressure',
      unit: '1',
      bounds: { min: 1, reason: 'a vessel bursts above its pressure' },
    },
    V: { tex: 'V', label: 'tank volume', unit: 'm^3', bounds: EXTENT },
    phi_t: { tex: '\\phi_t', label: 'performance factor', unit: 'km', bounds: EXTENT },
  },
  outputs: {
    p_b: { tex: 'p_b', label: 'burst pressure', unit: 'kPa' },
    m: { tex: 'm', label: 'tank mass', unit: 'kg' },
  },
  proof: [line('p_b', 'p_b', 'f_b * p', 'Pa'), line('m', 'm', 'p_b * V / (g_0 * phi_t)', 'kg')],
  constants: constantIds('g_0'),
  validity: 'Performance factor of the same construction and size; it is data with its own source.',
  reference: `${TANK_REFERENCE} Metallic about 2.5 to 6 km, composite over-wrapped about 10 to 25 km: common practice, from memory.`,
  cautions: [PRESSURE_CAUTION],
  concepts: TANK_CONCEPTS,
  checks: [],
  solve: ({ p, f_b, V, phi_t }) => ({ p_b: f_b * p, m: (f_b * p * V) / (g_0 * phi_t) }),
});
