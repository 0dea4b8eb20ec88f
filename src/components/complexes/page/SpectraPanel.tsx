import { useMemo, useState } from 'react';
import { quantitiesOf } from '#src/components/spectra/page/curves.ts';
import { PlotControls } from '#src/components/spectra/plot/PlotControls.tsx';
import { type PlotBand, type PlotSeries, SpectrumPlot } from '#src/components/spectra/plot/SpectrumPlot.tsx';
import type { XUnit, YUnit } from '#src/components/spectra/plot/units.ts';
import { ButtonLink } from '#src/components/ui/Button.tsx';
import { EmptyState } from '#src/components/ui/EmptyState.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';
import { overlayBands, overlaySeries, shownAtFirst } from './overlay.ts';
import { SpectraLegend } from './SpectraLegend.tsx';
import { useCurves } from './useComplexPage.ts';

interface SpectraPanelProps {
  spectra: SpectrumSummary[];
  total: number;
  bandLists: readonly { spectrum: SpectrumSummary; bands: BandRecord[] }[];
  /** Where a spectrum is added; null for who may not. */
  addAt: string | null;
}

/** All spectra in sight over one axis. */
export function SpectraPanel({ spectra, total, bandLists, addAt }: SpectraPanelProps) {
  const [xUnit, setXUnit] = useState<XUnit>('cm-1');
  const [chosenY, setYUnit] = useState<YUnit | null>(null);
  const [shown, setShown] = useState(() => shownAtFirst(spectra));
  const curves = useCurves(spectra, shown);
  const visible = useMemo(() => curves.filter(({ spectrum }) => shown.has(spectrum.id)), [curves, shown]);
  const quantities = useMemo(() => quantitiesOf(visible.flatMap(({ curve }) => curve ?? [])), [visible]);
  const yUnit = chosenY && quantities.includes(chosenY) ? chosenY : (quantities[0] ?? 'epsilon');
  const series: PlotSeries[] = useMemo(() => overlaySeries(curves, shown, yUnit), [curves, shown, yUnit]);
  const bands: PlotBand[] = useMemo(() => overlayBands(bandLists, series, yUnit), [bandLists, series, yUnit]);
  const failure = visible.find((one) => one.failure)?.failure;
  const labs = new Set(spectra.map(({ lab }) => lab.id)).size;

  const toggle = (id: string) =>
    setShown((now) => {
      const next = new Set(now);
      if (!next.delete(id)) next.add(id);
      return next;
    });

  if (spectra.length === 0)
    return (
      <Panel title="Spectra">
        <EmptyState
          title="No spectrum yet"
          action={
            addAt && (
              <ButtonLink kind="primary" href={addAt}>
                Add a spectrum
              </ButtonLink>
            )
          }
        >
          A file as the instrument wrote it is enough: JCAMP-DX, or text in columns.
        </EmptyState>
      </Panel>
    );
  return (
    <Panel
      title="Spectra"
      controls={<PlotControls {...{ xUnit, yUnit }} onXUnit={setXUnit} onYUnit={setYUnit} yUnits={quantities} />}
      aside={`${spectra.length === 1 ? '1 spectrum' : `${total} spectra`} · ${labs === 1 ? '1 lab' : `${labs} labs`}`}
    >
      <Problem problem={failure} />
      <SpectrumPlot series={series} bands={bands} xUnit={xUnit} yUnit={yUnit} height={320} label="Spectra" />
      <SpectraLegend {...{ curves, shown, yUnit, onToggle: toggle }} />
      {total > spectra.length && (
        <p className="mt-2 text-xs text-ink-soft">
          The latest {spectra.length} of {total} are drawn.
        </p>
      )}
    </Panel>
  );
}
