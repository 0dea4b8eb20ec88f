import type { ReactNode } from 'react';
import { Select, TextArea, TextInput } from '../ui/controls.tsx';
import { LICENCES, type Licence, SHOWS } from './licences.ts';

export interface FolioDraft {
  name: string;
  description: string;
  lab: string;
  licence: Licence;
  shows: 'attested' | 'proposed';
  /** A day, or empty. */
  embargo: string;
}

interface Props {
  draft: FolioDraft;
  change: (part: Partial<FolioDraft>) => void;
  fault: (field: string) => string | undefined;
  /** Own labs to choose from; left out where the lab stands. */
  labs?: readonly { id: string; name: string }[];
  children?: ReactNode;
}

/** What is told of a folio when it is made or changed. */
export function FolioFields({ draft, change, fault, labs, children }: Props) {
  return (
    <div className="flex flex-col gap-4">
      <TextInput
        label="Name"
        required
        maxLength={200}
        error={fault('name')}
        value={draft.name}
        onChange={(event) => change({ name: event.target.value })}
      />
      <TextArea
        label="Description"
        maxLength={5000}
        error={fault('description')}
        value={draft.description}
        onChange={(event) => change({ description: event.target.value })}
      />
      {labs && labs.length > 1 && (
        <Select
          label="Lab"
          error={fault('lab')}
          options={labs.map(({ id, name }) => ({ value: id, label: name }))}
          value={draft.lab}
          onChange={(event) => change({ lab: event.target.value })}
        />
      )}
      <Select
        label="Licence"
        hint="Stands in every download."
        error={fault('licence')}
        options={LICENCES}
        value={draft.licence}
        onChange={(event) => change({ licence: event.target.value as Licence })}
      />
      <Select
        label="Guests see"
        error={fault('shows')}
        options={SHOWS}
        value={draft.shows}
        onChange={(event) => change({ shows: event.target.value as FolioDraft['shows'] })}
      />
      <TextInput
        label="Embargo until"
        type="date"
        hint="Guests see nothing of it before this day (UTC). Empty: no embargo."
        error={fault('embargoUntil')}
        value={draft.embargo}
        onChange={(event) => change({ embargo: event.target.value })}
      />
      {children}
    </div>
  );
}
