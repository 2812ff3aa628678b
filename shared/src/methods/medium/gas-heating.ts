import { COUNT, EXTENT, MASS, VEHICLE_SPEED } from '../bounds';
import { c, constantIds, sigma } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { FAST } from '../vocabulary';
import { emissivity } from '../radiator/ports';

/** Mass of a hydrogen atom, kg: proton plus electron of CODATA 2018 less binding; the value that checks M13 use. */
const HYDROGEN_ATOM = 1.673532835e-27;

/** Heat flux (W/m²), drag pressure (Pa) and front temperature (K) from interstellar gas and dust swept up at speed v (m/s). */
export const interstellarHeating: Method = defineMethod({
  id: 'interstellar-heating',
  version: '1.0.0',
  family: 'M13',
  name: 'Front heating by the interstellar medium',
  summary: 'Heat flux, drag pressure and temperature of a front shield that stops interstellar gas and dust.',
  equation: 'q = (1 + f_d)\\,\\gamma n\\,\\beta c\\,(\\gamma - 1) m c^2',
  inputs: {
    v: { tex: 'v', label: 'speed through the medium', unit: 'c', bounds: VEHICLE_SPEED },
    n: { tex: 'n', label: 'number density of gas atoms', unit: '1/m^3', bounds: COUNT },
    m_a: { tex: 'm_a', label: 'mean mass of a gas atom', unit: 'kg', bounds: MASS, default: HYDROGEN_ATOM },
    f_d: {
      tex: 'f_d',
      label: 'dust mass over gas mass',
      unit: '1',
      bounds: { min: 0, reason: 'a ratio of masses' },
      default: 0,
    },
    eps: { ...emissivity, default: 1 },
  },
  outputs: {
    gamma: { tex: '\\gamma', label: 'Lorentz factor', unit: '1' },
    q: { tex: 'q', label: 'heat flux on the frontal area', unit: 'W/m^2' },
    p: { tex: 'p', label: 'drag pressure', unit: 'Pa' },
    T: { tex: 'T', label: 'front temperature, one radiating face', unit: 'K', temperature: 'absolute' },
  },
  proof: [
    line('beta', '\\beta', 'v / c', '1'),
    line('gamma', '\\gamma', '1 / sqrt((1 - beta) * (1 + beta))', '1'),
    line('rho', '\\rho', '(1 + f_d) * n * m_a', 'kg/m^3'),
    line('q', 'q', 'gamma * rho * v * (gamma * v)^2 / (1 + gamma)', 'W/m^2'),
    line('p', 'p', 'rho * (gamma * v)^2', 'Pa'),
    line('T', 'T', '(q / (eps * sigma))^0.25', 'K'),
  ],
  constants: constantIds('c', 'sigma'),
  validity:
    'Medium at rest before impact; every particle stops in the shield and sticks; one radiating face, sink at 0 K.',
  reference:
    'Count of particles and energy in the ship frame; T. Hoang et al., Astrophysical Journal 837 (2017) 5, arXiv:1608.05284 (abstract seen).',
  cautions: ['Count helium in the mean atom mass: about 1.36 times hydrogen per hydrogen atom (from memory).'],
  concepts: FAST,
  checks: ['M13-03', 'M13-05'],
  solve({ v, n, m_a, f_d, eps }) {
    const beta = v / c;
    const gamma = 1 / Math.sqrt((1 - beta) * (1 + beta));
    const rho = (1 + f_d) * n * m_a;
    const momentum = gamma * v;
    // (gamma - 1) c² written as (gamma v)²/(1 + gamma), which loses no digits at low speed.
    const q = (gamma * rho * v * momentum ** 2) / (1 + gamma);
    return { gamma, q, p: rho * momentum ** 2, T: Math.sqrt(Math.sqrt(q / (eps * sigma))) };
  },
});

/** Energy (J) of a spherical grain met at speed v (m/s), and impacts per second on a frontal area (m²). */
export const dustImpact: Method = defineMethod({
  id: 'dust-impact',
  version: '1.0.0',
  family: 'M13',
  name: 'Dust impact',
  summary: 'Impact energy of a grain at high speed and the rate of impacts on a frontal area.',
  equation: 'E = (\\gamma - 1)\\,\\tfrac{\\pi}{6} d^3 \\rho\\, c^2,\\quad \\dot N = \\gamma n_d v A',
  inputs: {
    v: { tex: 'v', label: 'speed through the medium', unit: 'c', bounds: VEHICLE_SPEED },
    d: { tex: 'd', label: 'grain diameter', unit: 'um', bounds: EXTENT },
    rho: { tex: '\\rho', label: 'grain density', unit: 'kg/m^3', bounds: EXTENT },
    n_d: { tex: 'n_d', label: 'number density of grains', unit: '1/m^3', bounds: COUNT, default: 0 },
    A: { tex: 'A', label: 'frontal area', unit: 'm^2', bounds: COUNT, default: 0 },
  },
  outputs: {
    m: { tex: 'm', label: 'grain mass', unit: 'kg' },
    E: { tex: 'E', label: 'impact energy', unit: 'J' },
    Ndot: { tex: '\\dot N', label: 'impacts per ship time', unit: '1/s' },
  },
  proof: [
    line('pi', '\\pi', '3.141592653589793', '1'),
    line('beta', '\\beta', 'v / c', '1'),
    line('gamma', '\\gamma', '1 / sqrt((1 - beta) * (1 + beta))', '1'),
    line('m', 'm', 'pi / 6 * d^3 * rho', 'kg'),
    line('E', 'E', 'm * (gamma * v)^2 / (1 + gamma)', 'J'),
    line('Ndot', '\\dot N', 'gamma * n_d * v * A', '1/s'),
  ],
  constants: constantIds('c'),
  validity: 'Spherical grain at rest before impact; rate counted in ship time.',
  reference: 'Kinetic energy by special relativity; count of grains in the ship frame.',
  cautions: ['Grain energies are point loads; the mean heat flux does not describe the damage.'],
  concepts: FAST,
  checks: ['M13-06'],
  solve({ v, d, rho, n_d, A }) {
    const beta = v / c;
    const gamma = 1 / Math.sqrt((1 - beta) * (1 + beta));
    const m = (Math.PI / 6) * d ** 3 * rho;
    return { m, E: (m * (gamma * v) ** 2) / (1 + gamma), Ndot: gamma * n_d * v * A };
  },
});
