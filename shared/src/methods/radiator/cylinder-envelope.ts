import { EXTENT } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { EVERY } from '../vocabulary';

/** Side surface (m²) of N equal cylinders, the convex envelope of radial fins around an axis; end faces not counted. */
export const cylinderEnvelopeArea: Method = defineMethod({
  id: 'cylinder-envelope-area',
  version: '1.0.0',
  family: 'M7',
  name: 'Envelope area of cylinders',
  summary: 'Side surface of equal cylinders that enclose radiator fins; end faces are not counted.',
  equation: 'A = N \\pi D L',
  inputs: {
    N: {
      tex: 'N',
      label: 'number of cylinders',
      unit: '1',
      bounds: { min: 1, reason: 'at least one cylinder encloses the fins' },
      default: 1,
    },
    D: { tex: 'D', label: 'cylinder diameter', unit: 'm', bounds: EXTENT },
    L: { tex: 'L', label: 'cylinder length', unit: 'm', bounds: EXTENT },
  },
  outputs: { A: { tex: 'A', label: 'envelope area', unit: 'm^2' } },
  proof: [line('pi', '\\pi', '3.141592653589793', '1'), line('A', 'A', 'N * pi * D * L', 'm^2')],
  validity: 'Cylinders far enough apart not to see each other; side surface only.',
  reference: 'Geometry; that a body radiates as its convex envelope is common practice, no source.',
  cautions: ['Cylinders that stand close to each other exchange heat; their common envelope is smaller.'],
  concepts: EVERY,
  checks: ['M7-21'],
  solve: ({ N, D, L }) => ({ A: N * Math.PI * D * L }),
});

/** Effective share of the face area of N equal radial fins around one axis: their envelope over their faces, sin(π/N). */
export const radialFinEnvelope: Method = defineMethod({
  id: 'radial-fin-envelope',
  version: '1.0.0',
  family: 'M7',
  name: 'Envelope of radial fins',
  summary: 'Face area and convex envelope of equal flat fins around one axis.',
  equation: 'A_c = A_f \\sin\\frac{\\pi}{N}',
  inputs: {
    N: {
      tex: 'N',
      label: 'number of fins',
      unit: '1',
      bounds: { min: 2, reason: 'two fins make a flat panel; fewer have no envelope of this form' },
    },
    w: { tex: 'w', label: 'fin width from axis to edge', unit: 'm', bounds: EXTENT },
    L: { tex: 'L', label: 'fin length along the axis', unit: 'm', bounds: EXTENT },
  },
  outputs: {
    A_f: { tex: 'A_f', label: 'area of all faces', unit: 'm^2' },
    A_c: { tex: 'A_c', label: 'area of the convex envelope', unit: 'm^2' },
    s: { tex: 's', label: 'effective share of the face area', unit: '1' },
  },
  proof: [
    line('pi', '\\pi', '3.141592653589793', '1'),
    line('A_f', 'A_f', '2 * N * w * L', 'm^2'),
    line('s', 's', 'sin(pi / N)', '1'),
    line('A_c', 'A_c', 's * A_f', 'm^2'),
  ],
  validity: 'Equal flat fins at equal angles, long against their width; end openings neglected.',
  reference: 'Reciprocity of view factors; equals one minus J. R. Howell’s V-groove factor C-16 (from memory).',
  cautions: [],
  concepts: EVERY,
  checks: ['M7-08'],
  solve({ N, w, L }) {
    const A_f = 2 * N * w * L;
    const s = Math.sin(Math.PI / N);
    return { A_f, A_c: s * A_f, s };
  },
});
