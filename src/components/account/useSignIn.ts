import { type FormEvent, useEffect, useState } from 'react';
import { signIn } from './sign-in.ts';

/** The state of the sign-in form. A refusal keeps the address and empties the password. */
export function useSignIn(first: { email: string; fault: string | null; next: string }) {
  const [email, setEmail] = useState(first.email);
  const [password, setPassword] = useState('');
  const [fault, setFault] = useState(first.fault);
  const [problem, setProblem] = useState<unknown>(null);
  const [busy, setBusy] = useState(false);
  const [ready, setReady] = useState(false);
  useEffect(() => setReady(true), []);

  const submit = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setFault(null);
    setProblem(null);
    try {
      const refused = await signIn(email.trim(), password);
      if (refused === null) return location.assign(first.next);
      setFault(refused);
      setPassword('');
    } catch (error) {
      setProblem(error);
    }
    setBusy(false);
  };
  const fill = (person: { email: string; password: string }) => {
    setEmail(person.email);
    setPassword(person.password);
    setFault(null);
  };
  return { email, setEmail, password, setPassword, fault, problem, busy, ready, submit, fill };
}
