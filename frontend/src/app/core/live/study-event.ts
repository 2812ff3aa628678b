import type { StudyEvent } from '@shared/contract';

/** Reads one message of the event stream; null when it tells of no revision (a heartbeat, a newer kind). */
export function parseStudyEvent(data: string): StudyEvent | null {
  let value: unknown;
  try {
    value = JSON.parse(data);
  } catch {
    return null;
  }
  if (typeof value !== 'object' || value === null) return null;
  const event = value as Partial<StudyEvent>;
  if (typeof event.revision !== 'number') return null;
  return {
    revision: event.revision,
    by: event.by ?? '',
    byId: event.byId ?? '',
    at: event.at ?? '',
    summary: event.summary ?? '',
    moved: event.moved ?? [],
    touched: event.touched ?? [],
  };
}
