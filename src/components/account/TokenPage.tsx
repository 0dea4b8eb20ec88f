import { useMemo, useState } from 'react';
import type { TokenRecord } from '../../contracts/sharing.ts';
import { Button } from '../ui/Button.tsx';
import { CopyText } from '../ui/CopyText.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { dayLater, minute, shortDay } from '../ui/dates.ts';
import { EmptyState } from '../ui/EmptyState.tsx';
import { Problem } from '../ui/Problem.tsx';
import { Notice } from '../ui/StatusLine.tsx';
import type { DataColumn } from '../ui/table-csv.ts';
import { NewToken } from './NewToken.tsx';
import { useTokens } from './useTokens.ts';

interface Props {
  tokens: TokenRecord[];
  labs: readonly { id: string; name: string }[];
  mayMake: boolean;
  now: string;
}

/** Days before its end from which a token is marked. */
const SOON_DAYS = 14;
/** Tokens of an account, as the server has it. */
const MOST = 50;

const endsSoon = ({ expires }: TokenRecord, now: string) => expires.slice(0, 10) <= dayLater(now, SOON_DAYS);
function columns(labs: Props['labs'], now: string): DataColumn<TokenRecord>[] {
  const labName = (id: string | null) =>
    id === null ? 'all of mine' : (labs.find((lab) => lab.id === id)?.name ?? id);
  return [
    { id: 'name', header: 'Name', value: (token) => token.name },
    { id: 'scopes', header: 'May', value: (token) => [...token.scopes].sort().join(' and ') },
    { id: 'lab', header: 'Rights of', value: (token) => labName(token.lab) },
    { id: 'made', header: 'Made', value: (t) => t.createdAt.slice(0, 10), cell: (t) => shortDay(t.createdAt) },
    {
      id: 'ends',
      header: 'Ends',
      value: (token) => token.expires.slice(0, 10),
      cell: (token) =>
        endsSoon(token, now) ? (
          <span className="font-medium text-alert">
            <span aria-hidden="true">▲ </span>
            {shortDay(token.expires)}
            <span className="sr-only">, soon</span>
          </span>
        ) : (
          shortDay(token.expires)
        ),
    },
    {
      id: 'used',
      header: 'Last used',
      value: (token) => token.lastUsedAt?.slice(0, 10) ?? null,
      cell: (token) => (token.lastUsedAt ? minute(token.lastUsedAt) : <span className="text-ink-soft">never</span>),
    },
  ];
}

/** Own access tokens: for scripts and instruments that use the API in one's place. */
export function TokenPage({ tokens: first, labs, mayMake, now }: Props) {
  const { tokens, make, revoke, revokeAll } = useTokens(first);
  const [asksAll, setAsksAll] = useState(false);
  const shown = useMemo(() => columns(labs, now), [labs, now]);
  const soon = tokens.filter((token) => endsSoon(token, now)).length;
  const [asked, setAsked] = useState<TokenRecord | null>(null);
  const [making, setMaking] = useState(false);
  return (
    <>
      <header className="mb-5 flex flex-wrap items-start gap-4">
        <div className="max-w-3xl min-w-64 flex-1">
          <h1 className="text-xl font-semibold">Access tokens</h1>
          <p className="text-ink-soft">
            For scripts and instruments that use the{' '}
            <a href="/api-reference" className="link">
              API
            </a>{' '}
            in your place. A token never invites, makes tokens, changes roles or reads the trail. You are told by mail a
            week before one ends.
          </p>
        </div>
        <div className="ml-auto flex gap-2">
          {tokens.length > 1 && (
            <Button kind="danger" onClick={() => setAsksAll(true)}>
              Revoke all
            </Button>
          )}
          {mayMake && (
            <Button kind="primary" disabled={tokens.length >= MOST} onClick={() => setMaking(true)}>
              Make a token
            </Button>
          )}
        </div>
      </header>
      {tokens.length >= MOST && (
        <p className="mb-4 text-ink-soft">
          You have {MOST} tokens, as many as an account may: revoke one to make another.
        </p>
      )}
      {soon > 0 && (
        <div className="mb-4">
          <Notice title={soon === 1 ? 'A token ends soon.' : `${soon} tokens end soon.`}>
            Marked ▲, within {SOON_DAYS} days. Make a new one and put it where the old one is used.
          </Notice>
        </div>
      )}
      {make.data?.token && (
        <section className="specimen mb-6 max-w-3xl px-5 py-4" aria-labelledby="new-token">
          <h2 id="new-token" className="text-base font-semibold">
            {make.data.name}
          </h2>
          <p className="mt-0.5 mb-3 text-ink-soft">
            Shown this once. Keep it as you would a password; who has it acts as you until it ends or is revoked.
          </p>
          <CopyText label="Token" text={make.data.token} />
          <Button size="small" className="mt-2" onClick={() => make.reset()}>
            I have kept it
          </Button>
        </section>
      )}
      <Problem problem={revoke.error ?? revokeAll.error} />
      {tokens.length > 0 ? (
        <DataTable
          name="Access tokens"
          columns={shown}
          rows={tokens}
          rowId={(token) => token.id}
          tools={tokens.length > 8}
          actions={(token) => (
            <Button size="small" kind="danger" onClick={() => setAsked(token)} aria-label={`Revoke ${token.name}`}>
              Revoke
            </Button>
          )}
        />
      ) : (
        <EmptyState title="No token">
          {mayMake
            ? 'Make one when a script or an instrument is to read or write for you.'
            : 'Members of a lab make tokens.'}
        </EmptyState>
      )}
      <Dialog
        open={asksAll}
        onOpenChange={setAsksAll}
        title={`Revoke all ${tokens.length} tokens`}
        description="Every script and instrument that uses one is refused from the next request on."
        actions={
          <>
            <Button onClick={() => setAsksAll(false)}>Keep them</Button>
            <Button
              kind="danger"
              disabled={revokeAll.isPending}
              onClick={() => {
                revokeAll.mutate(tokens[0]!.createdAt); // the newest comes first
                setAsksAll(false);
              }}
            >
              Revoke all
            </Button>
          </>
        }
      />
      {making && <NewToken labs={labs} make={make} now={now} onClose={() => setMaking(false)} />}
      <Dialog
        open={asked !== null}
        onOpenChange={(open) => !open && setAsked(null)}
        title={`Revoke "${asked?.name}"`}
        description="What uses it is refused from the next request on."
        actions={
          <>
            <Button onClick={() => setAsked(null)}>Keep it</Button>
            <Button
              kind="danger"
              disabled={revoke.isPending}
              onClick={() => {
                if (asked) revoke.mutate(asked.id);
                setAsked(null);
              }}
            >
              Revoke
            </Button>
          </>
        }
      />
    </>
  );
}
