const DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' });
const MOMENT = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
  timeZone: 'UTC',
});

/** A day as people say it: "9 December 2026"; days of a study are those of UTC, the same for everybody. */
export function dayText(iso: string): string {
  return said(iso, DAY);
}

/** A moment to the minute: "9 Dec 2026, 14:05". UTC, as on the record. */
export function momentText(iso: string): string {
  return said(iso, MOMENT);
}

function said(iso: string, format: Intl.DateTimeFormat): string {
  const time = Date.parse(iso);
  return Number.isNaN(time) ? iso : format.format(time);
}
