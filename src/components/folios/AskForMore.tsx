import { type FormEvent, useMemo } from 'react';
import type { AskedForMore } from '../../contracts/grants.ts';
import { Button } from '../ui/Button.tsx';
import { Select, TextArea } from '../ui/controls.tsx';
import { shortDay } from '../ui/dates.ts';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { StatusLine } from '../ui/StatusLine.tsx';
import { useDraft } from '../ui/useDraft.ts';
import { useAskForMore } from './useAskForMore.ts';

type Wants = AskedForMore['wants'];
const WANTS: { value: Wants; label: string }[] = [
  { value: 'longer', label: 'A longer time' },
  { value: 'download', label: 'To download files' },
  { value: 'other', label: 'Something else' },
];
const wanted = (wants: Wants) => WANTS.find(({ value }) => value === wants)!.label.toLowerCase();

interface Props {
  folio: string;
  /** Requests that wait for an answer. */
  asked: readonly AskedForMore[];
  /** Who may download already is not offered to ask for it. */
  mayDownload: boolean;
  /** Whether access ended, so that what is asked for is access again. */
  hasEnded?: boolean;
}

/** A guest's request to the lab of a folio. */
export function AskForMore({ folio, asked, mayDownload, hasEnded = false }: Props) {
  const empty = useMemo<{ wants: Wants; message: string }>(
    () => ({ wants: hasEnded || mayDownload ? 'longer' : 'download', message: '' }),
    [hasEnded, mayDownload],
  );
  const { draft, change, clear } = useDraft(`ask:${folio}`, empty);
  const { ask, sent } = useAskForMore(folio, asked);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    ask.mutate(
      { wants: draft.wants, ...(draft.message.trim() ? { message: draft.message } : {}) },
      { onSuccess: clear },
    );
  };
  const fault = ask.error instanceof ProblemError ? ask.error.about('message') : undefined;
  return (
    <form onSubmit={submit} aria-label="Ask for more" className="flex flex-col gap-3">
      {sent.length > 0 && (
        <ul className="flex flex-col gap-1 text-xs text-ink-soft">
          {sent.map(({ id, wants, createdAt }) => (
            <li key={id}>
              Asked on {shortDay(createdAt)}: {wanted(wants)}. The lab has not answered yet.
            </li>
          ))}
        </ul>
      )}
      <Select
        label="I ask for"
        options={WANTS.filter(({ value }) => value !== 'download' || !mayDownload)}
        value={draft.wants}
        onChange={(event) => change({ wants: event.target.value as Wants })}
      />
      <TextArea
        label="Why, in your words"
        maxLength={2000}
        hint={draft.wants === 'longer' ? 'A year more, if the lab agrees.' : undefined}
        error={fault}
        value={draft.message}
        onChange={(event) => change({ message: event.target.value })}
      />
      {!fault && <Problem problem={ask.error} />}
      <Button type="submit" className="self-start" disabled={ask.isPending || sent.length >= 3}>
        Send to the lab
      </Button>
      <StatusLine>
        {ask.isSuccess && 'The leads of the lab were told by mail. You will get their answer by mail.'}
      </StatusLine>
    </form>
  );
}
