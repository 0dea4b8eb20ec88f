import type { MemberDetail } from '#src/contracts/people.ts';
import type { MemberAccess } from '../access/people.ts';
import { leads } from '../access/records.ts';
import { database } from '../database.ts';
import { countDrafts } from './drafts.ts';
import { otherLeads } from './leads.ts';

/** A person of a lab as this asker gets them: address and drafts are for leads, and for the person. */
export async function memberRecord({
  asker,
  lab,
  account,
  membership,
}: Pick<MemberAccess, 'asker' | 'lab' | 'account' | 'membership'>): Promise<MemberDetail> {
  const { db } = await database();
  const isOpen = leads(asker, lab.id) || account.id === asker.accountId;
  return {
    id: account.id,
    name: account.name,
    email: isOpen ? account.email : null,
    role: membership.role,
    since: membership.createdAt,
    state: account.state,
    drafts: isOpen ? await countDrafts(db, account.id, lab.id) : null,
    onlyLead: membership.role === 'lead' && (await otherLeads(db, lab.id, account.id)).length === 0,
  };
}
