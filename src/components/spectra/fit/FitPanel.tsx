import { Redo2, Undo2 } from 'lucide-react';
import type { FitState, FitStep } from '#src/chem/spectra/fit/fit-steps.ts';
import { Quantity } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { Button } from '#src/components/ui/Button.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { Progress } from '#src/components/ui/Progress.tsx';
import { Notice, StatusLine } from '#src/components/ui/StatusLine.tsx';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';
import { NumberInput } from '../bands/NumberInput.tsx';
import type { BandEditing } from '../bands/useBandEditor.ts';
import type { FetchedCurve } from '../page/curves.ts';
import type { PlotBand } from '../plot/types.ts';
import { HEIGHTS } from '../words.ts';
import { ComparedFits } from './ComparedFits.tsx';
import { ComponentTable } from './ComponentTable.tsx';
import { FitPlot } from './FitPlot.tsx';
import { FitSteps } from './FitSteps.tsx';
import { FitTreatment } from './FitTreatment.tsx';
import { takeOver } from './take-over.ts';
import { type Fitting, useFit } from './useFit.ts';

interface FitPanelProps {
  spectrum: SpectrumRecord;
  curve: FetchedCurve;
  editing: BandEditing;
  /** Bands of the list, to be marked over the curve. */
  bands: readonly PlotBand[];
  /** The bands were taken over, or the fit is left as it is. */
  onTaken: () => void;
  onClose: () => void;
}

const nothing = {};

/** Bands fitted to the curve: treatment, components to drag and lock, residual, and the way into the band list. */
export function FitPanel({ spectrum, curve, editing, bands, onTaken, onClose }: FitPanelProps) {
  const fitting = useFit(spectrum, curve);
  const { state, work, make } = fitting;
  const { quantity } = editing;
  const whole = { from: curve.x[0] ?? 0, to: curve.x.at(-1) ?? 1 };
  const hasComponents = state.components.length > 0;
  const isFitted = state.rms !== null;
  const take = () => {
    if (!quantity) return;
    const taken = takeOver(editing.list, state, quantity, () => crypto.randomUUID());
    editing.takeFitted(taken.list, fitting.history(taken.components));
    onTaken();
  };
  const add = () => {
    const { x, y } = fitting.treated;
    const middle = Math.floor(x.length / 2);
    make({
      operation: 'add',
      parameters: {
        wavenumber: Math.round(x[middle]!),
        height: Number((y[middle] || 1).toPrecision(3)),
        fwhm: Math.round((x[x.length - 1]! - x[0]!) / 8),
      },
    });
  };
  return (
    <Panel title="Fit" aside={<Summary state={state} symbol={quantity ? HEIGHTS[quantity]! : ''} />}>
      <div className="flex flex-col gap-4">
        {fitting.formerSteps && fitting.formerSteps.length > 0 && <OtherCurve fitting={fitting} />}
        {work.entries.length === 0 && spectrum.fit && <OnRecord fitting={fitting} fit={spectrum.fit} curve={curve} />}
        <FitPlot fitting={fitting} curve={curve} yUnit={curve.quantity} title={spectrum.title} bands={bands} />
        <div className="flex flex-wrap items-center gap-2">
          <Button size="small" kind="primary" onClick={() => make({ operation: 'find', parameters: nothing })}>
            Find and fit bands
          </Button>
          <Button
            size="small"
            disabled={!hasComponents}
            onClick={() => make({ operation: 'refine', parameters: nothing })}
          >
            Fit from these components
          </Button>
          <Button size="small" onClick={() => make({ operation: 'pick', parameters: nothing })}>
            Pick by derivatives
          </Button>
          <Button size="small" onClick={add}>
            Add a component
          </Button>
          <StatusLine kind="busy">{said(fitting)}</StatusLine>
          <span className="ml-auto inline-flex gap-2">
            <Button size="small" disabled={work.done === 0} onClick={fitting.undo}>
              <Undo2 aria-hidden="true" size={14} />
              Undo
            </Button>
            <Button size="small" disabled={work.done === work.entries.length} onClick={fitting.redo}>
              <Redo2 aria-hidden="true" size={14} />
              Redo
            </Button>
          </span>
        </div>
        {fitting.isSlow && <Progress label="Fitting" value={null} onCancel={fitting.cancel} />}
        {fitting.problem && (
          <div role="alert">
            <Notice title="This step was not made.">{fitting.problem.message}</Notice>
          </div>
        )}
        {hasComponents && (
          <ComponentTable
            fitting={fitting}
            symbol={quantity ? HEIGHTS[quantity]! : 'height'}
            isEpsilon={quantity === 'epsilon'}
            bandwidth={spectrum.bandwidth}
          />
        )}
        <ComparedFits
          compared={state.compared}
          chosen={{ count: state.components.length, edge: state.edge !== null }}
        />
        <h3 className="-mb-2 text-sm font-semibold">How it is fitted</h3>
        <FitTreatment fitting={fitting} whole={whole} />
        <Instrument fitting={fitting} spectrum={spectrum} isEpsilon={quantity === 'epsilon'} />
        <FitSteps work={work} />
        <Problem problem={editing.problem} />
        <div className="flex flex-wrap items-center justify-end gap-2 border-t border-faint pt-3">
          {hasComponents && !isFitted && (
            <span className="mr-auto text-xs text-ink-soft">
              Changed since the last fit: fit again to take it over.
            </span>
          )}
          {work.entries.length > 0 && (
            <Button kind="quiet" onClick={fitting.restart}>
              Start anew
            </Button>
          )}
          <Button onClick={onClose}>Close</Button>
          <Button kind="primary" disabled={!hasComponents || !isFitted || !quantity || fitting.isBusy} onClick={take}>
            Take over as bands
          </Button>
        </div>
      </div>
    </Panel>
  );
}

function said({ isBusy, isSlow, state }: Fitting): string {
  if (isBusy) return isSlow ? '' : 'Fitting';
  if (state.converged === false) return 'The fit did not come to rest: look at it, and fit again from here.';
  return '';
}

function Summary({ state, symbol }: { state: FitState; symbol: string }) {
  const { components, rms, edge, settings } = state;
  if (components.length === 0) return null;
  const shape = `${settings.shape[0]!.toUpperCase()}${settings.shape.slice(1)}`;
  return (
    <>
      {components.length} {shape}
      {components.length > 1 && settings.shape !== 'voigt' ? 's' : ''}
      {edge && ', edge'}
      {rms !== null && (
        <>
          , rms <Quantity value={rms} figures={2} /> {symbol && <>in {symbol}</>}
        </>
      )}
    </>
  );
}

function Instrument({
  fitting,
  spectrum,
  isEpsilon,
}: {
  fitting: Fitting;
  spectrum: SpectrumRecord;
  isEpsilon: boolean;
}) {
  const bandwidth =
    spectrum.bandwidth === null ? 'no bandwidth is on record' : `bandwidth ${formatNumber(spectrum.bandwidth)} nm`;
  return (
    <div className="grid items-start gap-3 md:grid-cols-2">
      <div className="flex flex-col gap-1">
        <NumberInput
          label="Wavelength check, standard uncertainty / nm"
          value={fitting.wavelengthCheck}
          isOptional
          check={(value) => (value >= 0 && value <= 100 ? null : 'From 0 to 100')}
          onCommit={(wavelengthCheck) => fitting.tell({ wavelengthCheck })}
        />
        <p className="text-xs text-ink-soft">
          Errors of positions (k = 1) combine the fit, this check and a tenth of the bandwidth; {bandwidth}.
        </p>
      </div>
      {isEpsilon && (
        <div className="flex flex-col gap-1">
          <NumberInput
            label="Refractive index of the medium"
            value={fitting.refractiveIndex}
            check={(value) => (value >= 1 && value <= 5 ? null : 'From 1 to 5')}
            onCommit={(refractiveIndex) => refractiveIndex !== null && fitting.tell({ refractiveIndex })}
          />
          <p className="text-xs text-ink-soft">
            It divides |<i>μ</i>|² alone; <i>f</i> is for an index of 1. Other corrections for the local field differ by
            some 10 to 30 %.
          </p>
        </div>
      )}
    </div>
  );
}

/** The steps of a fit made before the curve became another. */
function OtherCurve({ fitting }: { fitting: Fitting }) {
  const { formerSteps, wavelengthCheck } = fitting;
  return (
    <Notice title="The curve is another one now.">
      Its conditions changed since your {formerSteps!.length} steps were made.{' '}
      <span className="mt-2.5 flex flex-wrap gap-2">
        <Button size="small" onClick={() => fitting.replay({ steps: formerSteps!, wavelengthCheck })}>
          Make the same steps on it
        </Button>
        <Button size="small" onClick={fitting.restart}>
          Start anew
        </Button>
      </span>
    </Notice>
  );
}

function OnRecord({
  fitting,
  fit,
  curve,
}: {
  fitting: Fitting;
  fit: NonNullable<SpectrumRecord['fit']>;
  curve: FetchedCurve;
}) {
  const isSame = fit.points === curve.x.length && fit.quantity === curve.quantity;
  return (
    <Notice tone="plain" title="The fit on record">
      has {fit.steps.length} {fit.steps.length === 1 ? 'step' : 'steps'} and {fit.components.length}{' '}
      {fit.components.length === 1 ? 'band' : 'bands'}.{' '}
      {isSame ? 'Made again, they give the same numbers.' : 'It was made on another curve: the numbers will differ.'}
      <span className="mt-2.5 flex">
        <Button
          size="small"
          onClick={() => fitting.replay({ steps: fit.steps as FitStep[], wavelengthCheck: fit.wavelengthCheck })}
        >
          Make these steps again
        </Button>
      </span>
    </Notice>
  );
}
