import { EXHAUST_SPEED, MASS_RATIO, VEHICLE_SPEED } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line } from '../define';
import { bisect } from '../numerics';
import type { Method } from '../types';
import { FAST, ROCKETS } from '../vocabulary';

const FRAME_CAUTION = 'Efficiencies depend on the frame; this one is counted in the frame of launch.';
const exhaustSpeed = { tex: 'v_e', label: 'exhaust speed', unit: 'km/s', bounds: EXHAUST_SPEED };
const massRatio = { tex: 'R', label: 'mass ratio', unit: '1', bounds: MASS_RATIO };
const integratedOutput = { tex: '\\eta_{int}', label: 'integrated propulsive efficiency', unit: '1' };

/** Instantaneous propulsive efficiency at vehicle speed v and exhaust speed v_e (m/s), classical. */
export const propulsiveEfficiency: Method = defineMethod({
  id: 'propulsive-efficiency',
  version: '1.0.0',
  family: 'M4',
  name: 'Instantaneous propulsive efficiency',
  summary: 'Share of the jet energy that goes into the vehicle at one moment.',
  equation: '\\eta_p = \\frac{2x}{1 + x^2},\\quad x = \\frac{v}{v_e}',
  inputs: { v: { tex: 'v', label: 'vehicle speed', unit: 'km/s', bounds: VEHICLE_SPEED }, v_e: exhaustSpeed },
  outputs: { eta_p: { tex: '\\eta_p', label: 'propulsive efficiency', unit: '1' } },
  proof: [line('x', 'x', 'v / v_e', '1'), line('eta_p', '\\eta_p', '2 * x / (1 + x^2)', '1')],
  validity: 'Classical; observer at rest in the frame of launch.',
  reference: 'G. P. Sutton and O. Biblarz, Rocket Propulsion Elements, ch. 2 (from memory).',
  cautions: [FRAME_CAUTION],
  concepts: ROCKETS,
  checks: ['M4-04'],
  solve({ v, v_e }) {
    const x = v / v_e;
    return { eta_p: (2 * x) / (1 + x ** 2) };
  },
});

/** Share of the jet energy that ends in the final mass after a burn from rest, classical; 0 at a mass ratio of 1. */
export const integratedEfficiency: Method = defineMethod({
  id: 'integrated-efficiency',
  version: '1.0.0',
  family: 'M4',
  name: 'Integrated propulsive efficiency',
  summary: 'Share of all the jet energy of a burn from rest that ends as kinetic energy of the final mass.',
  equation: '\\eta_{int} = \\frac{(\\ln R)^2}{R - 1}',
  inputs: { R: massRatio },
  outputs: { eta_int: integratedOutput },
  proof: [line('eta_int', '\\eta_{int}', 'R > 1 ? log(R)^2 / (R - 1) : 0', '1')],
  validity: 'Classical; constant exhaust speed; burn from rest in the frame of launch.',
  reference: 'H. Oberth, Wege zur Raumschiffahrt, 1929 (from memory).',
  cautions: [FRAME_CAUTION],
  concepts: ROCKETS,
  checks: [],
  solve: ({ R }) => ({ eta_int: R > 1 ? Math.log(R) ** 2 / (R - 1) : 0 }),
});

/** Mass ratio of greatest integrated efficiency, the root of ln R = 2(R − 1)/R, and the delta-v (m/s) it gives. */
export const optimumMassRatio: Method = defineMethod({
  id: 'optimum-mass-ratio',
  version: '1.0.0',
  family: 'M4',
  name: 'Mass ratio of greatest integrated efficiency',
  summary: 'Mass ratio and delta-v at which most of the jet energy ends in the final mass.',
  equation: '\\ln R = \\frac{2(R - 1)}{R}',
  inputs: { v_e: exhaustSpeed },
  outputs: {
    R: { tex: 'R', label: 'mass ratio', unit: '1' },
    dv: { tex: '\\Delta v', label: 'delta-v', unit: 'km/s' },
    eta_int: integratedOutput,
  },
  validity: 'Classical; constant exhaust speed; burn from rest in the frame of launch.',
  reference: 'H. Oberth, Wege zur Raumschiffahrt, 1929 (from memory).',
  cautions: [FRAME_CAUTION],
  concepts: ROCKETS,
  checks: ['M4-05'],
  solve({ v_e }) {
    const R = bisect((ratio) => Math.log(ratio) - (2 * (ratio - 1)) / ratio, 3, 8);
    return { R, dv: v_e * Math.log(R), eta_int: Math.log(R) ** 2 / (R - 1) };
  },
});

/** Integrated propulsive efficiency with exhaust of rest mass at any speed (m/s) up to c, where it is a photon rocket's. */
export const relativisticIntegratedEfficiency: Method = defineMethod({
  id: 'relativistic-integrated-efficiency',
  version: '1.0.0',
  family: 'M4',
  name: 'Relativistic integrated efficiency',
  summary: 'Share of the jet energy that ends as kinetic energy of the final mass, at any exhaust speed.',
  equation:
    '\\eta_{int} = \\frac{\\gamma_f - 1}{(1 - 1/\\gamma_e)(R - 1)},\\quad \\gamma_f = \\cosh\\left(\\frac{v_e}{c}\\ln R\\right)',
  inputs: { v_e: { ...exhaustSpeed, unit: 'c' }, R: massRatio },
  outputs: {
    gamma_f: { tex: '\\gamma_f', label: 'final Lorentz factor', unit: '1' },
    eta_int: integratedOutput,
  },
  proof: [
    line('b_e', '\\beta_e', 'v_e / c', '1'),
    line('phi', '\\phi', 'b_e * log(R)', '1'),
    line('gamma_f', '\\gamma_f', 'cosh(phi)', '1'),
    line('g_e', '1 - 1/\\gamma_e', 'b_e^2 / (1 + sqrt((1 - b_e) * (1 + b_e)))', '1'),
    line('eta_int', '\\eta_{int}', 'R > 1 ? 2 * sinh(phi / 2)^2 / (g_e * (R - 1)) : 0', '1'),
  ],
  constants: constantIds('c'),
  validity: 'Exhaust of one speed along the axis; the energy counted is what accelerates it, or all of it at c.',
  reference: 'Energy balance in the frame of launch, checked by integration.',
  cautions: [FRAME_CAUTION],
  concepts: FAST,
  checks: ['M4-09'],
  solve({ v_e, R }) {
    const b_e = v_e / c;
    const phi = b_e * Math.log(R);
    const spent = (b_e ** 2 / (1 + Math.sqrt((1 - b_e) * (1 + b_e)))) * (R - 1);
    return { gamma_f: Math.cosh(phi), eta_int: R > 1 ? (2 * Math.sinh(phi / 2) ** 2) / spent : 0 };
  },
});
