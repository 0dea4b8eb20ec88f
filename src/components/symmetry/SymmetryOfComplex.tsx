import { lazy, Suspense } from 'react';
import { Panel } from '#src/components/ui/Panel.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';
import { WhenNear } from './WhenNear.tsx';

// Character tables are no small code, and many readers never scroll down to them.
const SymmetryPanel = lazy(() => import('./SymmetryPanel.tsx').then((module) => ({ default: module.SymmetryPanel })));

const waiting = (
  <Panel title="Why bands are weak">
    <p className="min-h-64 text-ink-soft">The transitions are being worked out.</p>
  </Panel>
);

/** The symmetry panel of the page of a complex. */
export function SymmetryOfComplex(props: {
  complex: ComplexRecord;
  lists: readonly { spectrum: SpectrumSummary; bands: BandRecord[] }[];
}) {
  return (
    <WhenNear waiting={waiting}>
      {() => (
        <Suspense fallback={waiting}>
          <SymmetryPanel {...props} />
        </Suspense>
      )}
    </WhenNear>
  );
}
