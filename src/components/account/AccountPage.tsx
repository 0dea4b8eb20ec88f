import type { Account, SessionRecord } from '../../contracts/account.ts';
import { AddressPanel } from './AddressPanel.tsx';
import { PasswordPanel } from './PasswordPanel.tsx';
import { ProfilePanel } from './ProfilePanel.tsx';
import { SessionsPanel } from './SessionsPanel.tsx';
import { SecondFactorPanel } from './second-factor/SecondFactorPanel.tsx';
import { useAccount } from './useAccount.ts';

interface Props {
  account: Account;
  sessions: SessionRecord[];
}

/** One's own account: who one is, how one signs in, and where one is signed in. */
export function AccountPage({ account: first, sessions }: Props) {
  const account = useAccount(first);
  return (
    <>
      <h1 className="mb-5 text-xl font-semibold">Account</h1>
      <div className="grid items-start gap-6 lg:grid-cols-2">
        <div className="flex min-w-0 flex-col gap-6">
          <ProfilePanel account={account} />
          <AddressPanel account={account} />
          <PasswordPanel email={account.email} />
        </div>
        <div className="flex min-w-0 flex-col gap-6">
          <SecondFactorPanel />
          <SessionsPanel sessions={sessions} />
        </div>
      </div>
    </>
  );
}
