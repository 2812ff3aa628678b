import { EXTENT } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { IMPULSIVE_VALIDITY, TRANSFER_CONCEPTS, TRANSFER_REFERENCE, inclinationChange } from './ports';

const inclination = (tex: string, label: string) => ({
  tex,
  label,
  unit: 'deg',
  bounds: { min: 0, max: Math.PI, reason: 'inclinations run from 0° to 180°' },
});

/** Delta-v (m/s) that turns a velocity by an angle while its size changes from v_1 to v_2 (m/s). */
export const planeChange: Method = defineMethod({
  id: 'plane-change',
  version: '1.0.0',
  family: 'M12',
  name: 'Plane change',
  summary: 'Impulse that turns the orbital plane, alone or together with a change of speed.',
  equation: '\\Delta v = \\sqrt{v_1^2 + v_2^2 - 2 v_1 v_2\\cos\\Delta i}',
  inputs: {
    v_1: { tex: 'v_1', label: 'speed before', unit: 'km/s', bounds: EXTENT },
    v_2: { tex: 'v_2', label: 'speed after', unit: 'km/s', bounds: EXTENT },
    di: inclinationChange,
  },
  outputs: { dv: { tex: '\\Delta v', label: 'delta-v', unit: 'km/s' } },
  proof: [line('dv', '\\Delta v', 'sqrt((v_1 - v_2)^2 + 4 * v_1 * v_2 * sin(di / 2)^2)', 'm/s')],
  validity: IMPULSIVE_VALIDITY,
  reference: TRANSFER_REFERENCE,
  cautions: [],
  concepts: TRANSFER_CONCEPTS,
  checks: ['M12-11'],
  solve: ({ v_1, v_2, di }) => ({ dv: Math.hypot(v_1 - v_2, 2 * Math.sqrt(v_1 * v_2) * Math.sin(di / 2)) }),
});

/** Angle (rad) between two orbital planes from inclinations and the difference of their nodes (rad). */
export const planeAngle: Method = defineMethod({
  id: 'plane-angle',
  version: '1.0.0',
  family: 'M12',
  name: 'Angle between orbital planes',
  summary: 'Plane change between two orbits that differ in inclination and node.',
  equation: '\\cos\\theta = \\cos i_1\\cos i_2 + \\sin i_1\\sin i_2\\cos\\Delta\\Omega',
  inputs: {
    i_1: inclination('i_1', 'first inclination'),
    i_2: inclination('i_2', 'second inclination'),
    dO: { tex: '\\Delta\\Omega', label: 'difference of the nodes', unit: 'deg' },
  },
  outputs: { theta: { tex: '\\theta', label: 'angle between the planes', unit: 'deg' } },
  proof: [
    line('h', 'h', 'sin((i_1 - i_2) / 2)^2 + sin(i_1) * sin(i_2) * sin(dO / 2)^2', '1'),
    line('theta', '\\theta', '2 * asin(sqrt(min(1, h)))', 'rad'),
  ],
  validity: 'Inclinations against the same reference plane.',
  reference: `Spherical trigonometry, written with half-angles; ${TRANSFER_REFERENCE}`,
  cautions: [],
  concepts: TRANSFER_CONCEPTS,
  checks: [],
  solve({ i_1, i_2, dO }) {
    const h = Math.sin((i_1 - i_2) / 2) ** 2 + Math.sin(i_1) * Math.sin(i_2) * Math.sin(dO / 2) ** 2;
    return { theta: 2 * Math.asin(Math.sqrt(Math.min(1, h))) };
  },
});
