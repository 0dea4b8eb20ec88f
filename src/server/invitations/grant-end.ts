import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { fromNow } from './link.ts';

/** How long a guest reads, where the inviter says nothing, in days. */
export const GRANT_DAYS = 365;
export const LONGEST_GRANT_DAYS = 5 * 366;

/** @throws {HttpError} 422 for an end that is past, or later than `days` from now */
export function endWithin(expires: string, days: number): string {
  const end = new Date(expires).toISOString();
  if (end <= nowIso()) throw badEnd('Choose a moment that is still to come');
  if (end > fromNow(days)) throw badEnd(`Choose a moment at most ${days} days from now`);
  return end;
}
const badEnd = (detail: string) =>
  new HttpError(422, 'It cannot end then', { errors: [{ pointer: '#/expires', detail }] });
