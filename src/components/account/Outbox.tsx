import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { Page } from '../../contracts/common.ts';
import type { MailRecord } from '../../contracts/sharing.ts';
import { minute } from '../ui/dates.ts';
import { EmptyState } from '../ui/EmptyState.tsx';
import { getJson } from '../ui/http.ts';
import { Facts } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { queryClient } from '../ui/query-client.ts';
import { mailParts } from './mail-text.ts';

const ASK_AGAIN_MS = 4000;

/** The mail of a demo: what it would have sent, newest first. */
export function Outbox() {
  const [chosen, setChosen] = useState<string | null>(null);
  const { data, error, refetch } = useQuery(
    {
      queryKey: ['outbox'],
      queryFn: ({ signal }) => getJson<Page<MailRecord>>('/api/outbox?limit=200', signal),
      refetchInterval: ASK_AGAIN_MS,
    },
    queryClient,
  );
  if (error) return <Problem problem={error} onRetry={() => void refetch()} />;
  if (!data) return <p role="status">Reading the mail…</p>;
  const mail = data.items.find(({ id }) => id === chosen) ?? data.items[0];
  if (!mail) {
    return (
      <EmptyState title="No mail yet">Invite a member into a lab or a guest to a folio: the mail lies here.</EmptyState>
    );
  }
  return (
    <div className="grid items-start gap-6 lg:grid-cols-[minmax(300px,420px)_minmax(0,1fr)]">
      <ol aria-label="Mail, newest first" className="max-h-[70vh] overflow-y-auto border border-hairline bg-glaze">
        {data.items.map((item) => (
          <li key={item.id} className="border-b border-faint last:border-0">
            <button
              type="button"
              aria-current={item.id === mail.id || undefined}
              onClick={() => setChosen(item.id)}
              className="block w-full px-4 py-2.5 text-left hover:bg-zaffre-wash aria-current:bg-zaffre-wash aria-current:shadow-[inset_3px_0_var(--color-zaffre)]"
            >
              <span className="block truncate font-semibold">{item.subject}</span>
              <span className="flex gap-3 text-xs text-ink-soft">
                <span className="min-w-0 truncate">{item.to}</span>
                <span className="ml-auto flex-none">{minute(item.createdAt)}</span>
              </span>
            </button>
          </li>
        ))}
      </ol>
      <article className="specimen min-w-0 px-6 py-5" aria-labelledby="mail-subject">
        <h2 id="mail-subject" className="mb-3 text-lg font-semibold break-words">
          {mail.subject}
        </h2>
        <Facts
          facts={[
            ['To', mail.to],
            ['Kind', mail.kind],
            ['State', mail.state === 'sent' ? 'sent (to the stand-in on this machine)' : mail.state],
            ['Time', minute(mail.createdAt)],
          ]}
        />
        <p className="mt-4 border-t border-hairline pt-4 break-words whitespace-pre-wrap">
          {mailParts(mail.text).map((part, i) =>
            'link' in part ? (
              <a key={i} href={part.link} className="link break-all">
                {part.link}
              </a>
            ) : (
              part.text
            ),
          )}
        </p>
      </article>
    </div>
  );
}
