const LONG = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' });
const SHORT = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', timeZone: 'UTC' });

/** "1 December 2026" of an ISO 8601 instant, in UTC on the server and in every browser alike. */
export const longDay = (instant: string): string => LONG.format(new Date(instant));

/** "1 Dec 2026", for tables. */
export const shortDay = (instant: string): string => SHORT.format(new Date(instant));

/** "1 Dec 2026, 09:05 UTC". */
export const minute = (instant: string): string => `${shortDay(instant)}, ${instant.slice(11, 16)} UTC`;

/** The day of an instant `days` later, as `<input type="date">` holds it: 2026-12-01. */
export const dayLater = (instant: string, days: number): string =>
  new Date(Date.parse(instant) + days * 86_400_000).toISOString().slice(0, 10);
