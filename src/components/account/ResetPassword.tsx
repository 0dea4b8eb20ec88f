import { useMutation, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { PasswordResetPreview } from '../../contracts/account.ts';
import { Button, ButtonLink } from '../ui/Button.tsx';
import { TextInput } from '../ui/controls.tsx';
import { minute } from '../ui/dates.ts';
import { sendJson } from '../ui/http.ts';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { queryClient } from '../ui/query-client.ts';
import { useLinkToken } from './link-token.ts';
import { NewPasswordInput, UsernameForManagers } from './NewPasswordInput.tsx';

/** Ask for a link by mail, or choose a new password with the link one came by. */
export function ResetPassword() {
  const { token, forget } = useLinkToken();
  if (token === undefined) return <p role="status">Reading the link…</p>;
  return token === null ? <AskForLink /> : <ChoosePassword token={token} onForget={forget} />;
}

function AskForLink() {
  const [email, setEmail] = useState('');
  const ask = useMutation(
    { mutationFn: () => sendJson<{ detail: string }>('POST', '/api/password-resets', { email: email.trim() }) },
    queryClient,
  );
  if (ask.isSuccess)
    return (
      <div role="status" className="flex flex-col gap-3">
        <p>{ask.data.detail}</p>
        <p className="text-ink-soft">
          Nothing came? Look among unwanted mail, and whether the address is the right one.
        </p>
        <Button onClick={() => ask.reset()} className="self-start">
          Try another address
        </Button>
      </div>
    );
  const fault = ask.error instanceof ProblemError ? ask.error.about('email') : undefined;
  return (
    <form
      aria-label="Ask for a link"
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        ask.mutate();
      }}
    >
      <p className="text-ink-soft">A link to choose a new password goes to the address of your account.</p>
      <TextInput
        label="E-mail address"
        type="email"
        autoComplete="username"
        required
        error={fault}
        value={email}
        onChange={(event) => setEmail(event.target.value)}
      />
      {!fault && <Problem problem={ask.error} />}
      <Button type="submit" kind="primary" disabled={ask.isPending}>
        {ask.isPending ? 'Asking' : 'Send the link'}
      </Button>
    </form>
  );
}

function ChoosePassword({ token, onForget }: { token: string; onForget: () => void }) {
  const [password, setPassword] = useState('');
  const link = useQuery(
    {
      queryKey: ['password-reset', token],
      queryFn: ({ signal }) =>
        sendJson<PasswordResetPreview>('POST', '/api/password-resets/preview', { token }, { signal }),
      refetchOnWindowFocus: false,
    },
    queryClient,
  );
  const choose = useMutation(
    { mutationFn: () => sendJson('POST', '/api/password-resets/complete', { token, password }) },
    queryClient,
  );
  if (choose.isSuccess)
    return (
      <div role="status" className="flex flex-col gap-4">
        <p>
          Your password is changed. Every browser that was signed in has been signed out; second factors and access
          tokens are as they were.
        </p>
        <ButtonLink kind="primary" href={`/signin?${new URLSearchParams({ email: link.data?.email ?? '' })}`}>
          Sign in
        </ButtonLink>
      </div>
    );
  if (link.error)
    return (
      <div className="flex flex-col gap-4">
        <Problem problem={link.error} onRetry={() => void link.refetch()} />
        <Button onClick={onForget}>Ask for a new link</Button>
      </div>
    );
  if (!link.data) return <p role="status">Reading the link…</p>;
  const fault = choose.error instanceof ProblemError ? choose.error.about('password') : undefined;
  return (
    <form
      aria-label="Choose a new password"
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        choose.mutate();
      }}
    >
      <p className="text-ink-soft">
        For the account of <b className="font-semibold break-words text-ink">{link.data.email}</b>. The link works until{' '}
        {minute(link.data.expiresAt)}.
      </p>
      <UsernameForManagers email={link.data.email} />
      <NewPasswordInput value={password} onChange={setPassword} error={fault} />
      {!fault && <Problem problem={choose.error} />}
      <Button type="submit" kind="primary" disabled={choose.isPending}>
        {choose.isPending ? 'Changing' : 'Set the new password'}
      </Button>
    </form>
  );
}
