import { type FormEvent, useEffect, useRef, useState } from 'react';
import { askPasskey, knowsPasskeys } from './passkey.ts';
import { signIn } from './sign-in.ts';

interface First {
  email: string;
  fault: string | null;
  asksFactor: boolean;
  next: string;
}

/**
 * The state of the sign-in form. A refusal keeps the address and empties the password, unless only the second factor
 * is missing: then both stay, since all of it goes in one request.
 */
export function useSignIn(first: First) {
  const [email, setEmail] = useState(first.email);
  const [password, setPassword] = useState('');
  const [code, setCode] = useState('');
  const [fault, setFault] = useState(first.fault);
  const [asksFactor, setAsksFactor] = useState(first.asksFactor);
  const [problem, setProblem] = useState<unknown>(null);
  const [busy, setBusy] = useState(false);
  const [ready, setReady] = useState(false);
  const [hasPasskeys, setHasPasskeys] = useState(false);
  // The password was right a moment ago, and waits in this page.
  const [isProved, setIsProved] = useState(false);
  const formRef = useRef<HTMLFormElement>(null);
  useEffect(() => {
    // What a person or a password manager filled in before this script ran stands in the page, not yet in the state.
    const filled = (name: string) => formRef.current?.querySelector<HTMLInputElement>(`input[name=${name}]`)?.value;
    setEmail((now) => filled('email') || now);
    setPassword((now) => filled('password') || now);
    setCode((now) => filled('code') || now);
    setReady(true);
    setHasPasskeys(knowsPasskeys());
  }, []);

  const attempt = async (factor: () => Promise<Parameters<typeof signIn>[2] | 'given up'>) => {
    setBusy(true);
    setFault(null);
    setProblem(null);
    try {
      const shown = await factor();
      if (shown === 'given up') setFault('No passkey was used. Try again, or type a code.');
      else {
        const refused = await signIn(email.trim(), password, shown);
        if (refused === null) return location.assign(first.next);
        setFault(refused.fault);
        setAsksFactor(refused.asksFactor);
        setIsProved(refused.asksFactor);
        setCode('');
        if (!refused.asksFactor) setPassword('');
      }
    } catch (error) {
      setProblem(error);
    }
    setBusy(false);
  };
  const submit = (event: FormEvent) => {
    event.preventDefault();
    return attempt(async () => (code.trim() ? { code: code.trim() } : null));
  };
  const usePasskey = () =>
    attempt(async () => {
      const passkey = await askPasskey(email.trim(), password);
      return passkey ? { passkey } : 'given up';
    });
  const startAgain = () => {
    setAsksFactor(false);
    setIsProved(false);
    setPassword('');
    setCode('');
    setFault(null);
    setProblem(null);
  };
  const fill = (person: { email: string; password: string }) => {
    startAgain();
    setEmail(person.email);
    setPassword(person.password);
  };
  return {
    ...{ formRef, email, setEmail, password, setPassword, code, setCode, fault, problem, busy, ready },
    ...{ asksFactor, isProved, hasPasskeys, submit, usePasskey, startAgain, fill },
  };
}
