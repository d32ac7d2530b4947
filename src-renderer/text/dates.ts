// Dates and times of day as shown. Stored ones are ISO 8601.

/** "14:02" in the local time of the reader; with the day before it when it was not today. */
export function clock(iso: string, now: Date): string {
  const date = new Date(iso);
  if (Number.isNaN(date.getTime())) return '';
  const time = date.toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' });
  return date.toDateString() === now.toDateString() ? time : `${day(iso)}, ${time}`;
}

/** "11 June", with the year when `withYear`. */
export function day(iso: string, withYear = false): string {
  const date = new Date(iso.length === 10 ? `${iso}T12:00:00` : iso);
  if (Number.isNaN(date.getTime())) return iso;
  return date.toLocaleDateString('en-GB', { day: 'numeric', month: 'long', ...(withYear ? { year: 'numeric' } : {}) });
}

/** The local calendar day, "2026-06-11". */
export function isoDay(date: Date): string {
  const two = (n: number): string => String(n).padStart(2, '0');
  return `${date.getFullYear()}-${two(date.getMonth() + 1)}-${two(date.getDate())}`;
}
