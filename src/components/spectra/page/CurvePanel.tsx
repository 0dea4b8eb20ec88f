import { useMemo, useState } from 'react';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';
import { PlotControls } from '../plot/PlotControls.tsx';
import { type PlotBand, SpectrumPlot } from '../plot/SpectrumPlot.tsx';
import type { XUnit, YUnit } from '../plot/units.ts';
import { rangeText } from '../words.ts';
import { type FetchedCurve, quantitiesOf } from './curves.ts';
import { useAbsorbance } from './useSpectrumPage.ts';

interface CurvePanelProps {
  spectrum: SpectrumRecord;
  curve: FetchedCurve | null;
  bands: readonly (PlotBand & { quantity: string })[];
  onPick: ((wavenumber: number) => void) | undefined;
}

/** The curve in the units a person chooses. */
export function CurvePanel({ spectrum, curve, bands, onPick }: CurvePanelProps) {
  const [xUnit, setXUnit] = useState<XUnit>('nm');
  const [chosenY, setYUnit] = useState<YUnit | null>(null);
  const own = useMemo(() => (curve ? quantitiesOf([curve]) : []), [curve]);
  // Absorbance is what was measured; it can be had back wherever ε was made from it.
  const mayGoBack = curve?.quantity === 'epsilon' && spectrum.concentration !== null && spectrum.pathLength !== null;
  const quantities = useMemo((): YUnit[] => (mayGoBack ? [...own, 'absorbance'] : own), [own, mayGoBack]);
  const yUnit = chosenY && quantities.includes(chosenY) ? chosenY : (quantities[0] ?? 'epsilon');
  const absorbance = useAbsorbance(spectrum.id, yUnit === 'absorbance' && curve?.quantity === 'epsilon');
  const shown = yUnit === 'absorbance' && curve?.quantity === 'epsilon' ? (absorbance.data ?? null) : curve;
  const { id, title } = spectrum;
  const series = useMemo(() => (shown ? [{ id, label: title, x: shown.x, y: shown.y }] : []), [shown, id, title]);
  const quantity = yUnit === 'log-epsilon' ? 'epsilon' : yUnit;
  const marked = useMemo(() => bands.filter((band) => band.quantity === quantity), [bands, quantity]);
  return (
    <Panel
      title="Curve"
      controls={<PlotControls {...{ xUnit, yUnit }} onXUnit={setXUnit} onYUnit={setYUnit} yUnits={quantities} />}
      aside={`${spectrum.points} points · ${rangeText(spectrum)}`}
    >
      <Problem problem={absorbance.error} />
      <SpectrumPlot
        series={series}
        bands={marked}
        xUnit={xUnit}
        yUnit={yUnit}
        height={340}
        label={title}
        {...(onPick ? { onPick } : {})}
      />
    </Panel>
  );
}
