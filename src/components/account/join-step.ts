import type { InvitationPreview } from '../../contracts/invitations.ts';

/** What the one who opened an invitation has to do next. */
export type JoinStep = 'new-account' | 'sign-in' | 'accept' | 'other-account';

/** An address with an account is asked to sign in with it; somebody else's session cannot accept. */
export function joinStep(
  preview: Pick<InvitationPreview, 'email' | 'hasAccount'>,
  signedInAs: string | null,
): JoinStep {
  if (signedInAs !== null) return signedInAs === preview.email && preview.hasAccount ? 'accept' : 'other-account';
  return preview.hasAccount ? 'sign-in' : 'new-account';
}

export const SHORTEST_PASSWORD = 15;

/** How many characters are still missing, as the person counts them: an accented letter or a sign is one. */
export function missingCharacters(password: string): number {
  return Math.max(0, SHORTEST_PASSWORD - [...password.normalize('NFKC')].length);
}

/** Where an accepted invitation leads: to the folio it opened, or to the day sheet. */
export const landing = ({ folio }: { folio: string | null }): string => (folio ? `/folios/${folio}` : '/');
