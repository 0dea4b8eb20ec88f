import { useState } from 'react';
import type { PersonPatch, PersonRecord } from '../../contracts/people.ts';
import { Button } from '../ui/Button.tsx';
import { TextInput } from '../ui/controls.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { Problem } from '../ui/Problem.tsx';
import { useAct, useChangePerson } from './usePeople.ts';

interface Props {
  person: PersonRecord;
  onClose: () => void;
  onDone: (said: string) => void;
}

/** What a steward does to an account after one question: the words of the question, and what is sent. */
export type Question = 'make-steward' | 'end-steward' | 'reactivate' | 'end-sessions' | 'password-reset';

interface Words {
  title: string;
  description: string;
  button: string;
  patch?: PersonPatch;
  isGrave?: boolean;
}

function wordsOf(question: Question, { name, email }: PersonRecord): Words {
  switch (question) {
    case 'make-steward':
      return {
        title: `Make ${name} a steward`,
        description: 'A steward sees and changes everything in every lab, and decides on accounts.',
        button: 'Make steward',
        patch: { steward: true },
      };
    case 'end-steward':
      return {
        title: `End the stewardship of ${name}`,
        description: 'Roles in labs stay. Open invitations that only a steward may send are revoked.',
        button: 'End stewardship',
        patch: { steward: false },
        isGrave: true,
      };
    case 'reactivate':
      return {
        title: `Reactivate ${name}`,
        description:
          'The person can sign in again, with the roles and folios they have. Access tokens stay revoked, and so do invitations.',
        button: 'Reactivate',
        patch: { state: 'active' },
      };
    case 'end-sessions':
      return {
        title: `Sign ${name} out everywhere`,
        description: 'Every session ends with its next request. Access tokens go on working.',
        button: 'Sign out',
        isGrave: true,
      };
    case 'password-reset':
      return {
        title: `Mail ${name} a link to choose a new password`,
        description: `The link goes to ${email} and works once, for an hour. Nobody else sees it, and the old password works until then.`,
        button: 'Send the link',
      };
  }
}

/** One question before something is done to an account. */
export function QuestionDialog({ person, question, onClose, onDone }: Props & { question: Question }) {
  const { title, description, button, patch, isGrave } = wordsOf(question, person);
  const change = useChangePerson(person.id, ({ name, steward, state }) =>
    onDone(patch?.state ? `${name} is ${state}.` : `${name} is ${steward ? 'a steward now' : 'no longer a steward'}.`),
  );
  const act = useAct(person.id, (answer) =>
    onDone(answer ? `Sessions ended: ${answer.ended}.` : `A link is on its way to ${person.email}.`),
  );
  const go = () => (patch ? change.mutate({ patch }) : act.mutate(question as 'end-sessions' | 'password-reset'));
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={title}
      description={description}
      actions={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button kind={isGrave ? 'danger' : 'primary'} disabled={change.isPending || act.isPending} onClick={go}>
            {button}
          </Button>
        </>
      }
    >
      <Problem problem={change.error ?? act.error} />
    </Dialog>
  );
}

/** Correcting a name, as it stands beside everything the person did. */
export function NameDialog({ person, onClose, onDone }: Props) {
  const [name, setName] = useState(person.name);
  const change = useChangePerson(person.id, (changed) => onDone(`The name is ${changed.name} now.`));
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Correct the name of ${person.name}`}
      description="It changes wherever the name stands. The address is the person’s own to change."
      actions={
        <>
          <Button onClick={onClose}>Leave it</Button>
          <Button type="submit" form="correct-name" kind="primary" disabled={change.isPending}>
            Save
          </Button>
        </>
      }
    >
      <form
        id="correct-name"
        className="flex flex-col gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          change.mutate({ patch: { name } });
        }}
      >
        <TextInput
          label="Name"
          required
          maxLength={200}
          value={name}
          onChange={(event) => setName(event.target.value)}
        />
        <Problem problem={change.error} />
      </form>
    </Dialog>
  );
}
