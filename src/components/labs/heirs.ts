import type { MemberRecord } from '../../contracts/sharing.ts';

/**
 * Who may be given the drafts of somebody who goes: the other active members, the one who gets them unless another is
 * chosen first. That is the lead who removes, else the lead who is in the lab longest.
 */
export function heirsOf(members: readonly MemberRecord[], leaver: string, me: string): MemberRecord[] {
  const rank = ({ id, role }: MemberRecord) => (role !== 'lead' ? 2 : id === me ? 0 : 1);
  return members
    .filter(({ id, state }) => id !== leaver && state === 'active')
    .sort((a, b) => rank(a) - rank(b) || a.since.localeCompare(b.since) || a.id.localeCompare(b.id));
}
