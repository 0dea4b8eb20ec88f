import { useMemo } from 'react';
import { type ChargeTransfer, chargeTransfer } from '#src/chem/charge-transfer/index.ts';
import { DomainError } from '#src/chem/errors.ts';
import type { LigandReading } from '#src/chem/formula/index.ts';
import { Panel } from '#src/components/ui/Panel.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import { ChargeTransferFacts } from '../ChargeTransferFacts.tsx';

type Centre = ComplexRecord['centres'][number];

/** Charge transfer to be expected of the one centre of a complex, from its ligands. */
export function ChargeTransferTable({
  accession,
  centre,
  ligands,
}: {
  accession: string;
  centre: Centre;
  ligands: readonly LigandReading[];
}) {
  const told = useMemo(() => expected(centre, ligands), [centre, ligands]);
  if (!told) return null;
  return (
    <Panel
      title="Charge transfer to be expected"
      aside={
        <a className="link no-print" href={`/plan?complex=${accession}`}>
          Plan a measurement
        </a>
      }
    >
      <ChargeTransferFacts told={told} />
    </Panel>
  );
}

/** Null where the ion or a ligand is of no table: there is nothing to say then. */
function expected(
  { element, oxidationState, geometry, spinState }: Centre,
  ligands: readonly LigandReading[],
): ChargeTransfer | null {
  const { value } = oxidationState;
  if (value === null || !Number.isInteger(value) || geometry === null || ligands.length === 0) return null;
  try {
    return chargeTransfer({
      element,
      oxidationState: value,
      geometry,
      ligands: ligands.map(({ abbreviation }) => abbreviation),
      spin: spinState === 'crossover' ? null : spinState,
    });
  } catch (error) {
    if (error instanceof DomainError) return null;
    throw error;
  }
}
