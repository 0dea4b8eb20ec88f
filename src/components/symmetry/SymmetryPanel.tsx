import { useState } from 'react';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';
import { CentrePanel } from './CentrePanel.tsx';
import type { CentreTransitions } from './panel-argument.ts';
import { type SpinChoice, useTransitions } from './useTransitions.ts';

interface Props {
  complex: ComplexRecord;
  lists: readonly { spectrum: SpectrumSummary; bands: BandRecord[] }[];
}

/** Whether the ground term is open only because the spin state is. */
const hangsOnSpin = ({ ground, parent, notes }: CentreTransitions): boolean =>
  ground === null && parent !== null && notes.some((note) => /spin state|two spin/.test(note));

/** Why a band is weak or strong, step by step, and all transitions that there are beside it. */
export function SymmetryPanel({ complex, lists }: Props) {
  const [spin, setSpin] = useState<SpinChoice | null>(null);
  const [at, setAt] = useState(0);
  const { data, error, refetch } = useTransitions(complex.accession, spin, complex.updatedAt);
  const centre = data?.centres[Math.min(at, data.centres.length - 1)];
  if (error) {
    return (
      <Panel title="Why bands are weak">
        <Problem problem={error} onRetry={() => void refetch()} />
      </Panel>
    );
  }
  if (!data || !centre) {
    return (
      <Panel title="Why bands are weak">
        <p className="text-ink-soft">The transitions are being worked out.</p>
      </Panel>
    );
  }
  const controls = (
    <>
      {data.centres.length > 1 && (
        <Segmented
          label="Centre"
          options={data.centres.map(({ element }, i) => ({ value: String(i), label: `${element} ${i + 1}` }))}
          value={String(at)}
          onChange={(next) => setAt(Number(next))}
        />
      )}
      {(spin !== null || hangsOnSpin(centre)) && (
        <Segmented
          label="Spin state"
          options={[
            { value: 'low', label: 'low spin' },
            { value: 'high', label: 'high spin' },
          ]}
          value={spin}
          onChange={setSpin}
        />
      )}
    </>
  );
  return <CentrePanel key={`${at} ${spin}`} {...{ complex, lists, centre, controls, index: at }} />;
}
