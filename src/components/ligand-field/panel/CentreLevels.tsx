import { useMemo, useReducer, useState } from 'react';
import { freeIonRacah } from '#src/chem/ligand-field/index.ts';
import { Unit } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { Button } from '#src/components/ui/Button.tsx';
import { Checkbox } from '#src/components/ui/controls.tsx';
import type { LevelFitRecord } from '#src/contracts/level-fits.ts';
import { LevelDiagram } from '../drawing/LevelDiagram.tsx';
import type { Applicability } from './applicability.ts';
import { BandChoice } from './BandChoice.tsx';
import { FitFacts } from './FitFacts.tsx';
import { FitPart } from './FitPart.tsx';
import { firstSliders } from './first-sliders.ts';
import type { LevelPanelProps } from './LevelPanel.tsx';
import { LevelsTable } from './LevelsTable.tsx';
import { byTerm, levelRows } from './level-rows.ts';
import { firstChosen, matchBands, sourcesFor } from './observed-bands.ts';
import { SavedFits } from './SavedFits.tsx';
import { SliderField } from './SliderField.tsx';
import { moveSliders, RANGES, type SliderName } from './slider-state.ts';
import { useFit } from './useFit.ts';
import { useLevels } from './useLevels.ts';
import { useSavedFits } from './useSavedFits.ts';

type CentreLevelsProps = Omit<LevelPanelProps, 'maySave'> & {
  maySave: boolean;
  ordinal: number;
  found: Extract<Applicability, { kind: 'cubic' }>;
};

const NAMES: Record<SliderName, { name: string; symbol: string }> = {
  delta: { name: 'Field splitting Δ in cm⁻¹', symbol: 'Δ' },
  B: { name: 'Racah parameter B in cm⁻¹', symbol: 'B' },
  C: { name: 'Racah parameter C in cm⁻¹', symbol: 'C' },
  zeta: { name: 'Spin–orbit parameter ζ in cm⁻¹', symbol: 'ζ' },
};

/** One centre: its diagram with the bands on it, sliders, the fit, the levels, and the fits that were saved. */
export function CentreLevels({ complex, ordinal, ligands, lists, found, maySave }: CentreLevelsProps) {
  const { n, geometry, note } = found;
  const centre = complex.centres[ordinal]!;
  const { element, oxidationState, spinState } = centre;
  const metal = { element, oxidationState: Number.isInteger(oxidationState.value) ? oxidationState.value : null };
  const start = useMemo(
    () => firstSliders(metal, geometry, ligands),
    [metal.element, metal.oxidationState, geometry, ligands],
  );
  const [sliders, move] = useReducer(moveSliders, start);

  const sources = useMemo(() => sourcesFor(lists, ordinal), [lists, ordinal]);
  const [spectrumId, setSpectrumId] = useState<string | null>(null);
  const source = sources.find(({ spectrum }) => spectrum.id === spectrumId) ?? sources[0] ?? null;
  const [picked, setPicked] = useState<{ of: string; ids: string[] } | null>(null);
  const chosenIds = source ? (picked?.of === source.spectrum.id ? picked.ids : firstChosen(source.bands)) : [];
  const bands = source?.bands.filter(({ id }) => chosenIds.includes(id)) ?? [];

  const fitting = useFit({
    n,
    geometry,
    metal,
    spinState,
    bands,
    onCandidate: (candidate) => move({ kind: 'candidate', candidate }),
  });
  const saved = useSavedFits(complex.accession);
  const highest = Math.max(0, ...bands.map(({ wavenumber }) => wavenumber));
  const { at, quick, coupled, window, curves, crossings } = useLevels({ n, geometry, sliders, highest });

  const proposed = (wavenumber: number) =>
    fitting.candidate?.assignments.find((one) => Math.abs(one.wavenumber - wavenumber) < 1e-6)?.to ?? null;
  const observed = bands.map((band) => ({
    band,
    assigned: band.assignment.class === 'd-d' && Boolean(band.assignment.to),
    to: proposed(band.wavenumber) ?? (band.assignment.class === 'd-d' ? (band.assignment.to ?? null) : null),
  }));
  const told = sliders.zeta > 0 && coupled.answer ? coupled.answer : (quick.answer?.levels ?? null);
  const places = told
    ? matchBands(
        byTerm(told.levels),
        observed.map(({ band, to }) => ({ wavenumber: band.wavenumber, to })),
      )
    : [];
  const rows = told
    ? levelRows(
        told.group,
        told.levels,
        observed.map(({ band }, i) => ({ band, level: places[i] ?? null })),
      )
    : [];
  const marks = observed
    .filter(({ to }) => to !== null)
    .map(({ band, assigned, to }) => ({
      key: band.id,
      y: band.wavenumber / sliders.B,
      filled: assigned,
      title: `${Math.round(band.wavenumber)} cm⁻¹, ${assigned ? 'assigned' : 'proposed'} ${to}`,
    }));
  const limits = (name: SliderName) =>
    name === 'B'
      ? { ...RANGES.B, most: Math.max(RANGES.B.most, freeIonRacah(element, metal.oxidationState ?? 0)?.B ?? 0) }
      : RANGES[name];
  const show = ({ result, input }: LevelFitRecord) => {
    move({ kind: 'candidate', candidate: result });
    const named = input.bands.find(({ spectrum }) => spectrum !== undefined)?.spectrum;
    if (!named) return;
    setSpectrumId(named);
    setPicked({ of: named, ids: input.bands.flatMap(({ band }) => (band ? [band] : [])) });
  };

  return (
    <>
      {note && <p className="mb-3 max-w-prose text-xs text-ink-soft">{note}</p>}
      <div className="grid items-start gap-x-6 gap-y-4 xl:grid-cols-[minmax(0,1fr)_320px]">
        <div className="min-w-0">
          <LevelDiagram
            title={`Energy over B against Δ over B of d${n}, ${geometry}; Δ/B is ${at.toFixed(1)}`}
            width={620}
            height={420}
            window={window}
            curves={curves}
            crossings={crossings.map(({ x, from, to }) => ({
              x,
              title: `The ground level changes from ${from} to ${to}`,
            }))}
            at={at}
            marks={marks}
            xLabel={[
              { text: 'Δ', style: 'italic' },
              { text: ' / ', style: 'normal' },
              { text: 'B', style: 'italic' },
            ]}
            yLabel={[
              { text: 'E', style: 'italic' },
              { text: ' / ', style: 'normal' },
              { text: 'B', style: 'italic' },
            ]}
          />
          <p className="text-xs text-ink-soft">
            The line stands at <i>Δ</i>/<i>B</i> = <span className="num">{formatNumber(at, 3)}</span>, <i>C</i>/<i>B</i>{' '}
            = <span className="num">{formatNumber(sliders.C / sliders.B, 3)}</span>. Full lines are of a spin that the
            ground level has here; filled dots are assigned bands, hollow ones those that the fit proposes.
          </p>
          {fitting.candidate && (
            <div className="mt-4">
              <FitFacts fit={fitting.candidate} />
            </div>
          )}
        </div>
        <div className="flex min-w-0 flex-col gap-4">
          <fieldset className="min-w-0">
            <legend className="mb-1 flex w-full text-xs text-ink-soft">
              Parameters,&nbsp;
              <Unit unit="cm-1" />
            </legend>
            <div className="flex flex-col gap-0.5">
              {(Object.keys(NAMES) as SliderName[]).map((name) => (
                <SliderField
                  key={name}
                  name={NAMES[name].name}
                  symbol={<i>{NAMES[name].symbol}</i>}
                  value={sliders[name]}
                  {...limits(name)}
                  onChange={(value) => move({ kind: 'set', name, value })}
                />
              ))}
            </div>
            <div className="mt-1 flex flex-wrap items-center justify-between gap-2">
              <Checkbox
                label={<span className="text-xs">C goes with B</span>}
                checked={sliders.ratioCB !== null}
                onChange={(event) => move({ kind: 'tie', tied: event.currentTarget.checked })}
              />
              <Button kind="quiet" size="small" onClick={() => move({ kind: 'reset', to: start })}>
                Back to the estimate
              </Button>
            </div>
            {sliders.zeta > 0 && (
              <p className="mt-1 text-xs text-ink-soft">
                Spin–orbit coupling is in the table; the curves are drawn without it.
              </p>
            )}
          </fieldset>
          <BandChoice
            sources={sources}
            source={source}
            chosen={chosenIds}
            onSource={setSpectrumId}
            onChosen={(ids) => source && setPicked({ of: source.spectrum.id, ids })}
          />
          <FitPart {...{ fitting, maySave, saved }} centre={ordinal} labOnly={complex.visibility === 'lab'} />
        </div>
      </div>
      {(quick.refusal ?? coupled.refusal) && <p className="mt-2 text-alert">{quick.refusal ?? coupled.refusal}</p>}
      <SavedFits
        fits={(saved.list.data ?? []).filter((fit) => fit.centre === ordinal)}
        onShow={show}
        onWithdraw={(id) => saved.withdraw.mutateAsync(id)}
      />
      <div className="-mx-[18px] mt-4 -mb-4">
        <LevelsTable rows={rows} coupled={sliders.zeta > 0 && coupled.answer !== null} label={`Levels of ${element}`} />
      </div>
    </>
  );
}
