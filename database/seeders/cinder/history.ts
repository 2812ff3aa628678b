import { INES, LENA, MIKA, ROSA, TOMAS } from '../people-in-studies';
import { baseline, calendar, check, close, record, submit, type Phrase, type Step } from '../script';
import { analyses, ANALYSES } from './analyses';
import { frame, quantities } from './frame';
import { requirements, verifications } from './requirements';

const UNITS = ['TNK-001', 'TNK-002', 'TNK-003'];
const ENGINE = ['ENG-001', 'ENG-002', 'ENG-003', 'ENG-004'];
const STAGE = ['STG-003', 'STG-001', 'STG-002', 'MIS-001'];
const ALLOCATED = ['m-pl', 'm-p', 'dv-need', 'v-t', 't-w', 'd-i'];

/** Cinder as it went, without detours. */
export function cinderSteps(now: Date): Step[] {
  const day = calendar(now);
  const step = (actor: string, days: number, hour: number, why: string, ...phrases: Phrase[]): Step => ({
    actor,
    at: day(days, hour),
    why,
    phrases,
  });
  return [
    step(INES, -60, 9, 'Study opened on the mission idea CIN-MD-001', frame),
    step(MIKA, -59, 10, 'Numbers of the mission idea', quantities),
    step(MIKA, -58, 11, 'Tank, masses, delta-v and engine', analyses),
    step(INES, -57, 9, 'Requirements and how they are shown', requirements, verifications),
    step(LENA, -52, 14, 'Analyses checked', ...ANALYSES.map((name) => check(name, 'Recomputed by hand; agrees.'))),
    step(
      MIKA,
      -51,
      10,
      'Flooding studied',
      record('ENG-004', true, 'CIN-TN-003', '1', 'Absorbers hold the core subcritical when flooded.'),
    ),
    step(INES, -50, 10, 'Ready for the concept review', submit(...STAGE, ...ENGINE, ...UNITS)),
    step(
      ROSA,
      -47,
      11,
      'Board decision at the concept review',
      baseline({
        name: 'Concept',
        review: 'Concept review',
        note: 'Every requirement complies with the margin that policy asks for.',
        requirements: [...STAGE, ...ENGINE, ...UNITS],
        quantities: ALLOCATED,
      }),
    ),
    step(LENA, -45, 9, 'Units closed', close('Predicted with margin by a checked analysis.', ...UNITS)),
    step(
      TOMAS,
      -45,
      11,
      'Engine and stage closed',
      close('Predicted with margin by a checked analysis.', ...ENGINE, ...STAGE),
    ),
  ];
}
