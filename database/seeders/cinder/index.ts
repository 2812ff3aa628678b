import { DEMO_MEMBERSHIPS } from '../people-in-studies';
import type { StudyScript } from '../script';
import { cinderSteps } from './history';

/** The study to copy when starting one's own: a nuclear-thermal stage, small, compliant and closed out. */
export function cinder(now: Date): StudyScript {
  return {
    opening: {
      key: 'CINDER',
      name: 'Cinder',
      summary: 'A nuclear-thermal stage that sends 20 t on a transfer to Mars. Everything complies and is closed out.',
      concept: 'nuclear-thermal transfer stage',
      phase: 'Concept study',
    },
    memberships: DEMO_MEMBERSHIPS,
    steps: cinderSteps(now),
  };
}
