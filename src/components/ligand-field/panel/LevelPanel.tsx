import { useState } from 'react';
import type { LigandReading } from '#src/chem/formula/index.ts';
import { DCount } from '#src/components/notation/index.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import { applicabilityOf } from './applicability.ts';
import { CentreLevels } from './CentreLevels.tsx';
import { ChargeTransferTable } from './ChargeTransferTable.tsx';
import type { BandSource } from './observed-bands.ts';

export interface LevelPanelProps {
  complex: ComplexRecord;
  ligands: readonly LigandReading[];
  lists: readonly BandSource[];
  /** Whether the reader may save a fit. */
  maySave: boolean;
}

/** The level diagram of a complex, centre by centre, and what charge transfer is to be expected. */
export function LevelPanel({ complex, ligands, lists, maySave }: LevelPanelProps) {
  const [ordinal, setOrdinal] = useState(0);
  const centre = complex.centres[ordinal];
  if (!centre) return null;
  const several = complex.centres.length > 1;
  const single = several ? null : complex.donorSetGroup;
  const found = applicabilityOf(centre, single);
  const tabs = several && (
    <Segmented
      label="Centre"
      options={complex.centres.map(({ element }, i) => ({ value: String(i), label: `${element} ${i + 1}` }))}
      value={String(ordinal)}
      onChange={(next) => setOrdinal(Number(next))}
    />
  );
  const aside = found.kind === 'cubic' && (
    <>
      {centre.element}, <DCount count={found.n} />, {found.geometry}
    </>
  );
  return (
    <>
      <Panel title="Level diagram" controls={tabs} aside={aside}>
        {found.kind === 'none' ? (
          <p className="max-w-prose text-ink-soft">{found.sentence}</p>
        ) : (
          <CentreLevels key={ordinal} {...{ complex, ordinal, ligands, lists, found, maySave }} />
        )}
      </Panel>
      {!several && <ChargeTransferTable accession={complex.accession} centre={centre} ligands={ligands} />}
    </>
  );
}
