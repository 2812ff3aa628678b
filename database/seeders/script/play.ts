import { mayGive } from '@shared/contract';
import type { Membership, SeedExecutor, StudyOpening } from './executor';
import { Names } from './names';
import type { Phrase } from './words';

/** One edit of a script: who, when, why and what. */
export interface Step {
  readonly actor: string;
  readonly at: Date;
  readonly why: string;
  readonly phrases: readonly Phrase[];
}
/** A whole study as a script. */
export interface StudyScript {
  readonly opening: StudyOpening;
  readonly memberships: readonly Membership[];
  readonly steps: readonly Step[];
}

/** Plays a script: every step becomes one edit by the person it names, with the versions that the study then has. */
export async function play(script: StudyScript, executor: SeedExecutor): Promise<void> {
  const { opening, memberships, steps } = script;
  await executor.createStudy(opening, memberships);
  const people = new Map<string, string>();
  for (const { email } of memberships) people.set(email, await executor.personId(email));
  const names = new Names(people);
  for (const { actor, at, why, phrases } of steps) {
    names.begin(await executor.read(opening.key), at);
    const commands = phrases.flatMap((phrase) => phrase(names));
    const roles = memberships.find((member) => member.email === actor)?.roles ?? [];
    const refused = commands.find((command) => !mayGive(command.type, roles));
    if (refused) throw new Error(`${opening.key}: ${actor} may not give ${refused.type} (“${why}”)`);
    await executor.edit(opening.key, actor, commands, { why, at });
  }
  refuseOtherKeys(await executor.read(opening.key), names, opening.key);
}

/** Keys are given by the study; a script that calls a requirement by another key than it got would mislead its reader. */
function refuseOtherKeys(study: Awaited<ReturnType<SeedExecutor['read']>>, names: Names, studyKey: string): void {
  for (const name of names.all('requirement')) {
    const key = study.get('requirement', names.id('requirement', name))?.key;
    if (key !== name) throw new Error(`${studyKey}: the script calls ${key ?? 'nothing'} ${name}`);
  }
}

const DAY = 86_400_000;
/** Reckons the days of a script back from now: `day(-12, 9.5)` is twelve days ago at 09:30 UTC. */
export function calendar(now: Date): (days: number, hour: number) => Date {
  const midnight = Math.floor(now.getTime() / DAY) * DAY;
  return (days, hour) => new Date(midnight + days * DAY + hour * 3_600_000);
}

/** The calendar day of a date, as due dates are written. */
export function dayOf(date: Date): string {
  return date.toISOString().slice(0, 10);
}
