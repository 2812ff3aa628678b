import { DENSITY, EXTENT } from '../bounds';
import { CHEMICAL, NUCLEAR_ELECTRIC, NUCLEAR_THERMAL } from '../vocabulary';

export const TANK_CONCEPTS = [CHEMICAL, NUCLEAR_THERMAL, NUCLEAR_ELECTRIC];
export const TANK_REFERENCE =
  'D. K. Huzel and D. H. Huang, Design of Liquid-Propellant Rocket Engines, NASA SP-125, ch. VIII, eqs. 8-9 to 8-33 (samples cited by the public library proptools).';

export const tankPressure = { tex: 'p', label: 'tank pressure over ambient', unit: 'kPa', bounds: EXTENT };
export const allowableStress = { tex: 's', label: 'allowable stress', unit: 'MPa', bounds: EXTENT };
export const weldEfficiency = {
  tex: 'e_w',
  label: 'weld efficiency',
  unit: '1',
  bounds: { min: 0, minExclusive: true, max: 1, reason: 'a weld is at most as strong as the sheet' },
  default: 1,
};
export const wallDensity = { tex: '\\rho', label: 'density of the wall', unit: 'kg/m^3', bounds: DENSITY };
export const fittings = {
  tex: 'k_f',
  label: 'factor for fittings and margins',
  unit: '1',
  bounds: { min: 1, reason: 'fittings add mass; 1.1 to 1.5 is common practice' },
  default: 1,
};
export const modulus = { tex: 'E', label: 'elastic modulus', unit: 'GPa', bounds: EXTENT };

/** Warning when a wall is too thick for the thin-shell relations, or null. */
export function thickWallWarning(t: number, r: number): string | null {
  return t > 0.1 * r ? 'The wall is thicker than a tenth of the radius: thin-shell relations do not hold.' : null;
}
