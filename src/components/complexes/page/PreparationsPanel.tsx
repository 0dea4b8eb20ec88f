import { useState } from 'react';
import { Formula, Quantity } from '#src/components/notation/index.tsx';
import { Button } from '#src/components/ui/Button.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import type { ComplexRecord, PreparationRecord } from '#src/contracts/complexes.ts';
import { PreparationDialog } from './PreparationDialog.tsx';

interface PreparationsPanelProps {
  complex: ComplexRecord;
  /** Labs of the reader: for these a preparation can be added. */
  labs: readonly { id: string; name: string }[];
  onAdded: () => void;
}

/** The materials of a complex that are in sight. */
export function PreparationsPanel({ complex, labs, onAdded }: PreparationsPanelProps) {
  const [isAdding, setIsAdding] = useState(false);
  const { preparations } = complex;
  const known = new Set(complex.cautions.map(({ id, detail }) => `${id} ${detail}`));
  const mayAdd = complex.may.addSpectrum && labs.length > 0;
  return (
    <Panel
      title="Preparations"
      aside={
        mayAdd && (
          <Button size="small" onClick={() => setIsAdding(true)}>
            Add a preparation
          </Button>
        )
      }
    >
      {preparations.length === 0 && (
        <p className="text-ink-soft">None is on record. A preparation is the material one lab made.</p>
      )}
      <ul className="flex flex-col divide-y divide-faint">
        {preparations.map((preparation) => (
          <li key={preparation.id} className="py-2 first:pt-0 last:pb-0">
            <Preparation preparation={preparation} known={known} />
          </li>
        ))}
      </ul>
      {isAdding && (
        <PreparationDialog {...{ accession: complex.accession, labs, onAdded }} onClose={() => setIsAdding(false)} />
      )}
    </Panel>
  );
}

/** A preparation with the cautions that its counter-ions and solvates add to those of the complex. */
function Preparation({ preparation, known }: { preparation: PreparationRecord; known: ReadonlySet<string> }) {
  const added = preparation.cautions.filter(({ id, detail }) => !known.has(`${id} ${detail}`));
  const { label, lab, formula, molarMass, form, preparedOn, storage, atmosphere, notes, visibility } = preparation;
  const facts = [
    form,
    preparedOn && `made ${preparedOn}`,
    storage && `stored ${storage}`,
    atmosphere && `under ${atmosphere}`,
    visibility === 'lab' && `seen by ${lab.name} only`,
  ].filter(Boolean);
  return (
    <>
      <p className="flex flex-wrap items-baseline gap-x-3">
        <span className="num font-medium">{label}</span>
        {formula && <Formula formula={formula} />}
        {molarMass !== null && (
          <span className="text-xs">
            <Quantity value={molarMass} unit="g mol-1" figures={5} />
          </span>
        )}
        <span className="text-xs text-ink-soft">{lab.name}</span>
      </p>
      {facts.length > 0 && <p className="text-xs text-ink-soft">{facts.join(' · ')}</p>}
      {added.map(({ id, detail }) => (
        <p key={`${id} ${detail}`} className="mt-1 flex gap-1.5 text-xs text-alert">
          <span aria-hidden="true">▲</span>
          {detail}
        </p>
      ))}
      {notes && <p className="text-xs whitespace-pre-line text-ink-soft">{notes}</p>}
    </>
  );
}
