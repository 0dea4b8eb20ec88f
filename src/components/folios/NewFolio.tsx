import { useMutation } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { FolioInput, FolioRecord } from '../../contracts/sharing.ts';
import { Button, ButtonLink } from '../ui/Button.tsx';
import { sendJson } from '../ui/http.ts';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { queryClient } from '../ui/query-client.ts';
import { useDraft } from '../ui/useDraft.ts';
import { type FolioDraft, FolioFields } from './FolioFields.tsx';
import { embargoInstant } from './folio-facts.ts';

interface Props {
  labs: readonly { id: string; name: string }[];
  /** Accessions to put in at once, from a selection elsewhere. */
  items: readonly string[];
}

const FIELDS = ['name', 'description', 'lab', 'licence', 'shows', 'embargoUntil'];

/** A folio to be made. */
export function NewFolio({ labs, items }: Props) {
  const empty = useMemo<FolioDraft>(
    () => ({ name: '', description: '', lab: labs[0]?.id ?? '', licence: 'CC-BY-4.0', shows: 'attested', embargo: '' }),
    [labs],
  );
  const { draft, change, clear } = useDraft('new-folio', empty);
  const make = useMutation(
    {
      mutationFn: async () => {
        const { name, description, licence, shows, embargo } = draft;
        const input: FolioInput = {
          name,
          lab: labs.some(({ id }) => id === draft.lab) ? draft.lab : empty.lab,
          licence,
          shows,
          embargoUntil: embargoInstant(embargo),
          items: items.map((accession) => ({ accession, spectra: 'all' as const })),
          ...(description ? { description } : {}),
        };
        const folio = await sendJson<FolioRecord>('POST', '/api/folios', input);
        clear();
        location.assign(`/folios/${folio.id}`);
      },
    },
    queryClient,
  );
  const refused = make.error instanceof ProblemError ? make.error : null;
  const isTold = FIELDS.some((field) => refused?.about(field));
  return (
    <form
      aria-label="New folio"
      className="specimen mx-auto max-w-xl px-6 pt-5 pb-6"
      onSubmit={(event) => {
        event.preventDefault();
        make.mutate();
      }}
    >
      <h1 className="mb-4 text-lg font-semibold">New folio</h1>
      <FolioFields draft={draft} change={change} fault={(field) => refused?.about(field)} labs={labs}>
        {items.length > 0 && (
          <p className="text-ink-soft">
            {items.length === 1 ? 'One complex goes' : `${items.length} complexes go`} into it with all their spectra.
          </p>
        )}
        {!isTold && <Problem problem={make.error} />}
        <div className="flex justify-end gap-2">
          <ButtonLink href="/folios">Leave</ButtonLink>
          <Button type="submit" kind="primary" disabled={make.isPending}>
            Make the folio
          </Button>
        </div>
      </FolioFields>
    </form>
  );
}
