import { useState } from 'react';
import type { SessionRecord } from '../../contracts/account.ts';
import { Button } from '../ui/Button.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { minute } from '../ui/dates.ts';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { StatusLine } from '../ui/StatusLine.tsx';
import { useSessions } from './useAccount.ts';

/** Where one is signed in. */
export function SessionsPanel({ sessions: first }: { sessions: SessionRecord[] }) {
  const { sessions, error, end, endOthers, endAll } = useSessions(first);
  const [asksAll, setAsksAll] = useState(false);
  const others = sessions.filter(({ current }) => !current).length;
  return (
    <Panel title="Where you are signed in" flush>
      <ul aria-label="Sessions" className="max-h-[30rem] overflow-y-auto border-t border-faint">
        {sessions.map((session) => (
          <Session
            key={session.id}
            session={session}
            isEnding={end.isPending && end.variables === session.id}
            onEnd={() => end.mutate(session.id)}
          />
        ))}
      </ul>
      <div className="flex flex-col gap-3 px-[18px] py-4">
        <Problem problem={error ?? end.error ?? endOthers.error ?? endAll.error} />
        <div className="flex flex-wrap items-center gap-2">
          <Button disabled={others === 0 || endOthers.isPending} onClick={() => endOthers.mutate()}>
            Sign out everywhere else
          </Button>
          <Button kind="quiet" onClick={() => setAsksAll(true)}>
            Sign out everywhere
          </Button>
          <StatusLine>{(end.isSuccess || endOthers.isSuccess) && 'Signed out'}</StatusLine>
        </div>
        <p className="text-xs text-ink-soft">
          A sign-in ends after twelve hours, or after four without a request. If you do not know one of these, end it
          and change your password. Access tokens have{' '}
          <a href="/tokens" className="link">
            a page of their own
          </a>
          .
        </p>
      </div>
      <Dialog
        open={asksAll}
        onOpenChange={setAsksAll}
        title="Sign out everywhere"
        description="This browser is signed out, too."
        actions={
          <>
            <Button onClick={() => setAsksAll(false)}>Stay signed in</Button>
            <Button
              kind="primary"
              disabled={endAll.isPending}
              onClick={() => {
                setAsksAll(false);
                endAll.mutate();
              }}
            >
              Sign out everywhere
            </Button>
          </>
        }
      />
    </Panel>
  );
}

interface SessionProps {
  session: SessionRecord;
  isEnding: boolean;
  onEnd: () => void;
}

function Session({ session, isEnding, onEnd }: SessionProps) {
  const { browser, current, address, createdAt, lastSeenAt, secondFactor } = session;
  const from = [address && `from ${address}`, secondFactor && 'with a second factor'].filter(Boolean).join(', ');
  return (
    <li className="flex flex-wrap items-center gap-x-4 gap-y-2 border-b border-faint px-[18px] py-3">
      <div className="min-w-0 flex-1">
        <p>
          <b className="font-semibold">{browser}</b>
          {current && <span className="ml-2 text-xs text-attest">this browser</span>}
        </p>
        <p className="text-xs text-ink-soft">
          Signed in {minute(createdAt)}
          {from && `, ${from}`}
        </p>
        {!current && <p className="text-xs text-ink-soft">Last used {minute(lastSeenAt)}</p>}
      </div>
      {!current && (
        <Button
          size="small"
          disabled={isEnding}
          onClick={onEnd}
          aria-label={`End ${browser}, signed in ${minute(createdAt)}`}
        >
          End
        </Button>
      )}
    </li>
  );
}
