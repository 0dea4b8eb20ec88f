import { useState } from 'react';
import type { GrantPatch, GrantRecord } from '../../contracts/grants.ts';
import { Button } from '../ui/Button.tsx';
import { Select, TextInput } from '../ui/controls.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { dayLater } from '../ui/dates.ts';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { LEVELS } from './licences.ts';
import type { useFolio } from './useFolio.ts';

interface Props {
  grant: GrantRecord;
  changeGrant: ReturnType<typeof useFolio>['changeGrant'];
  now: string;
  onClose: () => void;
}

/** The dialog in which a guest's level and end are changed, also of one whose time is over. */
export function ChangeGrant({ grant, changeGrant, now, onClose }: Props) {
  const isOver = grant.expires <= now;
  const [level, setLevel] = useState(grant.level);
  const [until, setUntil] = useState(isOver ? dayLater(now, 365) : grant.expires.slice(0, 10));
  const refused = changeGrant.error instanceof ProblemError ? changeGrant.error : null;
  // The end stays to the minute what it is as long as nobody chooses another day.
  const isSameDay = until === grant.expires.slice(0, 10);
  const patch: GrantPatch = { level, ...(isSameDay ? {} : { expires: until }) };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={isOver ? 'Renew this access' : 'Change this access'}
      description={`${grant.name} (${grant.email}). It holds from the next request on.`}
      actions={
        <>
          <Button onClick={onClose}>Leave</Button>
          <Button type="submit" form="change-grant" kind="primary" disabled={changeGrant.isPending}>
            Save
          </Button>
        </>
      }
    >
      <form
        id="change-grant"
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          changeGrant.mutate({ id: grant.id, patch }, { onSuccess: onClose });
        }}
      >
        <Select
          label="May"
          options={LEVELS}
          value={level}
          onChange={(event) => setLevel(event.target.value as GrantRecord['level'])}
        />
        <TextInput
          label="Until"
          type="date"
          required
          hint="The last day (UTC)."
          min={dayLater(now, 0)}
          error={refused?.about('expires')}
          value={until}
          onChange={(event) => setUntil(event.target.value)}
        />
        {!refused?.about('expires') && <Problem problem={changeGrant.error} />}
      </form>
    </Dialog>
  );
}
