import { useState } from 'react';
import type { PersonRecord } from '../../contracts/people.ts';
import { DataTable } from '../ui/DataTable.tsx';
import { Menu, type MenuItem } from '../ui/Menu.tsx';
import { Problem } from '../ui/Problem.tsx';
import { StatusLine } from '../ui/StatusLine.tsx';
import { AddToLabDialog } from './AddToLabDialog.tsx';
import { DeactivateDialog } from './DeactivateDialog.tsx';
import { NameDialog, type Question, QuestionDialog } from './PersonDialogs.tsx';
import { PEOPLE_COLUMNS } from './people-columns.tsx';
import { usePeople } from './usePeople.ts';

interface Props {
  people: PersonRecord[];
  labs: { id: string; name: string }[];
  /** The account of the steward who looks. */
  me: string;
}

interface Asked {
  person: PersonRecord;
  what: Question | 'deactivate' | 'add-to-lab' | 'name';
}

/** Everybody who has an account, for stewards: what they may, and what is done about it. */
export function PeoplePage({ people: first, labs, me }: Props) {
  const { data: people, error, refetch } = usePeople(first);
  const [asked, setAsked] = useState<Asked | null>(null);
  const [done, setDone] = useState('');
  const close = () => setAsked(null);
  const settle = (said: string) => {
    // Who gave up being steward may not see this page any more.
    if (asked?.what === 'end-steward' && asked.person.id === me) return location.assign('/');
    setAsked(null);
    setDone(said);
  };
  const ask = (person: PersonRecord, what: Asked['what']) => () => {
    setDone('');
    setAsked({ person, what });
  };
  const items = (person: PersonRecord): MenuItem[] => {
    const name = { label: 'Correct the name …', onSelect: ask(person, 'name') };
    if (person.state === 'deactivated') return [{ label: 'Reactivate …', onSelect: ask(person, 'reactivate') }, name];
    return [
      { label: 'Add to a lab …', onSelect: ask(person, 'add-to-lab') },
      name,
      person.steward
        ? { label: 'End stewardship …', onSelect: ask(person, 'end-steward') }
        : { label: 'Make steward …', onSelect: ask(person, 'make-steward') },
      { label: 'Mail a link for a new password …', onSelect: ask(person, 'password-reset') },
      { label: 'Sign out everywhere …', onSelect: ask(person, 'end-sessions') },
      // Nobody closes the account they are signed in with: another steward does.
      { label: 'Deactivate …', danger: true, disabled: person.id === me, onSelect: ask(person, 'deactivate') },
    ];
  };
  const dialogs = asked && { person: asked.person, onClose: close, onDone: settle };
  return (
    <>
      <header className="mb-3">
        <h1 className="text-xl font-semibold">People</h1>
        <p className="mt-1 max-w-prose text-ink-soft">
          Everybody who has an account. People join by an invitation of a lab or a folio; a change here takes effect
          with the person’s next request and stands in the trail.
        </p>
      </header>
      <Problem problem={error} onRetry={() => void refetch()} />
      <StatusLine>{done}</StatusLine>
      <DataTable
        name="People"
        columns={PEOPLE_COLUMNS}
        rows={people}
        rowId={(person) => person.id}
        sort="name"
        actions={(person) => (
          <Menu
            kind="quiet"
            label={
              <>
                Change<span className="sr-only"> {person.name}</span>
              </>
            }
            items={items(person)}
          />
        )}
      />
      {dialogs && asked.what === 'deactivate' && <DeactivateDialog {...dialogs} />}
      {dialogs && asked.what === 'add-to-lab' && <AddToLabDialog {...dialogs} labs={labs} />}
      {dialogs && asked.what === 'name' && <NameDialog {...dialogs} />}
      {dialogs && asked.what !== 'deactivate' && asked.what !== 'add-to-lab' && asked.what !== 'name' && (
        <QuestionDialog {...dialogs} question={asked.what} />
      )}
    </>
  );
}
