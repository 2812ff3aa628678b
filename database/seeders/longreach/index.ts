import { DEMO_MEMBERSHIPS } from '../people-in-studies';
import type { StudyScript } from '../script';
import { longreachSteps } from './history';

/** The study that does not close: an annihilation-driven precursor probe meant for 0.3 c. */
export function longreach(now: Date): StudyScript {
  return {
    opening: {
      key: 'LONGREACH',
      name: 'Longreach',
      summary:
        'A precursor probe that annihilation is to bring to 0.3 c. Asked whether such a vehicle can get rid of its heat.',
      concept: 'annihilation-driven precursor probe',
      phase: 'Concept study',
    },
    memberships: DEMO_MEMBERSHIPS,
    steps: longreachSteps(now),
  };
}
