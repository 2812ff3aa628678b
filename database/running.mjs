/** Who holds a data directory: one starter at a time, told apart from a dead one whose process number was given away again. */
import { existsSync, readFileSync, rmSync } from 'node:fs';
import { writeAtomically } from './data-directory.mjs';
import { Refusal } from './refusal.mjs';

/**
 * Takes the data directory for this process, or refuses when another live process holds it; returns how to let go.
 * @param {import('./data-directory.mjs').DataDirectory} data @param {string} what what holds it, for the other one's message
 */
export function holdDataDirectory(data, what) {
  const holder = liveHolder(data);
  if (holder !== undefined) {
    throw new Refusal(`The data directory ${data.path} is in use: ${holder.what} (process ${holder.pid}).`);
  }
  writeAtomically(data.runningFile, JSON.stringify({ pid: process.pid, startTime: startTimeOf(process.pid), what }));
  return () => rmSync(data.runningFile, { force: true });
}

/** The live process that holds the directory, or undefined. @param {import('./data-directory.mjs').DataDirectory} data @returns {{ pid: number, what: string } | undefined} */
export function liveHolder(data) {
  if (!existsSync(data.runningFile)) return undefined;
  try {
    const { pid, startTime, what } = JSON.parse(readFileSync(data.runningFile, 'utf8'));
    return startTime !== undefined && startTimeOf(pid) === startTime ? { pid, what } : undefined;
  } catch {
    return undefined;
  }
}

/** Start time of a process in clock ticks since boot, or undefined when it does not live. @param {number} pid */
function startTimeOf(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    // The second field is the program's name in parentheses and may hold blanks; the start time is the 22nd field.
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19];
  } catch {
    return undefined;
  }
}
