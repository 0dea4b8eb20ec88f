import { type FormEvent, type ReactNode, useState } from 'react';
import { Button, type ButtonKind } from '../../ui/Button.tsx';
import { Dialog } from '../../ui/Dialog.tsx';
import { Problem } from '../../ui/Problem.tsx';
import { ProblemError } from '../../ui/problem-error.ts';
import { PasswordInput } from '../PasswordInput.tsx';

interface Props {
  title: string;
  description: ReactNode;
  /** What the button does, in words. */
  action: string;
  kind?: ButtonKind;
  busy: boolean;
  error: unknown;
  onPassword: (password: string) => void;
  onClose: () => void;
}

/** The password again, before something is done that cannot be taken back. */
export function AskPassword({ title, description, action, kind = 'primary', busy, error, onPassword, onClose }: Props) {
  const [password, setPassword] = useState('');
  const wrong = error instanceof ProblemError ? error.about('password') : undefined;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onPassword(password);
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={title}
      description={description}
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" form="ask-password" kind={kind} disabled={busy}>
            {action}
          </Button>
        </>
      }
    >
      <form id="ask-password" className="flex flex-col gap-4" onSubmit={submit}>
        <PasswordInput
          label="Your password"
          autoComplete="current-password"
          required
          error={wrong}
          value={password}
          onChange={(event) => setPassword(event.target.value)}
        />
        {!wrong && <Problem problem={error} />}
      </form>
    </Dialog>
  );
}
