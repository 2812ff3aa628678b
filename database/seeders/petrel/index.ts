import { DEMO_MEMBERSHIPS } from '../people-in-studies';
import type { StudyScript } from '../script';
import { petrelSteps } from './history';

/** The working study: a nuclear-electric cargo tug to the Saturn system, almost closed. */
export function petrel(now: Date): StudyScript {
  return {
    opening: {
      key: 'PETREL',
      name: 'Petrel',
      summary: 'A nuclear-electric tug that carries 20 t of cargo to the Saturn system within eight years.',
      concept: 'nuclear-electric cargo tug',
      phase: 'Concept study',
    },
    memberships: DEMO_MEMBERSHIPS,
    steps: petrelSteps(now),
  };
}
