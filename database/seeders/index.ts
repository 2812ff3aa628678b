import { petrel } from './petrel';
import { play, type SeedExecutor } from './script';

/** Writes the demonstration studies, whose history ends at `now`; throws if anything is refused. */
export async function seedDemonstration(executor: SeedExecutor, now: Date = new Date()): Promise<void> {
  for (const study of [petrel]) await play(study(now), executor);
}
