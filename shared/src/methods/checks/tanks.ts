import type { Check } from './check';

const HUZEL =
  'Huzel and Huang, NASA SP-125, sample calculation 8-3, in github.com/mvernacc/proptools tank_structure_test.py (converted from inch and psi)';
const RADIUS = 1.0414;
const LENGTH = 1.19126;
const ALUMINIUM = { rho: 2795.670376, s: 262000777.1 };

/** Family M14: tanks. */
export const TANK_CHECKS: readonly Check[] = [
  {
    id: 'M14-01',
    method: 'cylindrical-tank-wall',
    inputs: { p: 1172108.74, r: RADIUS, l: LENGTH, ...ALUMINIUM, e_w: 1 },
    output: 't',
    expected: 0.0046482,
    tolerance: 5e-3,
    provenance: 'published',
    source: HUZEL,
  },
  {
    id: 'M14-03',
    method: 'ellipsoidal-ends',
    inputs: { p: 1241056.313, a: RADIUS, k: 1.394557823, K: 0.8, ...ALUMINIUM },
    output: 't_k',
    expected: 0.003937,
    tolerance: 5e-3,
    provenance: 'published',
    source: HUZEL,
  },
  {
    id: 'M14-04',
    method: 'ellipsoidal-ends',
    inputs: { p: 1241056.313, a: RADIUS, k: 1.394557823, K: 0.8, ...ALUMINIUM },
    output: 'E_d',
    expected: 4.56,
    tolerance: 1e-3,
    provenance: 'published',
    source: HUZEL,
  },
  {
    id: 'M14-06',
    method: 'cylindrical-shell-mass',
    inputs: { r: RADIUS, l: LENGTH, t: 0.0046482, rho: ALUMINIUM.rho },
    output: 'm',
    expected: 101.287176221,
    tolerance: 1e-3,
    provenance: 'published',
    source: HUZEL,
  },
  {
    id: 'M14-07',
    method: 'end-buckling',
    inputs: { a: RADIUS, b: 0.74676, t: 0.003683, E: 7.170547585e10, C_b: 0.1 },
    output: 'p_cr',
    expected: 92389.7477284512,
    tolerance: 1e-2,
    provenance: 'published',
    source: HUZEL,
  },
  {
    id: 'M14-09',
    method: 'axial-buckling',
    inputs: { a: RADIUS, l: LENGTH, t: 0.0046482, E: 7.170547585e10, p: 0 },
    output: 'F_cr',
    expected: 3664889.78881313,
    tolerance: 1e-3,
    provenance: 'published',
    source: HUZEL.replace('8-3', '8-4'),
  },
  {
    id: 'M14-10',
    method: 'spherical-tank',
    inputs: { p: 3e5, V: 100, rho: 2700, s: 2e8 },
    output: 'm',
    expected: 607.5,
    tolerance: 1e-6,
    provenance: 'computed',
    source: 'Radius, wall and area against 1.5 p V ρ/s',
  },
  {
    id: 'M14-12',
    method: 'tank-volume',
    inputs: { m_p: 10000, rho_p: 70.8, f_u: 0.05, f_r: 0.02 },
    output: 'V',
    expected: 151.650312221231,
    tolerance: 1e-6,
    provenance: 'arithmetic',
    source: '10 t × 1.02/70.8 kg/m³/0.95',
  },
];
