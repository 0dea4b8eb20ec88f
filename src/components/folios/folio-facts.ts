import type { FolioRecord } from '../../contracts/sharing.ts';
import { shortDay } from '../ui/dates.ts';

/** How far somebody may go in a folio: a member of its lab, or a guest with a level and an end. */
export function ownAccess({ level, expires }: Pick<FolioRecord, 'level' | 'expires'>): string {
  if (level === null) return 'member';
  const until = expires ? ` until ${shortDay(expires)}` : '';
  return `${level === 'download' ? 'read and download' : 'read'}${until}`;
}

/** Grants that open the folio today, an instant in ISO 8601. */
export const openGrants = (folio: Pick<FolioRecord, 'grants'>, now: string) =>
  folio.grants.filter((grant) => !grant.revoked && grant.expires > now);

/** Grants that opened it once: revoked, or past their end. */
export const endedGrants = (folio: Pick<FolioRecord, 'grants'>, now: string) =>
  folio.grants.filter((grant) => grant.revoked || grant.expires <= now);

/** Whether guests are kept out until a day that is still to come. */
export const isUnderEmbargo = ({ embargoUntil }: Pick<FolioRecord, 'embargoUntil'>, now: string): boolean =>
  embargoUntil !== null && embargoUntil > now;

type Items = FolioRecord['items'];

/** The items with one more at the end; as they are when it is there already. */
export function withItem(items: Items, accession: string): Items {
  return items.some((item) => item.accession === accession) ? items : [...items, { accession, spectra: 'all' }];
}

export const withoutItem = (items: Items, accession: string): Items =>
  items.filter((item) => item.accession !== accession);

/** The day typed into an embargo field as an instant, its start in UTC; null where none is set. */
export const embargoInstant = (day: string): string | null => (day ? `${day}T00:00:00.000Z` : null);
