import { INES, LENA, MIKA, ROSA, TOMAS } from '../people-in-studies';
import {
  approve,
  baseline,
  calendar,
  change,
  changeStep,
  check,
  close,
  dayOf,
  departure,
  grant,
  lower,
  refer,
  revisedLimit,
  set,
  submit,
  verify,
  vote,
  type Phrase,
  type Step,
} from '../script';
import { powerAnalyses, propulsionAnalyses, unitAnalyses } from './analyses';
import { frame } from './frame';
import { missionRequirements, vehicleRequirements } from './mission-requirements';
import { massQuantities } from './mass-quantities';
import { powerQuantities } from './power-quantities';
import { preparedRequirements, systemRequirements } from './system-requirements';
import { unitRequirements } from './unit-requirements';
import { vehicleQuantities } from './vehicle-quantities';
import { findings, missionVerifications, systemVerifications } from './verifications';

const numbered = (prefix: string, count: number): string[] =>
  Array.from({ length: count }, (_, index) => `${prefix}-${String(index + 1).padStart(3, '0')}`);

const MISSION = [...numbered('MIS', 6), ...numbered('VEH', 6)];
const SYSTEMS = [
  ...numbered('PRP', 5),
  ...numbered('PWR', 3),
  ...numbered('STR', 2),
  ...numbered('AVI', 2),
  'PAY-001',
  ...numbered('RCT', 4),
  ...numbered('CNV', 3),
  ...numbered('RAD', 4),
  ...numbered('THR', 4),
  'PPU-001',
  ...numbered('TNK', 4),
];
/** Allocations that the second baseline puts under control; estimates stay with the analysts. */
const CONTROLLED = [
  'p-bus',
  'm-prop',
  'm-cargo',
  'm-loop',
  't-rad',
  'l-pan',
  'w-pan',
  'eps',
  't-hot',
  'r-0',
  'r-sat',
  'v-tank',
  'p-tank',
  't-wall',
  'l-boom',
  'n-run',
  'n-thr',
  'n-pipe',
  'v-bus',
  'dv-dis',
];

/** Petrel as it went: set up, two baselines, direct edits between them, changes, a deviation, close-outs. */
export function petrelSteps(now: Date): Step[] {
  const day = calendar(now);
  const dueIn = (days: number): string => dayOf(day(days, 0));
  const step = (actor: string, days: number, hour: number, why: string, ...phrases: Phrase[]): Step => ({
    actor,
    at: day(days, hour),
    why,
    phrases,
  });
  return [
    step(INES, -44, 8.5, 'Study opened after the mission definition', frame),
    step(INES, -43, 9, 'Requirements of the mission and the vehicle', missionRequirements, vehicleRequirements),
    step(MIKA, -42, 9.5, 'Masses from the concept design PTL-TN-002', massQuantities),
    step(MIKA, -42, 13, 'Power, heat and thrust', powerQuantities),
    step(MIKA, -41, 10, 'Trajectory, tank, structure and cargo', vehicleQuantities),
    step(MIKA, -40, 14, 'First closed set of analyses', powerAnalyses, propulsionAnalyses),
    step(MIKA, -39, 9, 'Loads on units, reliability, pointing and cargo', unitAnalyses),
    step(INES, -38, 10, 'Flow-down to systems', systemRequirements(dueIn(24))),
    step(INES, -37, 11, 'Flow-down to units', unitRequirements),
    step(INES, -36, 15, 'Verification of mission and vehicle', missionVerifications),
    step(MIKA, -35, 9.25, 'Verification of systems and units', systemVerifications),
    step(INES, -33, 16, 'Ready for the mission definition review', submit(...MISSION)),
    step(
      ROSA,
      -31,
      11,
      'Board decision at the mission definition review',
      baseline({
        name: 'Mission definition',
        review: 'Mission definition review',
        note: 'Mission and vehicle requirements. Quantities stay with the analysts.',
        requirements: MISSION,
        quantities: [],
      }),
    ),
    step(
      MIKA,
      -27,
      10.5,
      'Grid voltage raised after the beam extraction test',
      set('isp', '6500 s', { basis: 'calculated', source: 'Beam extraction test PTL-TR-002, scaled to flight grids' }),
    ),
    step(
      LENA,
      -26,
      9,
      'Rocket equation checked by hand',
      check('delta-v', 'Recomputed by hand from the roll-up; agrees to four digits.'),
    ),
    step(
      TOMAS,
      -25,
      15.5,
      'Radiator checked against the cycle model',
      check('rejection', 'Area, emissivity and sink agree with PTL-TN-005.'),
    ),
    step(
      INES,
      -24,
      9,
      'Launcher user manual, new issue',
      change('mass-limit', {
        title: 'Lower the initial mass limit to 116 t',
        reason:
          'The launcher lifts 40 t to the start orbit instead of 42.7 t; three launches carry 116 t after adapters.',
        due: dueIn(-18),
        edits: [
          revisedLimit(
            'VEH-002',
            '≤ 116 t',
            'The Petrel vehicle shall have an initial mass in the start orbit of at most 116 t, cargo and propellant included.',
          ),
        ],
      }),
      changeStep('mass-limit', 'submit'),
    ),
    step(LENA, -23, 10, 'Taken into assessment', changeStep('mass-limit', 'assess')),
    step(ROSA, -21, 10, 'On the agenda of the board', refer('mass-limit', dueIn(-18))),
    step(LENA, -20, 11, 'Vote', vote('mass-limit', 'for', 'The launcher decides this, not the study.')),
    step(TOMAS, -20, 14, 'Vote', vote('mass-limit', 'for', 'Four tonnes have to come out of structure and power.')),
    step(
      ROSA,
      -18,
      9.5,
      'Board decision',
      approve(
        'mass-limit',
        'Approved although the vehicle now misses the limit: a study that ignores the launcher helps nobody.',
      ),
    ),
    step(MIKA, -17, 10, 'Reviewed designs', findings),
    step(INES, -16, 16, 'Ready for the system requirements review', submit(...SYSTEMS)),
    step(
      ROSA,
      -14,
      10,
      'Board decision at the system requirements review',
      baseline({
        name: 'System requirements',
        review: 'System requirements review',
        note: 'Requirements of all four levels. Allocated quantities come under control.',
        requirements: [...MISSION, ...SYSTEMS],
        quantities: CONTROLLED,
      }),
    ),
    step(
      LENA,
      -12,
      9,
      'Rows closed at concept level',
      close(
        'Predicted with margin by a recomputed analysis.',
        'TNK-001',
        'TNK-002',
        'TNK-003',
        'TNK-004',
        'PPU-001',
        'STR-002',
        'AVI-001',
        'THR-003',
      ),
    ),
    step(
      TOMAS,
      -12,
      11,
      'Rows closed at concept level',
      close(
        'Predicted with margin by a recomputed analysis.',
        'RCT-002',
        'RCT-003',
        'CNV-002',
        'CNV-003',
        'THR-004',
        'STR-001',
        'VEH-005',
        'AVI-002',
      ),
    ),
    step(
      TOMAS,
      -11,
      14,
      'Efficiency rests on one cycle model',
      lower(
        'CNV-001',
        'partial',
        'Only one cycle model stands behind the conversion efficiency; a second one is awaited.',
      ),
    ),
    step(
      INES,
      -10,
      10,
      'Asked for by the tank team',
      change('insulation', {
        title: 'Thicken the tank insulation to 70 mm',
        reason: 'A thicker blanket brings the boil-off below its limit with margin, for 60 kg.',
        due: dueIn(12),
        edits: [
          set('d-ins', '70 mm', { source: 'Proposal of the tank team' }),
          set('m-ins', '0.51 t', { source: 'Proposal of the tank team' }),
        ],
      }),
      changeStep('insulation', 'submit'),
    ),
    step(
      MIKA,
      -9,
      9.5,
      'Coupon measurement of the blanket',
      set('k-ins', '5.9e-5 W/(m K)', { basis: 'measured', source: 'Coupon measurement PTL-TR-004' }),
    ),
    step(
      MIKA,
      -8,
      13,
      'Blanket as drawn',
      set('d-ins', '61 mm', { basis: 'allocated', source: 'Layout PTL-DR-002, issue 3' }),
    ),
    step(
      INES,
      -7,
      9,
      'Boil-off misses its limit until the blanket is settled',
      departure('boil-off', {
        kind: 'deviation',
        class: 'minor',
        requirement: 'TNK-004',
        title: 'Boil-off up to 0.0078 % a day',
        reason:
          'The measured blanket conducts more than assumed. One week without the cooler costs 30 kg instead of 27 kg.',
        effectivity: 'Concept phase, until the tank insulation is baselined',
        expires: dueIn(75),
      }),
    ),
    step(ROSA, -6, 15, 'Decision of the chair', grant('boil-off', 'The loss is covered by the residual propellant.')),
    step(
      MIKA,
      -5,
      10,
      'Heat pipe life test ended early',
      change('cooler-radiator', {
        title: 'Lower the radiator temperature to 760 K and lengthen the panels',
        reason:
          'The heat-pipe working fluid loses margin above 800 K. Longer panels keep the heat rejection while the surface runs cooler.',
        due: dueIn(6),
        edits: [
          set('t-rad', '760 K', { source: 'Cycle model PTL-TN-005, case 9' }),
          set('l-pan', '25.0 m', { source: 'Layout PTL-DR-003, option C' }),
          set('m-loop', '2.00 t', { source: 'Scaled with the panel length' }),
          revisedLimit(
            'RAD-001',
            '≤ 850 K',
            'The main radiator shall hold its peak surface temperature at or below 850 K at full power.',
          ),
          revisedLimit(
            'RAD-004',
            '≤ 5.0 t',
            'The main radiator shall have a predicted mass of at most 5.0 t, coolant loop included.',
          ),
        ],
      }),
      changeStep('cooler-radiator', 'submit'),
    ),
    step(LENA, -4, 9, 'Taken into assessment', changeStep('cooler-radiator', 'assess')),
    step(ROSA, -3, 11, 'On the agenda of the board', refer('cooler-radiator', dueIn(6))),
    step(
      ROSA,
      -2,
      9,
      'Vote',
      vote('cooler-radiator', 'for', 'The radiator has to work before the vehicle can be light.'),
    ),
    step(
      LENA,
      -2,
      14,
      'Vote',
      vote('cooler-radiator', 'against', 'The mass limit is already missed; another tonne needs a place to come from.'),
    ),
    step(INES, -1, 10, 'Next flow-down', preparedRequirements(dueIn(30)), verify('PWR-004', 'unit-masses.m_D')),
  ];
}
