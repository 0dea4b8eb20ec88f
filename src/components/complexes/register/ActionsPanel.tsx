import { Button } from '#src/components/ui/Button.tsx';
import { Select, TextArea } from '#src/components/ui/controls.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { toProblemError } from '#src/components/ui/problem-error.ts';
import { StatusLine } from '#src/components/ui/StatusLine.tsx';
import type { RegisterForm } from './useRegisterForm.ts';

interface ActionsPanelProps {
  form: RegisterForm;
  labs: readonly { id: string; name: string }[];
}

/** Whose it is, who sees it, and the two ways to keep it. */
export function ActionsPanel({ form, labs }: ActionsPanelProps) {
  const { draft, change, send, obstacle, lab, isSending, problem, registered } = form;
  const busy = isSending || obstacle !== null;
  return (
    <div className="flex flex-col gap-3">
      <Select
        label="Home lab"
        value={lab}
        onChange={(event) => change({ lab: event.currentTarget.value })}
        options={labs.map(({ id, name }) => ({ value: id, label: name }))}
      />
      <Select
        label="Seen by"
        value={draft.visibility}
        onChange={(event) => change({ visibility: event.currentTarget.value as 'programme' | 'lab' })}
        options={[
          { value: 'programme', label: 'all labs of the programme' },
          { value: 'lab', label: 'members of the home lab' },
        ]}
      />
      <TextArea
        label="Notes"
        rows={2}
        maxLength={10_000}
        value={draft.notes}
        onChange={(event) => change({ notes: event.currentTarget.value })}
      />
      <Failure problem={problem} registered={registered} onRetry={() => send('registered')} />
      <Button kind="primary" className="min-h-11 w-full" disabled={busy} onClick={() => send('registered')}>
        {registered ? 'Add the preparation' : 'Register'}
      </Button>
      {!registered && (
        <Button className="w-full" disabled={busy} onClick={() => send('draft')}>
          Save as draft
        </Button>
      )}
      <div className="-mb-3">
        <StatusLine kind="busy">{isSending ? 'Sending' : obstacle}</StatusLine>
      </div>
    </div>
  );
}

/** A refusal where the button is; a registered twin is linked. */
function Failure({
  problem,
  registered,
  onRetry,
}: {
  problem: unknown;
  registered: string | null;
  onRetry: () => void;
}) {
  if (!problem) return null;
  const twin = toProblemError(problem).members.accession;
  return (
    <div className="flex flex-col gap-2">
      {registered && (
        <p>
          The complex is registered as{' '}
          <a href={`/complexes/${registered}`} className="link num">
            {registered}
          </a>
          ; its preparation is not made yet.
        </p>
      )}
      <Problem problem={problem} onRetry={onRetry} />
      {typeof twin === 'string' && (
        <a href={`/complexes/${twin}`} className="link">
          Open <span className="num">{twin}</span>
        </a>
      )}
    </div>
  );
}
