import type { StudyEvent } from '@shared/contract';

const MOST_NAMED = 3;

/** Somebody else's edit in a sentence: "M. Sato, r419: set specific impulse. VEH-002 is now non-compliant." */
export function newsOf(event: StudyEvent): string {
  const turned = event.moved.filter((move) => move.from !== move.to && move.to !== null);
  const named = turned.slice(0, MOST_NAMED).map((move) => `${move.key} is now ${move.to}`);
  if (turned.length > MOST_NAMED) named.push(`${turned.length - MOST_NAMED} more verdicts turned`);
  const summary = event.summary.replace(/\.$/, '');
  return `${event.by}, r${event.revision}: ${summary}.${named.length === 0 ? '' : ` ${named.join(', ')}.`}`;
}
