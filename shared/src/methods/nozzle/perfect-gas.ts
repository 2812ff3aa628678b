import { MASS, TEMPERATURE, EXTENT } from '../bounds';
import { bisect } from '../numerics';

export const NOZZLE_VALIDITY =
  'Perfect gas of constant composition (frozen), one-dimensional, isentropic, choked at the throat. Hydrogen above about 2500 K dissociates and its heat capacity ratio falls to about 1.3: give it, do not assume 1.4.';
export const NOZZLE_REFERENCE =
  'G. P. Sutton and O. Biblarz, Rocket Propulsion Elements, ch. 3, eqs. 3-16, 3-25, 3-30 (from memory); NACA Report 1135 (1953).';

export const chamberPressure = { tex: 'p_c', label: 'chamber pressure', unit: 'MPa', bounds: EXTENT };
export const exitPressure = { tex: 'p_e', label: 'exit pressure', unit: 'kPa', bounds: EXTENT };
export const ambientPressure = {
  tex: 'p_a',
  label: 'ambient pressure',
  unit: 'kPa',
  bounds: { min: 0, reason: 'absolute pressure; 0 is vacuum' },
  default: 0,
};
export const chamberTemperature = {
  tex: 'T_c',
  label: 'chamber temperature',
  unit: 'K',
  temperature: 'absolute' as const,
  bounds: TEMPERATURE,
};
export const heatRatio = {
  tex: '\\gamma',
  label: 'heat capacity ratio',
  unit: '1',
  bounds: { min: 1, minExclusive: true, max: 5 / 3, reason: 'a gas has a ratio above 1, at most 5/3 for single atoms' },
};
export const molarMass = { tex: 'M', label: 'molar mass of the exhaust', unit: 'g/mol', bounds: MASS };

/** Exit Mach number of an isentropic expansion from p_c to p_e. */
export function machFromPressures(p_c: number, p_e: number, k: number): number {
  return Math.sqrt((2 / (k - 1)) * Math.expm1(((k - 1) / k) * Math.log(p_c / p_e)));
}

/** Static over chamber pressure at a Mach number. */
export function pressureRatio(Ma: number, k: number): number {
  return Math.exp((-k / (k - 1)) * Math.log1p(((k - 1) / 2) * Ma ** 2));
}

/** Area over throat area at a Mach number. */
export function areaRatio(Ma: number, k: number): number {
  return ((2 / (k + 1)) * (1 + ((k - 1) / 2) * Ma ** 2)) ** ((k + 1) / (2 * (k - 1))) / Ma;
}

/** Supersonic Mach number at an area ratio of at least 1, by bisection in the logarithm of the Mach number. */
export function supersonicMach(eps: number, k: number): number {
  const excess = (logMach: number) => Math.log(areaRatio(Math.exp(logMach), k)) - Math.log(eps);
  let high = 1;
  while (excess(high) < 0) high *= 2;
  return Math.exp(bisect(excess, 0, high));
}

/** Choked mass-flow function of the heat capacity ratio. */
export function flowFunction(k: number): number {
  return Math.sqrt(k) * (2 / (k + 1)) ** ((k + 1) / (2 * (k - 1)));
}

/** Highest ambient over chamber pressure at which the throat is choked. */
export function criticalPressureRatio(k: number): number {
  return (2 / (k + 1)) ** (k / (k - 1));
}

/** Thrust coefficient in vacuum without its pressure term: momentum of the exhaust. */
export function momentumCoefficient(p_ratio: number, k: number): number {
  return flowFunction(k) * Math.sqrt(((2 * k) / (k - 1)) * -Math.expm1(((k - 1) / k) * Math.log(p_ratio)));
}

/** Warning when the flow is likely to separate from the wall, by the rule of Summerfield; null otherwise. */
export function separationWarning(p_e: number, p_a: number): string | null {
  return p_e < 0.4 * p_a
    ? 'The exit pressure is below 0.4 of the ambient pressure: the flow is likely to separate.'
    : null;
}
