import { browserSupportsWebAuthn } from '@simplewebauthn/browser';
import { useEffect, useState } from 'react';
import type { FactorOverview, FactorRecord } from '../../../contracts/second-factor.ts';
import { Button } from '../../ui/Button.tsx';
import { Panel } from '../../ui/Panel.tsx';
import { Problem } from '../../ui/Problem.tsx';
import { Notice, StatusLine } from '../../ui/StatusLine.tsx';
import { AddApp } from './AddApp.tsx';
import { AddPasskey } from './AddPasskey.tsx';
import { AskPassword } from './AskPassword.tsx';
import { FactorList } from './FactorList.tsx';
import { NewRecoveryCodes } from './NewRecoveryCodes.tsx';
import { useSecondFactor } from './useSecondFactor.ts';

type Asked = { what: 'app' } | { what: 'passkey' } | { what: 'renew' } | { what: 'remove'; factor: FactorRecord };

/** Own second factors: what there is, adding and removing, and the codes for who loses theirs. */
export function SecondFactorPanel() {
  const factors = useSecondFactor();
  const { overview, startApp, confirmApp, addPasskey, remove, renewCodes } = factors;
  const [asked, setAsked] = useState<Asked | null>(null);
  const [codes, setCodes] = useState<readonly string[]>([]);
  const [done, setDone] = useState('');

  const leave = () => {
    setAsked(null);
    for (const { reset } of [startApp, confirmApp, addPasskey, remove, renewCodes]) reset();
  };
  const finish = (told: string, recoveryCodes: readonly string[] = []) => {
    leave();
    setDone(told);
    if (recoveryCodes.length > 0) setCodes(recoveryCodes);
  };
  const added = (recoveryCodes: string[]) =>
    finish('Set up. From now on signing in asks for a second factor.', recoveryCodes);
  const ask = (next: Asked) => {
    setDone('');
    setAsked(next);
  };

  const known = overview.data;
  const dialog = { factors, first: known?.factors.length === 0, onDone: added, onClose: leave };
  return (
    <Panel title={<span id="second-factor">Second factor</span>}>
      <p className="mb-4 max-w-prose text-ink-soft">
        After your password, signing in asks for something that only you have: a code of an authenticator app, or a
        passkey. Whoever learns your password then still stays outside.
      </p>
      {codes.length > 0 && <NewRecoveryCodes codes={codes} onKept={() => setCodes([])} />}
      <Problem problem={overview.error} onRetry={() => overview.refetch()} />
      {known ? <Factors known={known} ask={ask} /> : overview.isPending && <StatusLine kind="busy">Loading</StatusLine>}
      <StatusLine>{done}</StatusLine>
      {asked?.what === 'app' && <AddApp {...dialog} />}
      {asked?.what === 'passkey' && <AddPasskey {...dialog} />}
      {asked?.what === 'remove' && (
        <AskPassword
          title={`Remove "${asked.factor.name}"`}
          description={
            known?.factors.length === 1
              ? 'It is your only one: your password alone will sign you in, and your recovery codes go, too.'
              : 'It signs nobody in from then on. Your other factors stay.'
          }
          action="Remove"
          kind="danger"
          busy={remove.isPending}
          error={remove.error}
          onPassword={(password) =>
            remove.mutate(
              { id: asked.factor.id, password },
              { onSuccess: () => finish(`Removed "${asked.factor.name}".`) },
            )
          }
          onClose={leave}
        />
      )}
      {asked?.what === 'renew' && (
        <AskPassword
          title="Make new recovery codes"
          description="Ten new codes take the place of those you have, which no longer work."
          action="Make new codes"
          busy={renewCodes.isPending}
          error={renewCodes.error}
          onPassword={(password) =>
            renewCodes.mutate(
              { password },
              { onSuccess: ({ recoveryCodes }) => finish('New recovery codes were made.', recoveryCodes) },
            )
          }
          onClose={leave}
        />
      )}
    </Panel>
  );
}

function Factors({ known, ask }: { known: FactorOverview; ask: (next: Asked) => void }) {
  const { factors, required, recoveryCodesLeft } = known;
  const [hasPasskeys, setHasPasskeys] = useState(true);
  useEffect(() => setHasPasskeys(browserSupportsWebAuthn()), []);
  const none = factors.length === 0;
  return (
    <div className="flex flex-col gap-4">
      {none && required && (
        <Notice title="Needed">A steward acts as steward only with a second factor. Set one up here.</Notice>
      )}
      {!none && <FactorList factors={factors} onRemove={(factor) => ask({ what: 'remove', factor })} />}
      {none && !required && <p>You have none yet: your password alone signs you in.</p>}
      <div className="flex flex-wrap items-center gap-2">
        <Button kind={none ? 'primary' : 'plain'} onClick={() => ask({ what: 'app' })}>
          Add an authenticator app
        </Button>
        <Button disabled={!hasPasskeys} onClick={() => ask({ what: 'passkey' })}>
          Add a passkey
        </Button>
        {!hasPasskeys && <p className="text-xs text-ink-soft">This browser has no passkeys. An app works anywhere.</p>}
      </div>
      {!none && (
        <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
          <p className={recoveryCodesLeft < 3 ? 'text-alert' : 'text-ink-soft'}>
            <span className="num">{recoveryCodesLeft}</span> of <span className="num">10</span> recovery codes left, for
            when you lose your factor.
          </p>
          <Button size="small" onClick={() => ask({ what: 'renew' })}>
            Make new codes
          </Button>
        </div>
      )}
    </div>
  );
}
