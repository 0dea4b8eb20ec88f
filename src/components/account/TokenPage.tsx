import { useState } from 'react';
import type { TokenRecord } from '../../contracts/sharing.ts';
import { Button } from '../ui/Button.tsx';
import { CopyText } from '../ui/CopyText.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { shortDay } from '../ui/dates.ts';
import { EmptyState } from '../ui/EmptyState.tsx';
import { Problem } from '../ui/Problem.tsx';
import type { DataColumn } from '../ui/table-csv.ts';
import { NewToken } from './NewToken.tsx';
import { useTokens } from './useTokens.ts';

interface Props {
  tokens: TokenRecord[];
  labs: readonly { id: string; name: string }[];
  mayMake: boolean;
  now: string;
}

function columns(labs: Props['labs']): DataColumn<TokenRecord>[] {
  const labName = (id: string | null) =>
    id === null ? 'all of mine' : (labs.find((lab) => lab.id === id)?.name ?? id);
  return [
    { id: 'name', header: 'Name', value: (token) => token.name },
    { id: 'scopes', header: 'May', value: (token) => token.scopes.join(' and ') },
    { id: 'lab', header: 'Rights of', value: (token) => labName(token.lab) },
    { id: 'made', header: 'Made', value: (t) => t.createdAt.slice(0, 10), cell: (t) => shortDay(t.createdAt) },
    { id: 'ends', header: 'Ends', value: (t) => t.expires.slice(0, 10), cell: (t) => shortDay(t.expires) },
    {
      id: 'used',
      header: 'Last used',
      value: (token) => token.lastUsedAt?.slice(0, 10) ?? null,
      cell: (token) => (token.lastUsedAt ? shortDay(token.lastUsedAt) : 'never'),
    },
  ];
}

/** Own access tokens: for scripts and instruments that use the API in one's place. */
export function TokenPage({ tokens: first, labs, mayMake, now }: Props) {
  const { tokens, make, revoke } = useTokens(first);
  const [asked, setAsked] = useState<TokenRecord | null>(null);
  const [making, setMaking] = useState(false);
  return (
    <>
      <header className="mb-5 flex flex-wrap items-center gap-4">
        <div>
          <h1 className="text-xl font-semibold">Access tokens</h1>
          <p className="text-ink-soft">
            For scripts and instruments that use the{' '}
            <a href="/api-reference" className="link">
              API
            </a>{' '}
            in your place. A token never invites, makes tokens or changes roles.
          </p>
        </div>
        {mayMake && (
          <Button kind="primary" className="ml-auto" onClick={() => setMaking(true)}>
            Make a token
          </Button>
        )}
      </header>
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
      <Problem problem={revoke.error} />
      {tokens.length > 0 ? (
        <DataTable
          name="Access tokens"
          columns={columns(labs)}
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
