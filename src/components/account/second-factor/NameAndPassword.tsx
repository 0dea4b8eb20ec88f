import { type FormEvent, type ReactNode, useState } from 'react';
import { TextInput } from '../../ui/controls.tsx';
import { Problem } from '../../ui/Problem.tsx';
import { ProblemError } from '../../ui/problem-error.ts';
import { PasswordInput } from '../PasswordInput.tsx';

interface Props {
  id: string;
  nameHint: string;
  mutation: { error: unknown; mutate: (input: { name: string; password: string }) => void };
  /** Further fields, under these. */
  children?: ReactNode;
}

/** What a new factor is called, and the password again. */
export function NameAndPassword({ id, nameHint, mutation: { error, mutate }, children }: Props) {
  const [name, setName] = useState('');
  const [password, setPassword] = useState('');
  const refused = error instanceof ProblemError ? error : null;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    mutate({ name, password });
  };
  return (
    <form id={id} className="flex flex-col gap-4" onSubmit={submit}>
      <TextInput
        label="Name"
        hint={nameHint}
        required
        maxLength={200}
        autoComplete="off"
        error={refused?.about('name')}
        value={name}
        onChange={(event) => setName(event.target.value)}
      />
      <PasswordInput
        label="Your password"
        autoComplete="current-password"
        required
        error={refused?.about('password')}
        value={password}
        onChange={(event) => setPassword(event.target.value)}
      />
      {children}
      {!refused?.about('password') && <Problem problem={error} />}
    </form>
  );
}
