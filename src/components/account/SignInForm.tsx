import { Button, buttonClass } from '../ui/Button.tsx';
import { TextInput } from '../ui/controls.tsx';
import { Problem } from '../ui/Problem.tsx';
import { PasswordInput } from './PasswordInput.tsx';
import { useSignIn } from './useSignIn.ts';

export interface DemoAccount {
  email: string;
  name: string;
  part: string;
}

interface Props {
  /** A path of our own. */
  next: string;
  email: string;
  fault: string | null;
  /** For a browser without script, which posts the form itself. */
  csrfToken: string;
  /** The invented accounts of demo mode with their common password, or null. */
  demo: { accounts: readonly DemoAccount[]; password: string } | null;
}

/** Address and password. Without script it is an ordinary form. */
export function SignInForm({ next, email, fault, csrfToken, demo }: Props) {
  const form = useSignIn({ email, fault, next });
  return (
    <div className="flex flex-col gap-5">
      <form
        method="post"
        action="/api/auth/callback/credentials"
        onSubmit={form.submit}
        className="flex flex-col gap-4"
        aria-label="Sign in"
      >
        <input type="hidden" name="csrfToken" value={csrfToken} />
        <input type="hidden" name="callbackUrl" value={next} />
        <TextInput
          label="E-mail address"
          type="email"
          name="email"
          autoComplete="username"
          required
          value={form.email}
          onChange={(event) => form.setEmail(event.target.value)}
        />
        <PasswordInput
          label="Password"
          name="password"
          autoComplete="current-password"
          required
          value={form.password}
          onChange={(event) => form.setPassword(event.target.value)}
        />
        <div role="alert">
          {form.fault && (
            <p className="border border-alert-line border-l-3 border-l-alert bg-alert-wash px-4 py-2.5 text-alert">
              {form.fault}
            </p>
          )}
          <Problem problem={form.problem} />
        </div>
        <Button type="submit" kind="primary" disabled={form.busy}>
          {form.busy ? 'Signing in' : 'Sign in'}
        </Button>
      </form>
      {demo && <DemoAccounts demo={demo} onChoose={form.fill} ready={form.ready} />}
    </div>
  );
}

interface DemoProps {
  demo: NonNullable<Props['demo']>;
  onChoose: (person: { email: string; password: string }) => void;
  ready: boolean;
}

function DemoAccounts({ demo: { accounts, password }, onChoose, ready }: DemoProps) {
  return (
    <section className="border-t border-hairline pt-4" aria-labelledby="demo-accounts">
      <h2 id="demo-accounts" className="text-sm font-semibold">
        Demo accounts
      </h2>
      <p className="mt-0.5 text-xs text-ink-soft">
        Invented people with invented data, in demo mode on this machine only. Choosing one fills the form. Their
        password: <span className="num text-ink">{password}</span>
      </p>
      <ul className="mt-3 grid grid-cols-2 gap-2">
        {accounts.map(({ email, name, part }) => (
          <li key={email}>
            <button
              type="button"
              disabled={!ready}
              onClick={() => onChoose({ email, password })}
              className={`${buttonClass()} w-full capitalize`}
              aria-label={`${name}: fill in ${email}`}
            >
              {part}
            </button>
          </li>
        ))}
      </ul>
      <p className="mt-3 text-xs">
        <a href="/outbox" className="link">
          Outbox
        </a>{' '}
        <span className="text-ink-soft">holds the mail that this demo would send, invitations among it.</span>
      </p>
    </section>
  );
}
