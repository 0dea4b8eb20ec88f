import { type FormEvent, useState } from 'react';
import type { Account } from '../../contracts/account.ts';
import { Button } from '../ui/Button.tsx';
import { TextInput } from '../ui/controls.tsx';
import { longDay } from '../ui/dates.ts';
import { Facts, Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { StatusLine } from '../ui/StatusLine.tsx';
import { useRename } from './useAccount.ts';

/** Who one is here, and the name that others see. */
export function ProfilePanel({ account }: { account: Account }) {
  const [name, setName] = useState(account.name);
  const rename = useRename();
  const fault = rename.error instanceof ProblemError ? rename.error.about('name') : undefined;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    rename.mutate(name.trim());
  };
  return (
    <Panel title="Profile">
      <Facts
        facts={[
          ['E-mail address', account.email],
          account.steward ? ['Part', 'steward'] : null,
          ['Labs', account.labs.length > 0 ? <Labs labs={account.labs} /> : withoutLab(account.steward)],
          ['Account since', longDay(account.createdAt)],
        ]}
      />
      <form aria-label="Name" className="mt-4 flex flex-col gap-3" onSubmit={submit}>
        <TextInput
          label="Name"
          hint="Others see it beside what you do."
          autoComplete="name"
          required
          maxLength={200}
          error={fault}
          value={name}
          onChange={(event) => {
            rename.reset();
            setName(event.target.value);
          }}
        />
        {!fault && <Problem problem={rename.error} />}
        <div className="flex items-center gap-3">
          <Button type="submit" disabled={rename.isPending || name.trim() === account.name}>
            Save the name
          </Button>
          <StatusLine>{rename.isSuccess && 'Saved'}</StatusLine>
        </div>
      </form>
    </Panel>
  );
}

const withoutLab = (steward: boolean): string =>
  steward ? 'none: you look after the whole registry' : 'none: you read what folios share with you';

function Labs({ labs }: Pick<Account, 'labs'>) {
  return (
    <ul>
      {labs.map(({ id, name, role }) => (
        <li key={id}>
          <a href={`/labs/${id}`} className="link">
            {name}
          </a>
          , {role}
        </li>
      ))}
    </ul>
  );
}
