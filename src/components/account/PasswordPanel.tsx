import { type FormEvent, useState } from 'react';
import { Button } from '../ui/Button.tsx';
import { Checkbox } from '../ui/controls.tsx';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { StatusLine } from '../ui/StatusLine.tsx';
import { NewPasswordInput, UsernameForManagers } from './NewPasswordInput.tsx';
import { PasswordInput } from './PasswordInput.tsx';
import { usePasswordChange } from './useAccount.ts';

const EMPTY = { current: '', password: '', endOthers: true, revokeTokens: false };

/** A new password, and what shall end with the old one. */
export function PasswordPanel({ email }: { email: string }) {
  const [form, setForm] = useState(EMPTY);
  const change = usePasswordChange();
  const edit = (part: Partial<typeof EMPTY>) => {
    if (!change.isPending) change.reset();
    setForm((now) => ({ ...now, ...part }));
  };
  const refused = change.error instanceof ProblemError ? change.error : null;
  const faults = { current: refused?.about('current'), password: refused?.about('password') };
  const isTold = faults.current !== undefined || faults.password !== undefined;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    change.mutate(form, { onSuccess: () => setForm(EMPTY) });
  };
  return (
    <Panel title="Password">
      <form aria-label="Change of password" className="flex flex-col gap-3" onSubmit={submit}>
        <UsernameForManagers email={email} />
        <PasswordInput
          label="Present password"
          autoComplete="current-password"
          required
          error={faults.current}
          value={form.current}
          onChange={(event) => edit({ current: event.target.value })}
        />
        <NewPasswordInput value={form.password} onChange={(password) => edit({ password })} error={faults.password} />
        <Checkbox
          label="Sign out everywhere else"
          checked={form.endOthers}
          onChange={(event) => edit({ endOthers: event.target.checked })}
        />
        <Checkbox
          label="Revoke all my access tokens"
          hint="Scripts and instruments that use one are refused from the next request on."
          checked={form.revokeTokens}
          onChange={(event) => edit({ revokeTokens: event.target.checked })}
        />
        {!isTold && <Problem problem={change.error} />}
        <div className="flex flex-wrap items-center gap-3">
          <Button type="submit" disabled={change.isPending}>
            Change the password
          </Button>
          <StatusLine>{change.data && changedText(change.data)}</StatusLine>
        </div>
      </form>
    </Panel>
  );
}

function changedText({ sessionsEnded, tokensRevoked }: { sessionsEnded: number; tokensRevoked: number }): string {
  const sessions = sessionsEnded > 0 ? ` Signed out elsewhere: ${sessionsEnded}.` : '';
  const tokens = tokensRevoked > 0 ? ` Tokens revoked: ${tokensRevoked}.` : '';
  return `Changed.${sessions}${tokens}`;
}
