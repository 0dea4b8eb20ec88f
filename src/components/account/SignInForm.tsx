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
  /** Whether a second factor is asked for, as told to a browser without script. */
  asksFactor: boolean;
  /** For a browser without script, which posts the form itself. */
  csrfToken: string;
  /** The invented accounts of demo mode with their common password, or null. */
  demo: { accounts: readonly DemoAccount[]; password: string } | null;
}

/**
 * Address and password, and the second factor once the server asks for it. Without script it is an ordinary form, which
 * then shows all three fields.
 */
export function SignInForm({ next, email, fault, asksFactor, csrfToken, demo }: Props) {
  const form = useSignIn({ email, fault, asksFactor, next });
  return (
    <div className="flex flex-col gap-5">
      <form
        ref={form.formRef}
        method="post"
        action="/api/auth/callback/credentials"
        onSubmit={form.submit}
        className="flex flex-col gap-4"
        aria-label="Sign in"
      >
        <input type="hidden" name="csrfToken" value={csrfToken} />
        <input type="hidden" name="callbackUrl" value={next} />
        {!form.isProved && <AddressAndPassword form={form} />}
        {form.asksFactor && <SecondFactorFields form={form} />}
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
        {form.isProved && <OtherWays form={form} />}
      </form>
      {demo && !form.isProved && <DemoAccounts demo={demo} onChoose={form.fill} ready={form.ready} />}
    </div>
  );
}

type Form = ReturnType<typeof useSignIn>;

function AddressAndPassword({ form }: { form: Form }) {
  return (
    <>
      <TextInput
        label="E-mail address"
        type="email"
        name="email"
        autoComplete="username"
        required
        value={form.email}
        onChange={(event) => form.setEmail(event.target.value)}
      />
      <div className="flex flex-col gap-1">
        <PasswordInput
          label="Password"
          name="password"
          autoComplete="current-password"
          required
          value={form.password}
          onChange={(event) => form.setPassword(event.target.value)}
        />
        <a href="/reset" className="link self-start text-xs">
          Forgotten your password?
        </a>
      </div>
    </>
  );
}

function SecondFactorFields({ form }: { form: Form }) {
  return (
    <>
      <p role="status">
        {form.isProved ? (
          <>
            The password of <b className="font-semibold break-words">{form.email.trim()}</b> is right. This account has
            a second factor, too.
          </>
        ) : (
          'This account has a second factor. Type the password once more, and the code with it.'
        )}
      </p>
      <TextInput
        label="Code"
        hint="The six digits that your app shows now, or one of your recovery codes."
        name="code"
        autoComplete="one-time-code"
        autoCapitalize="none"
        spellCheck={false}
        maxLength={100}
        figures
        required
        autoFocus={form.isProved}
        value={form.code}
        onChange={(event) => form.setCode(event.target.value)}
      />
    </>
  );
}

/** By passkey in place of a code, or as somebody else. */
function OtherWays({ form }: { form: Form }) {
  return (
    <div className="flex flex-wrap items-center justify-between gap-2">
      {form.hasPasskeys && (
        <Button disabled={form.busy} onClick={form.usePasskey}>
          Use a passkey
        </Button>
      )}
      <Button kind="quiet" disabled={form.busy} onClick={form.startAgain}>
        Sign in as somebody else
      </Button>
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
