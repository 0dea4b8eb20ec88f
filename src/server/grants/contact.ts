import { and, asc, eq, inArray } from 'drizzle-orm';
import type { Db, Tx } from '#src/db/client.ts';
import { accounts, memberships } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import type { Contact } from '../mail/sharing-mails.ts';

interface Lead extends Contact {
  accountId: string;
}

/** The leads of labs whose accounts are open, by name. */
export async function leadsOf(db: Db | Tx, labIds: string[]): Promise<(Lead & { labId: string })[]> {
  if (labIds.length === 0) return [];
  return db
    .select({ labId: memberships.labId, accountId: accounts.id, name: accounts.name, email: accounts.email })
    .from(memberships)
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .where(and(inArray(memberships.labId, labIds), eq(memberships.role, 'lead'), eq(accounts.state, 'active')))
    .orderBy(asc(accounts.name), asc(accounts.id));
}

/** Whom a guest can ask, by lab: the lead who granted as long as they lead it, otherwise the first by name. */
export async function contactsOf(labIds: string[], db?: Db | Tx, grantedBy?: string): Promise<Map<string, Contact>> {
  const leads = await leadsOf(db ?? (await database()).db, [...new Set(labIds)]);
  const contacts = new Map<string, Contact>();
  for (const { labId, accountId, name, email } of leads)
    if (!contacts.has(labId) || accountId === grantedBy) contacts.set(labId, { name, email });
  return contacts;
}

/** The contact of one lab, or null while nobody leads it. */
export async function contactOf(db: Db | Tx, labId: string, grantedBy?: string): Promise<Contact | null> {
  return (await contactsOf([labId], db, grantedBy)).get(labId) ?? null;
}

/** Who answers guests of a lab: its leads, and while it has none the stewards. */
export async function whoAnswers(tx: Tx, labId: string): Promise<Lead[]> {
  const leads = await leadsOf(tx, [labId]);
  if (leads.length > 0) return leads;
  return tx
    .select({ accountId: accounts.id, name: accounts.name, email: accounts.email })
    .from(accounts)
    .where(and(eq(accounts.steward, true), eq(accounts.state, 'active')));
}
