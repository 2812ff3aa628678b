import { EXTENT } from '../bounds';

export const TRIP_VALIDITY =
  'Straight line in flat space-time; proper acceleration constant; distances in the frame of the starting point.';
export const TRIP_REFERENCE =
  'C. W. Misner, K. S. Thorne, J. A. Wheeler, Gravitation, ch. 6 (from memory); P. Gibbs and D. Koks, The Relativistic Rocket, https://www.desy.de/user/projects/Physics/Relativity/SR/rocket.html (equations seen).';

export const acceleration = {
  tex: 'a',
  label: 'proper acceleration',
  unit: 'm/s^2',
  bounds: { ...EXTENT, reason: 'without acceleration the trip never starts' },
};
export const distance = { tex: 'd', label: 'distance', unit: 'ly', bounds: EXTENT };

export const tripOutputs = {
  beta: { tex: '\\beta', label: 'peak speed over c', unit: '1' },
  gamma: { tex: '\\gamma', label: 'peak Lorentz factor', unit: '1' },
  t: { tex: 't', label: 'elapsed time at the starting point', unit: 'yr' },
  tau: { tex: '\\tau', label: 'time on the ship’s clock', unit: 'yr' },
  phi_t: { tex: '\\phi_t', label: 'total rapidity, both burns', unit: '1' },
  K: { tex: 'K', label: 'propellant per final mass, photon rocket', unit: '1' },
};
