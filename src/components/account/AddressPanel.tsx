import { type FormEvent, useState } from 'react';
import type { Account, AddressChange } from '../../contracts/account.ts';
import { Button } from '../ui/Button.tsx';
import { TextInput } from '../ui/controls.tsx';
import { minute } from '../ui/dates.ts';
import { Facts, Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { PasswordInput } from './PasswordInput.tsx';
import { useAddressChange } from './useAccount.ts';

/** The address one signs in with, and the way to another one. */
export function AddressPanel({ account }: { account: Account }) {
  const change = useAddressChange();
  return (
    <Panel title="E-mail address">
      {account.addressChange ? (
        <Pending email={account.email} pending={account.addressChange} cancel={change.cancel} />
      ) : (
        <AskForm email={account.email} ask={change.ask} />
      )}
    </Panel>
  );
}

type Change = ReturnType<typeof useAddressChange>;

function Pending({ email, pending, cancel }: { email: string; pending: AddressChange; cancel: Change['cancel'] }) {
  const state = (confirmed: boolean) => (confirmed ? 'has confirmed' : 'has still to confirm');
  return (
    <div className="flex flex-col gap-3">
      <p role="status">
        You asked to change to <b className="font-semibold break-words">{pending.newEmail}</b>. Both addresses were sent
        a mail; the change takes effect when both have confirmed.
      </p>
      <Facts
        facts={[
          [email, state(pending.oldConfirmed)],
          [pending.newEmail, state(pending.newConfirmed)],
          ['Until', minute(pending.expiresAt)],
        ]}
      />
      <Problem problem={cancel.error} />
      <Button className="self-start" disabled={cancel.isPending} onClick={() => cancel.mutate()}>
        Take it back
      </Button>
    </div>
  );
}

function AskForm({ email: present, ask }: { email: string; ask: Change['ask'] }) {
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const refused = ask.error instanceof ProblemError ? ask.error : null;
  const faults = { email: refused?.about('email'), password: refused?.about('password') };
  const isTold = faults.email !== undefined || faults.password !== undefined;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    ask.mutate({ email: email.trim(), password }, { onSettled: () => setPassword('') });
  };
  return (
    <form aria-label="Change of address" className="flex flex-col gap-3" onSubmit={submit}>
      <p className="text-ink-soft">
        You sign in as <b className="font-semibold break-words text-ink">{present}</b>. A new address takes effect when
        both it and the present one have confirmed a link by mail. Invitations stay bound to the address they were sent
        to.
      </p>
      <TextInput
        label="New address"
        type="email"
        autoComplete="email"
        required
        error={faults.email}
        value={email}
        onChange={(event) => setEmail(event.target.value)}
      />
      <PasswordInput
        label="Your password"
        autoComplete="current-password"
        required
        error={faults.password}
        value={password}
        onChange={(event) => setPassword(event.target.value)}
      />
      {!isTold && <Problem problem={ask.error} />}
      <Button type="submit" className="self-start" disabled={ask.isPending}>
        Ask for the change
      </Button>
    </form>
  );
}
