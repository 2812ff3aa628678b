import { EXHAUST_SPEED, MASS, MASS_OR_NONE, VEHICLE_SPEED } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line, refuse, show } from '../define';
import type { Method } from '../types';
import { FAST } from '../vocabulary';

const VALIDITY =
  'Special relativity; constant effective exhaust speed; losses leave without net momentum in the ship frame; no external force.';
const REFERENCE =
  'J. Ackeret, Zur Theorie der Raketen, Helvetica Physica Acta 19 (1946) 103; S. Westmoreland, Acta Astronautica 67 (2010) 1248, arXiv:0910.1965 (abstract seen).';
const EXHAUST_CAUTION =
  'The effective exhaust speed is axial momentum per rest mass that leaves the ship, after all losses; the speed of the exhaust particles is larger.';

const exhaustSpeed = { tex: 'w', label: 'effective exhaust speed', unit: 'c', bounds: EXHAUST_SPEED };
const finalSpeed = { tex: 'v', label: 'speed change', unit: 'c', bounds: VEHICLE_SPEED };
const burns = {
  tex: 'n',
  label: 'number of equal speed changes',
  unit: '1',
  bounds: { min: 1, reason: 'accelerating once is one speed change; braking at the target makes two' },
  default: 1,
};
const ratioOutputs = {
  beta: { tex: '\\beta', label: 'speed change over c', unit: '1' },
  phi: { tex: '\\phi', label: 'total rapidity', unit: '1' },
  R: { tex: 'R', label: 'mass ratio', unit: '1' },
};
const ratioLines = [
  line('beta', '\\beta', 'v / c', '1'),
  line('phi', '\\phi', 'n * atanh(beta)', '1'),
  line('R', 'R', 'exp(phi * c / w)', '1'),
];

/** Mass ratio for a speed change at constant effective exhaust speed w (m/s), by rapidity. Ackeret 1946. */
export const relativisticMassRatio: Method = defineMethod({
  id: 'relativistic-mass-ratio',
  version: '1.0.0',
  family: 'M2',
  name: 'Relativistic mass ratio for a speed',
  summary: 'Ratio of initial to final rest mass that a speed change demands, up to the photon limit.',
  equation: 'R = \\left(\\frac{1+\\beta}{1-\\beta}\\right)^{n c/(2w)}',
  inputs: { w: exhaustSpeed, v: finalSpeed, n: burns },
  outputs: ratioOutputs,
  proof: ratioLines,
  constants: constantIds('c'),
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [EXHAUST_CAUTION],
  concepts: FAST,
  checks: ['M2-01', 'M2-03', 'M2-08'],
  solve({ w, v, n }) {
    const beta = v / c;
    const phi = n * Math.atanh(beta);
    return { beta, phi, R: Math.exp((phi * c) / w) };
  },
});

/** Propellant (kg) for a speed change of a known final rest mass, by rapidity. Ackeret 1946. */
export const relativisticPropellant: Method = defineMethod({
  id: 'relativistic-propellant',
  version: '1.0.0',
  family: 'M2',
  name: 'Relativistic propellant for a speed',
  summary: 'Propellant and initial mass that bring a known final mass to a speed, up to the photon limit.',
  equation: 'm_p = m_f\\left[\\left(\\frac{1+\\beta}{1-\\beta}\\right)^{n c/(2w)} - 1\\right]',
  inputs: {
    w: exhaustSpeed,
    v: finalSpeed,
    m_f: { tex: 'm_f', label: 'final rest mass', unit: 't', bounds: MASS },
    n: burns,
  },
  outputs: {
    ...ratioOutputs,
    m_p: { tex: 'm_p', label: 'propellant mass', unit: 't' },
    m_0: { tex: 'm_0', label: 'initial rest mass', unit: 't' },
  },
  proof: [...ratioLines, line('m_p', 'm_p', 'm_f * expm1(phi * c / w)', 'kg'), line('m_0', 'm_0', 'm_f + m_p', 'kg')],
  constants: constantIds('c'),
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [EXHAUST_CAUTION],
  concepts: FAST,
  checks: [],
  solve({ w, v, m_f, n }) {
    const beta = v / c;
    const phi = n * Math.atanh(beta);
    const exponent = (phi * c) / w;
    const m_p = m_f * Math.expm1(exponent);
    return { beta, phi, R: Math.exp(exponent), m_p, m_0: m_f + m_p };
  },
});

/** Final speed (m/s) from rest masses and effective exhaust speed w (m/s), by rapidity. Ackeret 1946. */
export const relativisticRocketSpeed: Method = defineMethod({
  id: 'relativistic-rocket-speed',
  version: '1.0.0',
  family: 'M2',
  name: 'Relativistic speed from masses',
  summary: 'Speed change that a propellant load gives a vehicle of known initial rest mass, up to the photon limit.',
  equation: '\\beta = \\tanh\\left(\\frac{w}{c}\\ln\\frac{m_0}{m_0 - m_p}\\right)',
  inputs: {
    w: exhaustSpeed,
    m_0: { tex: 'm_0', label: 'initial rest mass', unit: 't', bounds: MASS },
    m_p: { tex: 'm_p', label: 'propellant rest mass expelled', unit: 't', bounds: MASS_OR_NONE },
  },
  outputs: {
    m_f: { tex: 'm_f', label: 'final rest mass', unit: 't' },
    R: { tex: 'R', label: 'mass ratio', unit: '1' },
    phi: { tex: '\\phi', label: 'rapidity', unit: '1' },
    beta: { tex: '\\beta', label: 'speed change over c', unit: '1' },
    v: { tex: 'v', label: 'speed change', unit: 'c' },
    dv: { tex: '\\Delta v', label: 'delta-v in the ship frame (rapidity times c)', unit: 'km/s' },
  },
  proof: [
    line('m_f', 'm_f', 'm_0 - m_p', 'kg'),
    line('R', 'R', 'm_0 / m_f', '1'),
    line('phi', '\\phi', 'w / c * log(R)', '1'),
    line('beta', '\\beta', 'tanh(phi)', '1'),
    line('v', 'v', 'beta * c', 'm/s'),
    line('dv', '\\Delta v', 'phi * c', 'm/s'),
  ],
  constants: constantIds('c'),
  validity: VALIDITY,
  reference: REFERENCE,
  cautions: [EXHAUST_CAUTION],
  concepts: FAST,
  checks: ['M2-09'],
  solve({ w, m_0, m_p }) {
    if (m_p >= m_0) {
      return refuse(
        'm_p',
        `The propellant mass ${show(m_p, 't')} is not below the initial mass ${show(m_0, 't')}; the initial mass includes the propellant.`,
      );
    }
    const phi = -(w / c) * Math.log1p(-m_p / m_0);
    const beta = Math.tanh(phi);
    return { m_f: m_0 - m_p, R: m_0 / (m_0 - m_p), phi, beta, v: beta * c, dv: phi * c };
  },
});
