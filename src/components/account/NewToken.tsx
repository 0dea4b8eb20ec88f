import { type FormEvent, useMemo } from 'react';
import { Button } from '../ui/Button.tsx';
import { Select, TextInput } from '../ui/controls.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { dayLater } from '../ui/dates.ts';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { useDraft } from '../ui/useDraft.ts';
import type { useTokens } from './useTokens.ts';

const SCOPES = [
  { value: 'read', label: 'Read' },
  { value: 'write', label: 'Read and write' },
];
const DEFAULT_DAYS = 90;
const LONGEST_DAYS = 365;

interface Props {
  labs: readonly { id: string; name: string }[];
  make: ReturnType<typeof useTokens>['make'];
  now: string;
  onClose: () => void;
}

/** The dialog in which a token is made. */
export function NewToken({ labs, make, now, onClose }: Props) {
  const empty = useMemo(
    () => ({ name: '', scope: 'read' as 'read' | 'write', lab: '', expires: dayLater(now, DEFAULT_DAYS) }),
    [now],
  );
  const { draft, change, clear } = useDraft('new-token', empty);
  const refused = make.error instanceof ProblemError ? make.error : null;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    make.mutate(
      {
        name: draft.name,
        scopes: draft.scope === 'write' ? ['read', 'write'] : ['read'],
        expires: draft.expires,
        ...(draft.lab ? { lab: draft.lab } : {}),
      },
      {
        onSuccess: () => {
          clear();
          onClose();
        },
      },
    );
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Make a token"
      actions={
        <>
          <Button onClick={onClose}>Leave</Button>
          <Button type="submit" form="make-token" kind="primary" disabled={make.isPending}>
            Make the token
          </Button>
        </>
      }
    >
      <form id="make-token" className="flex flex-col gap-4" onSubmit={submit}>
        <TextInput
          label="Name"
          hint="What will use it, such as the instrument or the script."
          required
          maxLength={200}
          error={refused?.about('name')}
          value={draft.name}
          onChange={(event) => change({ name: event.target.value })}
        />
        <Select
          label="May"
          options={SCOPES}
          value={draft.scope}
          onChange={(event) => change({ scope: event.target.value as 'read' | 'write' })}
        />
        {labs.length > 0 && (
          <Select
            label="Rights of"
            hint="The rights of one lab alone, or all that you have."
            error={refused?.about('lab')}
            options={[
              { value: '', label: 'All of mine' },
              ...labs.map(({ id, name }) => ({ value: id, label: `${name} alone` })),
            ]}
            value={draft.lab}
            onChange={(event) => change({ lab: event.target.value })}
          />
        )}
        <TextInput
          label="Ends"
          type="date"
          hint="A year from now at most."
          required
          min={dayLater(now, 0)}
          max={dayLater(now, LONGEST_DAYS)}
          error={refused?.about('expires')}
          value={draft.expires}
          onChange={(event) => change({ expires: event.target.value })}
        />
        <Problem problem={make.error} />
      </form>
    </Dialog>
  );
}
