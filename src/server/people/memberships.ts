import { and, eq } from 'drizzle-orm';
import type { Departure, DepartureQuery, MemberDetail, MemberInput, MemberPatch } from '#src/contracts/people.ts';
import type { Tx } from '#src/db/client.ts';
import { accounts, memberships } from '#src/db/schema/index.ts';
import type { MemberAdd, MemberEnd, MemberRole } from '../access/people.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { addedToLab, removedFromLab, roleChanged } from '../mail/people-mails.ts';
import type { MailContent } from '../mail/templates.ts';
import { queueMail } from '../mail.ts';
import { settings } from '../settings.ts';
import { record } from '../trail.ts';
import { countDrafts, handOverDrafts } from './drafts.ts';
import { otherLeads } from './leads.ts';
import { memberRecord } from './member-record.ts';
import { revokeTokens, revokeUnbackedInvitations } from './revoke.ts';

const stale = () => new HttpError(412, 'Somebody changed this membership meanwhile: read it again and repeat');
type OfLab = Pick<MemberAdd, 'asker' | 'lab'>;
const linkTo = (labId: string) => `${settings().publicOrigin}/labs/${labId}`;

/** Tell the person of a change that somebody else made. */
async function tell(tx: Tx, { asker, lab }: OfLab, to: { id: string; email: string }, content: MailContent) {
  if (to.id === asker.accountId) return;
  const key = `membership:${lab.id}:${to.id}:${nowIso()}`;
  await queueMail(tx, { key, kind: 'membership', to: to.email, ...content });
}

/** A lab is never left without a lead, unless a steward does it. @throws {HttpError} 409 */
async function requireAnotherLead(
  tx: Tx,
  { asker, lab, account, membership }: Pick<MemberEnd, 'asker' | 'lab' | 'account' | 'membership'>,
): Promise<void> {
  if (membership.role !== 'lead' || asker.steward) return;
  if ((await otherLeads(tx, lab.id, account.id)).length > 0) return;
  throw new HttpError(409, `${account.name} is the only lead of ${lab.name}: make another member lead first`);
}

/**
 * Give a member another role. Who stops leading takes back the invitations that only a lead may send.
 *
 * @throws {HttpError} 409 for the only lead, 412
 */
export async function changeRole(access: MemberRole, { role }: MemberPatch): Promise<MemberDetail> {
  const { asker, lab, account, membership } = access;
  if (role === membership.role) return memberRecord(access);
  const { write } = await database();
  await write(async (tx) => {
    if (role !== 'lead') await requireAnotherLead(tx, access);
    const changed = await tx
      .update(memberships)
      .set({ role })
      .where(ofPerson(access))
      .returning({ role: memberships.role });
    if (changed.length === 0) throw stale();
    const invitations = await revokeUnbackedInvitations(tx, account.id);
    await record(tx, asker, {
      action: 'change-role',
      subjectType: 'lab',
      subjectId: lab.id,
      detail: { account: account.id, from: membership.role, to: role, invitationsRevoked: invitations },
    });
    await tell(tx, access, account, roleChanged({ by: asker.name, lab: lab.name, role, link: linkTo(lab.id) }));
  });
  return memberRecord({ asker, lab, account, membership: { ...membership, role } });
}

const ofPerson = ({ membership }: Pick<MemberEnd, 'membership'>) =>
  and(
    eq(memberships.accountId, membership.accountId),
    eq(memberships.labId, membership.labId),
    eq(memberships.role, membership.role),
  );

/**
 * Add somebody who has an account, with no invitation to accept.
 *
 * @throws {HttpError} 422 for an account that is not there or deactivated, 409 for a member
 */
export async function addMember({ asker, lab }: MemberAdd, { account: id, role }: MemberInput): Promise<MemberDetail> {
  const { write } = await database();
  const added = await write(async (tx) => {
    const [account] = await tx.select().from(accounts).where(eq(accounts.id, id));
    if (account?.state !== 'active')
      throw new HttpError(422, account ? 'This account is deactivated' : 'There is no such account', {
        errors: [{ pointer: '#/account', detail: account ? 'Reactivate it first' : 'Choose one of /api/accounts' }],
      });
    const membership = { accountId: id, labId: lab.id, role, createdAt: nowIso() };
    const made = await tx.insert(memberships).values(membership).onConflictDoNothing().returning();
    if (made.length === 0)
      throw new HttpError(409, `${account.name} is a member of ${lab.name} already: change the role instead`);
    await record(tx, asker, {
      action: 'add-member',
      subjectType: 'lab',
      subjectId: lab.id,
      detail: { account: id, role },
    });
    await tell(tx, { asker, lab }, account, addedToLab({ by: asker.name, lab: lab.name, role, link: linkTo(lab.id) }));
    return { account, membership };
  });
  return memberRecord({ asker, lab, ...added });
}

/**
 * End a membership. Drafts are handed over, so that nothing of the lab goes out of its sight or is lost; registered
 * records keep their maker. Tokens for this lab alone end, and open invitations that only a lead may send.
 *
 * @throws {HttpError} 409 for the only lead, 400 for drafts to somebody who is no active member, 412
 */
export async function endMembership(access: MemberEnd, { draftsTo }: DepartureQuery): Promise<Departure> {
  const { asker, lab, account } = access;
  const { write } = await database();
  return write(async (tx) => {
    await requireAnotherLead(tx, access);
    const heir = await heirOf(tx, access, draftsTo);
    const ended = await tx.delete(memberships).where(ofPerson(access)).returning({ role: memberships.role });
    if (ended.length === 0) throw stale();
    const drafts = await countDrafts(tx, account.id, lab.id);
    if (heir) await handOverDrafts(tx, asker, { labId: lab.id, from: account.id, to: heir.id });
    const tokens = await revokeTokens(tx, account.id, lab.id);
    const invitations = await revokeUnbackedInvitations(tx, account.id);
    const leaves = account.id === asker.accountId;
    await record(tx, asker, {
      action: leaves ? 'leave' : 'remove-member',
      subjectType: 'lab',
      subjectId: lab.id,
      detail: {
        account: account.id,
        role: ended[0]!.role,
        drafts,
        draftsTo: heir?.id ?? null,
        tokensRevoked: tokens,
        invitationsRevoked: invitations,
      },
    });
    await tell(tx, access, account, removedFromLab({ by: asker.name, lab: lab.name }));
    return { drafts, draftsTo: heir, tokens, invitations: invitations.length };
  });
}

/**
 * Who gets the drafts: the member named; else the lead who removes; else the lead who serves longest. Null where no
 * lead is left: the drafts then wait, in the sight of stewards, for the next lead.
 */
async function heirOf(tx: Tx, { asker, lab, account }: MemberEnd, named: string | undefined) {
  if (named === undefined) {
    const others = await otherLeads(tx, lab.id, account.id);
    return others.find(({ id }) => id === asker.accountId) ?? others[0] ?? null;
  }
  const [member] = await tx
    .select({ id: accounts.id, name: accounts.name })
    .from(memberships)
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .where(and(eq(memberships.labId, lab.id), eq(memberships.accountId, named), eq(accounts.state, 'active')));
  if (member && member.id !== account.id) return member;
  throw new HttpError(400, 'The drafts cannot go there', {
    errors: [{ pointer: '#/draftsTo', detail: `Choose another active member of ${lab.name}` }],
  });
}
