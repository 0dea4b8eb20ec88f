import { missingCharacters, SHORTEST_PASSWORD } from './join-step.ts';
import { PasswordInput } from './PasswordInput.tsx';

interface Props {
  value: string;
  onChange: (value: string) => void;
  /** Why the server refused it. */
  error?: string | undefined;
  name?: string;
}

const LENGTH = `At least ${SHORTEST_PASSWORD} characters; several words are easiest to keep. Spaces count.`;

/** A password that is being chosen: tells how much is missing, never what kinds of characters. */
export function NewPasswordInput({ value, onChange, error, name }: Props) {
  const missing = missingCharacters(value);
  return (
    <PasswordInput
      label="New password"
      hint={value && missing > 0 ? `${LENGTH} ${missing} more.` : LENGTH}
      error={error}
      name={name}
      autoComplete="new-password"
      required
      minLength={SHORTEST_PASSWORD}
      value={value}
      onChange={(event) => onChange(event.target.value)}
    />
  );
}

/** Tells a password manager whose password a form holds. */
export function UsernameForManagers({ email }: { email: string }) {
  return (
    <input
      type="text"
      name="username"
      autoComplete="username"
      value={email}
      readOnly
      tabIndex={-1}
      aria-hidden="true"
      className="sr-only"
    />
  );
}
