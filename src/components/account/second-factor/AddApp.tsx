import { type FormEvent, useState } from 'react';
import type { TotpStarted } from '../../../contracts/second-factor.ts';
import { Button } from '../../ui/Button.tsx';
import { CopyText } from '../../ui/CopyText.tsx';
import { TextInput } from '../../ui/controls.tsx';
import { Dialog } from '../../ui/Dialog.tsx';
import { Problem } from '../../ui/Problem.tsx';
import { ProblemError } from '../../ui/problem-error.ts';
import { EndOthers } from './EndOthers.tsx';
import { NameAndPassword } from './NameAndPassword.tsx';
import type { SecondFactor } from './useSecondFactor.ts';

interface Props {
  factors: SecondFactor;
  /** Whether it would be the first factor, which ends other sessions and brings recovery codes. */
  first: boolean;
  onDone: (recoveryCodes: string[]) => void;
  onClose: () => void;
}

/** Setting up an authenticator app: who asks, then the secret, then the first code. */
export function AddApp({ factors: { startApp, confirmApp }, first, onDone, onClose }: Props) {
  const [endOthers, setEndOthers] = useState(true);
  const [code, setCode] = useState('');
  const started = startApp.data;
  const confirm = (event: FormEvent) => {
    event.preventDefault();
    if (!started) return;
    confirmApp.mutate(
      { id: started.id, code, endOthers: first && endOthers },
      { onSuccess: ({ recoveryCodes }) => onDone(recoveryCodes) },
    );
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Add an authenticator app"
      description={
        started
          ? 'Scan the code with the app, then type the six figures that it shows.'
          : 'An app on your phone or computer that shows a new code every 30 seconds.'
      }
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button
            type="submit"
            form={started ? 'confirm-app' : 'start-app'}
            kind="primary"
            disabled={startApp.isPending || confirmApp.isPending}
          >
            {started ? 'Confirm' : 'Continue'}
          </Button>
        </>
      }
    >
      {started ? (
        <form id="confirm-app" className="flex flex-col gap-4" onSubmit={confirm}>
          <Secret started={started} />
          <TextInput
            label="Code of the app"
            figures
            inputMode="numeric"
            autoComplete="one-time-code"
            required
            maxLength={9}
            error={about(confirmApp.error, 'code')}
            value={code}
            onChange={(event) => setCode(event.target.value)}
          />
          {first && <EndOthers checked={endOthers} onChange={setEndOthers} />}
          <Problem problem={confirmApp.error} />
        </form>
      ) : (
        <NameAndPassword
          id="start-app"
          nameHint="How you will tell it from others, such as the phone it is on."
          mutation={startApp}
        />
      )}
    </Dialog>
  );
}

const about = (error: unknown, field: string) => (error instanceof ProblemError ? error.about(field) : undefined);

/** Four groups a line, so that no line ends within a group; where it is pasted into one line, the break falls away. */
const inLines = (secret: string) => secret.replace(/((?:\S+ ){3}\S+) /g, '$1\n');

function Secret({ started: { qr, secret } }: { started: TotpStarted }) {
  return (
    <div className="grid items-center gap-x-5 gap-y-4 sm:grid-cols-[auto_1fr]">
      {/* A reader of such codes wants dark on light, so the picture keeps its white ground in the dark theme. */}
      <img
        src={`data:image/svg+xml,${encodeURIComponent(qr)}`}
        alt="QR code for the app; the secret beside it says the same"
        width={176}
        height={176}
        className="rounded border border-hairline"
      />
      <CopyText label="Or type this secret into the app" text={inLines(secret)} />
    </div>
  );
}
