import { INES, LENA, MIKA, ROSA } from '../people-in-studies';
import { baseline, calendar, check, set, submit, type Phrase, type Step } from '../script';
import { analyses } from './analyses';
import { frame, quantities } from './frame';
import { requirements, verifications } from './requirements';

const KEYS = [
  'MIS-001',
  'MIS-002',
  'PRB-001',
  'PRB-002',
  'ENG-001',
  'RAD-001',
  'RAD-002',
  'SHD-001',
  'FRO-001',
  'FRO-002',
];

/** Longreach as it went: written down, computed, and baselined as what it is. */
export function longreachSteps(now: Date): Step[] {
  const day = calendar(now);
  const step = (actor: string, days: number, hour: number, why: string, ...phrases: Phrase[]): Step => ({
    actor,
    at: day(days, hour),
    why,
    phrases,
  });
  return [
    step(INES, -30, 9, 'Study opened on the mission idea LR-MD-001', frame),
    step(MIKA, -29, 10, 'Numbers of the mission idea', quantities),
    step(MIKA, -28, 14, 'Energy, heat, shields and front', analyses),
    step(INES, -27, 9, 'Requirements and how they are shown', requirements, verifications),
    step(
      MIKA,
      -21,
      11,
      'Chamber opened as far as the field coils allow',
      set('f-abs', '1.0 %', { u: '0.2 %', source: 'Ray tracing of the chamber LR-TN-003: coils only' }),
    ),
    step(LENA, -18, 15, 'Power checked by hand', check('power', 'E = 142 t of mass in two years; agrees.')),
    step(INES, -15, 10, 'Ready for the concept review', submit(...KEYS)),
    step(
      ROSA,
      -13,
      11,
      'Board decision at the concept review',
      baseline({
        name: 'Concept as proposed',
        review: 'Concept review',
        note: 'Baselined to hold the finding: the concept does not get rid of its heat.',
        requirements: KEYS,
        quantities: ['m-dry', 'v-end', 't-burn', 'n-cyl', 'd-cyl', 'l-cyl'],
      }),
    ),
  ];
}
