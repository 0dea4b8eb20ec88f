import type { ReactNode } from 'react';
import { Button } from '../ui/Button.tsx';
import { TextInput } from '../ui/controls.tsx';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { missingCharacters, SHORTEST_PASSWORD } from './join-step.ts';
import { PasswordInput } from './PasswordInput.tsx';
import type { useJoin } from './useJoin.ts';

interface Props {
  email: string;
  terms: ReactNode;
  join: ReturnType<typeof useJoin>;
}

/** Name and password of an address that has no account yet. */
export function NewAccountFields({ email, terms, join }: Props) {
  const { name, password, accept } = join;
  const refused = accept.error instanceof ProblemError ? accept.error : null;
  const missing = missingCharacters(password);
  const length = `At least ${SHORTEST_PASSWORD} characters; several words are easiest to keep.`;
  const faults = { name: refused?.about('name'), password: refused?.about('password') };
  const isTold = faults.name !== undefined || faults.password !== undefined;
  return (
    <form
      aria-label="New account"
      className="flex flex-col gap-4 border-t border-hairline pt-4"
      onSubmit={(event) => {
        event.preventDefault();
        accept.mutate({ name: name.trim(), password });
      }}
    >
      {/* Password managers file the new password under this address. */}
      <input type="hidden" name="username" autoComplete="username" value={email} readOnly />
      <TextInput
        label="Your name"
        hint="Others see it beside what you do."
        error={faults.name}
        autoComplete="name"
        required
        maxLength={200}
        value={name}
        onChange={(event) => join.setName(event.target.value)}
      />
      <PasswordInput
        label="New password"
        hint={password && missing > 0 ? `${length} ${missing} more.` : length}
        error={faults.password}
        autoComplete="new-password"
        required
        minLength={SHORTEST_PASSWORD}
        value={password}
        onChange={(event) => join.setPassword(event.target.value)}
      />
      {terms}
      {!isTold && <Problem problem={accept.error} />}
      <Button type="submit" kind="primary" disabled={accept.isPending}>
        {accept.isPending ? 'Making the account' : `Make the account and accept${terms ? ' the terms' : ''}`}
      </Button>
    </form>
  );
}
