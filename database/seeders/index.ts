import { cinder } from './cinder';
import { longreach } from './longreach';
import { petrel } from './petrel';
import { play, type SeedExecutor } from './script';

/** Writes the demonstration studies, whose history ends at `now`; throws if anything is refused. */
export async function seedDemonstration(executor: SeedExecutor, now: Date = new Date()): Promise<void> {
  for (const study of [petrel, longreach, cinder]) await play(study(now), executor);
}
