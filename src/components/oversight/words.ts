import type { TrailRow } from '../../contracts/oversight.ts';

type Deed = Pick<TrailRow, 'action' | 'actor' | 'subject' | 'detail'>;

/** Kinds of record as people name them. */
export const KINDS: Record<string, string> = {
  complex: 'complex',
  preparation: 'preparation',
  spectrum: 'spectrum',
  band: 'band',
  folio: 'folio',
  bundle: 'bundle',
  account: 'account',
  lab: 'lab',
  invitation: 'invitation',
  token: 'access token',
  registry: 'registry',
  table: 'table',
};

/**
 * What was done, before the name of the record: by action, or by kind and action where the same action says something
 * else of another kind of record.
 */
const DEEDS: Record<string, string> = {
  register: 'registered',
  draft: 'kept a draft of',
  change: 'changed',
  withdraw: 'withdrew',
  delete: 'deleted',
  'delete-draft': 'deleted the draft of',
  upload: 'uploaded',
  'add-preparation': 'added the preparation',
  'propose-bands': 'proposed bands of',
  attest: 'attested the band at',
  dispute: 'disputed the band at',
  reopen: 'reopened the judgement of',
  'band reopen': 'reopened the judgement of the band at',
  'save-fit': 'saved a fit of the levels of',
  'withdraw-fit': 'withdrew a fit of the levels of',
  merge: 'merged',
  'take-in': 'took a merged record into',
  move: 'moved',
  'settle-merge-task': 'settled a merge task of',
  create: 'made',
  'folio create': 'made the folio',
  'lab create': 'added the lab',
  'token create': 'made the access token',
  'token.created': 'made, on the server, the access token',
  'token revoke': 'revoked the access token',
  'invitation invite': 'invited',
  'invitation resend': 'invited again',
  'invitation accept': 'accepted the invitation of',
  'invitation revoke': 'revoked the invitation of',
  revoke: 'revoked',
  'revoke-grant': 'ended an access to',
  'change-grant': 'changed an access to',
  'accept-terms': 'accepted the terms of',
  'ask-for-more': 'asked for more of',
  'settle-request': 'answered a request for',
  'hand-over': 'handed over',
  'bundle order': 'ordered the',
  'bundle cancel': 'cancelled the',
  'add-member': 'added a member to',
  'remove-member': 'removed a member from',
  'change-role': 'changed a role in',
  leave: 'left',
  'sign-in': 'signed in to',
  'sign-out': 'signed out of',
  'end-session': 'ended a session of',
  'end-sessions': 'ended the sessions of',
  'change-password': 'changed the password of',
  'reset-password': 'chose a new password for',
  'ask-reset': 'asked for a new password for',
  'ask-address': 'asked for another address for',
  'change-address': 'changed the address of',
  'cancel-address': 'gave up the change of address of',
  'second-factor.added': 'added a second factor to',
  'second-factor.removed': 'removed a second factor from',
  'recovery-code.used': 'used a recovery code of',
  deactivate: 'deactivated',
  activate: 'activated again',
  'registry load-demo': 'loaded the demo data into',
};

/** An action as a person reads it where nothing better is known: "erase-cell.started" is "erase cell started". */
const spelledOut = (action: string): string => action.replace(/[-._]+/g, ' ');

/** What was done, as it stands before the record: "registered", "attested the band at". */
export function deedWords({ action, subject }: Pick<Deed, 'action' | 'subject'>): string {
  const deed = DEEDS[`${subject.type} ${action}`] ?? DEEDS[action] ?? spelledOut(action);
  // A band that is gone has no place to be named by.
  return subject.type === 'band' && subject.label === null ? deed.replace(/ the band at$/, '') : deed;
}

/** The choice of an action in a list, apart from any record: "attested the band at" is "attest". */
export const actionWords = (action: string): string => spelledOut(action);

/** What the record is called: by its name of today, by what the row itself tells, or by its kind alone. */
export function subjectWords({ actor, subject, detail }: Pick<Deed, 'actor' | 'subject' | 'detail'>): string {
  if (subject.type === 'account' && subject.id === actor?.id) return 'their account';
  if (subject.label !== null) return subject.label;
  if (subject.type === 'registry') return 'the registry';
  const told = [detail.accession, detail.label, detail.title, detail.name, detail.email].find(
    (value): value is string => typeof value === 'string',
  );
  const kind = KINDS[subject.type] ?? spelledOut(subject.type);
  return told ? `${told} (deleted since)` : `a ${kind} that is gone`;
}

/** Names of fields as people read them; one that is not listed is spelled out. */
const FIELDS: Record<string, string> = {
  embargoUntil: 'embargo until',
  withdrawnReason: 'reason',
  spinState: 'spin state',
  labId: 'lab',
  grantExpiresAt: 'access ends',
  expiresAt: 'ends',
  pathLength: 'path length (cm)',
  concentration: 'concentration (mol dm⁻³)',
  temperature: 'temperature (K)',
  typed: 'typed formula',
  kept: 'bands kept',
  gone: 'bands taken away',
};

/** "measuredAt" is "measured at". */
export const fieldWords = (name: string): string =>
  FIELDS[name] ?? name.replace(/([a-z])([A-Z])/g, (_, a: string, b: string) => `${a} ${b.toLowerCase()}`);

/** A value of a field in one line or, where it has parts, as indented JSON. */
export function valueWords(value: unknown): string {
  if (value === null || value === undefined || value === '') return 'none';
  if (value === true) return 'yes';
  if (value === false) return 'no';
  if (typeof value === 'string' || typeof value === 'number') return String(value);
  if (Array.isArray(value) && value.every((part) => typeof part === 'string' || typeof part === 'number'))
    return value.length === 0 ? 'none' : value.join(', ');
  return JSON.stringify(value, null, 2);
}

export interface Change {
  name: string;
  /** Undefined where nobody knows what it was. */
  before: unknown;
  after: unknown;
}

/**
 * The fields that a row tells of, with before and after. Rows that carry both say so themselves; for the others the
 * trail has looked into earlier rows.
 */
export function changesOf(detail: Record<string, unknown>, before: Record<string, unknown>): Change[] {
  const pair = asRecord(detail.after) && asRecord(detail.before);
  if (pair) {
    const [was, is] = [detail.before, detail.after] as Record<string, unknown>[];
    const names = [...new Set([...Object.keys(was!), ...Object.keys(is!)])];
    const others = Object.keys(detail).filter((name) => name !== 'before' && name !== 'after');
    return [
      ...names.map((name) => ({ name, before: was![name] ?? null, after: is![name] ?? null })),
      ...others.map((name) => ({ name, before: undefined, after: detail[name] })),
    ];
  }
  return Object.entries(detail).map(([name, after]) => ({ name, before: before[name], after }));
}

const asRecord = (value: unknown): boolean => typeof value === 'object' && value !== null && !Array.isArray(value);
