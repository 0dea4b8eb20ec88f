import type { ReactNode } from 'react';
import { Button } from '../ui/Button.tsx';
import { TextInput } from '../ui/controls.tsx';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { NewPasswordInput, UsernameForManagers } from './NewPasswordInput.tsx';
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
      <UsernameForManagers email={email} />
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
      <NewPasswordInput value={password} onChange={join.setPassword} error={faults.password} />
      {terms}
      {!isTold && <Problem problem={accept.error} />}
      <Button type="submit" kind="primary" disabled={accept.isPending}>
        {accept.isPending ? 'Making the account' : `Make the account and accept${terms ? ' the terms' : ''}`}
      </Button>
    </form>
  );
}
