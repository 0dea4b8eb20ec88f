import { useMemo, useState } from 'react';
import { componentValues, fittedValues, foundationValues } from '#src/chem/spectra/fit/components.ts';
import type { FitComponent } from '#src/chem/spectra/fit/fit-steps.ts';
import { type PlotBand, type PlotSeries, SpectrumPlot } from '../plot/SpectrumPlot.tsx';
import type { YUnit } from '../plot/units.ts';
import type { Parts } from './drag.ts';
import { FitHandles } from './FitHandles.tsx';
import { ResidualPlot } from './ResidualPlot.tsx';
import type { Fitting } from './useFit.ts';

interface FitPlotProps {
  fitting: Fitting;
  curve: { x: readonly number[]; y: readonly (number | null)[] };
  yUnit: YUnit;
  title: string;
  /** Bands as they stand in the list, to be marked. */
  bands: readonly PlotBand[];
}

/** Points of which a component is drawn. */
const DRAWN_POINTS = 400;
const DASH = [4, 3];

/** The curve, its components and their sum on the wavenumber axis, and the residual under it. */
export function FitPlot({ fitting, curve, yUnit, title, bands }: FitPlotProps) {
  const { state, treated, make } = fitting;
  const [held, setHeld] = useState<{ component: number; parts: Parts } | null>(null);
  const shown = useMemo(
    () => ({
      ...state,
      components: state.components.map(
        (one, i): FitComponent => (held?.component === i ? { ...one, ...held.parts } : one),
      ),
    }),
    [state, held],
  );
  const [first, last] = [curve.x[0] ?? 0, curve.x.at(-1) ?? 1];
  const isTreated = state.smoothing > 0 || state.baseline !== null;

  const series = useMemo((): PlotSeries[] => {
    const [a, b] = [treated.x[0] ?? first, treated.x[treated.x.length - 1] ?? last];
    const x = Array.from({ length: DRAWN_POINTS }, (_, i) => a + ((b - a) * i) / (DRAWN_POINTS - 1));
    const { components, settings, edge, constant } = shown;
    const measured = { id: 'curve', label: title, x: curve.x, y: curve.y, colour: 'var(--color-ink)' };
    const asFitted = { id: 'treated', label: 'as fitted', x: [...treated.x], y: gaps(treated.y) };
    const under = { id: 'under', label: edge ? 'edge' : 'constant', x, y: [...foundationValues(shown, x)] };
    const sum = { id: 'sum', label: 'sum', x, y: [...fittedValues(shown, x)], colour: 'var(--color-band-lmct)' };
    return [
      isTreated ? { ...measured, colour: 'var(--color-glass)' } : measured,
      ...(isTreated ? [{ ...asFitted, colour: 'var(--color-ink)' }] : []),
      ...(components.length > 0 ? [sum] : []),
      ...components.map((one, i) => ({
        id: `component ${i}`,
        label: `component ${i + 1}`,
        x,
        y: [...componentValues(settings.shape, one, x)],
        colour: 'var(--color-band-dd)',
        dash: DASH,
      })),
      ...(edge || constant !== null ? [{ ...under, colour: 'var(--color-band-intraligand)', dash: [2, 2.5] }] : []),
    ];
  }, [shown, treated, curve, title, isTreated, first, last]);

  const residual = useMemo(() => {
    if (shown.components.length === 0) return null;
    const values = fittedValues(shown, treated.x);
    return treated.y.map((value, i) => value - values[i]!);
  }, [shown, treated]);

  return (
    <SpectrumPlot
      series={series}
      bands={bands}
      xUnit="cm-1"
      yUnit={yUnit}
      height={340}
      label={`${title}, fitted`}
      overlay={(area) => (
        <FitHandles
          area={area}
          components={shown.components}
          range={{ from: state.range.from ?? first, to: state.range.to ?? last }}
          onPreview={(component, parts) => setHeld({ component, parts })}
          onSet={(component, parts, byKey) => {
            setHeld(null);
            if (Object.keys(parts).length > 0) make({ operation: 'set', parameters: { component, ...parts } }, byKey);
          }}
          onRange={({ from, to }, byKey) =>
            make(
              {
                operation: 'range',
                parameters: { from: from <= first ? null : from, to: to >= last ? null : to },
              },
              byKey,
            )
          }
        />
      )}
      below={(area) => residual && <ResidualPlot area={area} x={treated.x} residual={residual} rms={state.rms} />}
    />
  );
}

const gaps = (y: Float64Array) => Array.from(y, (value) => (Number.isFinite(value) ? value : null));
