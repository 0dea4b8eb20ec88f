import { useState } from 'react';
import type { AccessRequestRecord } from '../../contracts/grants.ts';
import { Button } from '../ui/Button.tsx';
import { TextArea } from '../ui/controls.tsx';
import { shortDay } from '../ui/dates.ts';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { StatusLine } from '../ui/StatusLine.tsx';
import { useAccessRequests } from './useAccessRequests.ts';

const WANTS = { download: 'to download files', longer: 'for a longer time', other: 'for something else' } as const;
/** What granting does, said before it is done. */
const GRANTING = {
  download: 'Granting lets them download from the next request on.',
  longer: 'Granting adds a year; an access that has ended begins again for a year.',
  other: 'Granting changes nothing by itself: it tells them yes, with your answer.',
} as const;

/** What guests asked for, and answering them. */
export function AccessRequests({ folio }: { folio: string }) {
  const { requests, settle } = useAccessRequests(folio);
  const all = requests.data ?? [];
  const open = all.filter(({ settledAt }) => settledAt === null);
  const settled = all.filter(({ settledAt }) => settledAt !== null);
  if (all.length === 0) return <Problem problem={requests.error} onRetry={() => void requests.refetch()} />;
  return (
    <Panel title="Requests for more" aside={open.length > 0 ? `${open.length} to answer` : 'none to answer'}>
      <Problem problem={settle.error} />
      <ul className="flex flex-col divide-y divide-faint">
        {open.map((request) => (
          <Open key={request.id} request={request} settle={settle} />
        ))}
      </ul>
      {settled.length > 0 && (
        <details className="mt-2">
          <summary className="min-h-6 cursor-pointer text-ink-soft">Answered ({settled.length})</summary>
          <ul className="mt-1 flex flex-col gap-1 text-xs">
            {settled.map(({ id, name, wants, outcome, settledAt, answer }) => (
              <li key={id}>
                {shortDay(settledAt!)}: {name} asked {WANTS[wants]}; {outcome}
                {answer ? `, “${answer}”` : ''}.
              </li>
            ))}
          </ul>
        </details>
      )}
      <StatusLine>{settle.data && `${settle.data.name} was told by mail: ${settle.data.outcome}.`}</StatusLine>
    </Panel>
  );
}

interface OpenProps {
  request: AccessRequestRecord;
  settle: ReturnType<typeof useAccessRequests>['settle'];
}

function Open({ request, settle }: OpenProps) {
  const [answer, setAnswer] = useState('');
  const { id, name, email, wants, message, createdAt } = request;
  const send = (outcome: 'granted' | 'declined') =>
    settle.mutate({ id, outcome, ...(answer.trim() ? { answer } : {}) });
  return (
    <li className="flex flex-col gap-2 py-3 first:pt-0">
      <p>
        <b className="font-semibold">{name}</b> <span className="text-ink-soft">({email})</span> asks {WANTS[wants]}{' '}
        <span className="text-ink-soft">since {shortDay(createdAt)}</span>
      </p>
      {message && <p className="border-l-2 border-hairline pl-3 whitespace-pre-line">{message}</p>}
      <TextArea
        label={`Answer to ${name}, if you like`}
        rows={2}
        maxLength={2000}
        hint={GRANTING[wants]}
        value={answer}
        onChange={(event) => setAnswer(event.target.value)}
      />
      <div className="flex gap-2">
        <Button kind="primary" disabled={settle.isPending} onClick={() => send('granted')}>
          Grant
        </Button>
        <Button disabled={settle.isPending} onClick={() => send('declined')}>
          Decline
        </Button>
      </div>
    </li>
  );
}
