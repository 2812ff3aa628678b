import type { Check } from './check';

/** Family M5: jets, thrust and power. */
export const JET_CHECKS: readonly Check[] = [
  {
    id: 'M5-01',
    method: 'jet-power',
    inputs: { F: 96000, v_e: 1e5 },
    output: 'P_j',
    expected: [4.8, 'GW'],
    tolerance: 1e-6,
    provenance: 'published',
    source: 'http://www.projectrho.com/public_html/rocket/realdesignsfusion.php (thrust power)',
  },
  {
    id: 'M5-09',
    method: 'photon-thrust',
    inputs: { P: [299.8, 'MW'] },
    output: 'F',
    expected: 1,
    tolerance: 1e-3,
    provenance: 'published-memory',
    source: 'Photon rocket rule, about 300 MW per newton',
  },
  {
    id: 'M5-10',
    method: 'mass-flow-thrust',
    inputs: { mdot: 0.72, v_e: [10600, 'km/s'] },
    output: 'F',
    expected: 7.54e6,
    tolerance: 1.5e-2,
    provenance: 'published-memory',
    source:
      'Project Daedalus first stage (BIS 1978, thrust from memory); flow and exhaust speed http://crowlspace.com/?m=201208',
  },
  {
    id: 'M5-12',
    method: 'electric-acceleration',
    inputs: { P: 1e6, eta: 0.6, v_e: 50000, m: 100000 },
    output: 'a',
    expected: 0.00024,
    tolerance: 1e-9,
    provenance: 'arithmetic',
    source: '2 × 0.6 × 1 MW / 50 km/s / 100 t',
  },
];
