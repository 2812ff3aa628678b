import { EXTENT } from '../bounds';
import { refuse, show } from '../define';
import { EVERY } from '../vocabulary';

export const TRANSFER_CONCEPTS = EVERY;
export const IMPULSIVE_VALIDITY =
  'Two bodies, circular coplanar orbits unless stated, burns short against the orbital period.';
export const TRANSFER_REFERENCE =
  'D. A. Vallado, Fundamentals of Astrodynamics and Applications, 4th ed., ch. 6 (from memory); H. D. Curtis, Orbital Mechanics for Engineering Students, ch. 6 and 8 (from memory).';

export const massParameter = {
  tex: '\\mu',
  label: 'mass parameter of the central body',
  unit: 'km^3/s^2',
  bounds: EXTENT,
};
export const bodyRadius = {
  tex: 'R_b',
  label: 'radius of the central body',
  unit: 'km',
  bounds: { min: 0, reason: 'a radius is not negative; 0 leaves the check out' },
  default: 0,
};
export const inclinationChange = {
  tex: '\\Delta i',
  label: 'plane change',
  unit: 'deg',
  bounds: { min: 0, max: Math.PI, reason: 'planes differ by 0° to 180°' },
};

/** A radius or semi-major axis of an orbit. */
export function orbitRadius(tex: string, label: string) {
  return { tex, label, unit: 'km', bounds: EXTENT };
}

/** Refusal of an orbit inside its central body, or null. */
export function insideBody(port: string, r: number, R_b: number) {
  return r < R_b
    ? refuse(
        port,
        `The orbit radius ${show(r, 'km')} is below the radius of the central body ${show(R_b, 'km')}; radii count from its centre.`,
      )
    : null;
}
