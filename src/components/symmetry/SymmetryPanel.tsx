import { useMemo, useState } from 'react';
import { BandTag } from '#src/components/marks/BandTag.tsx';
import { PointGroup, Term, Transition, Unit } from '#src/components/notation/index.tsx';
import { groupDigits } from '#src/components/notation/quantity.ts';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';
import { AllTransitions } from './AllTransitions.tsx';
import { ArgumentList } from './ArgumentList.tsx';
import { firstBand, type PlacedBand } from './band-matching.ts';
import { ChoiceList } from './ChoiceList.tsx';
import {
  type CentreTransitions,
  chosenRow,
  classArgument,
  isStrong,
  ownTerms,
  panelArgument,
  partsOfRow,
} from './panel-argument.ts';
import { addressOf } from './symmetry-address.ts';
import { distinctViews } from './transition-rows.ts';
import { type SpinChoice, useTransitions } from './useTransitions.ts';

interface Props {
  complex: ComplexRecord;
  lists: readonly { spectrum: SpectrumSummary; bands: BandRecord[] }[];
}

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
      {(spin !== null || (centre.ground === null && (centre.dCount ?? 0) > 0 && (centre.dCount ?? 10) < 10)) && (
        <Segmented
          label="Spin state"
          showLabel={false}
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
  return <OfCentre key={`${at} ${spin}`} {...{ complex, lists, centre, controls, index: at }} />;
}

interface OfCentreProps extends Props {
  centre: CentreTransitions;
  index: number;
  controls: React.ReactNode;
}

function OfCentre({ complex, lists, centre, index, controls }: OfCentreProps) {
  const single = complex.centres.length === 1;
  const bands = useMemo(
    () =>
      lists.flatMap(({ spectrum, bands: own }) =>
        own
          .filter(
            ({ assignment }) => assignment.class !== 'unassigned' && (single || (assignment.centre ?? 0) === index),
          )
          .map((band): PlacedBand => ({ band, spectrum })),
      ),
    [lists, single, index],
  );
  const views = distinctViews(centre);
  const [kind, setKind] = useState(views[0]?.view.kind ?? null);
  const view = (views.find((each) => each.view.kind === kind) ?? views[0])?.view ?? null;
  const first = firstBand(bands);
  const [chosen, setChosen] = useState<string | null>(null);
  const choice = chosen ?? (first ? `band ${first.band.id}` : `row ${view?.rows[0]?.label}`);
  const band = bands.find((each) => choice === `band ${each.band.id}`) ?? null;
  const row = view && chosenRow(centre, view, band, band ? null : choice.replace(/^row /, ''));
  return (
    <>
      <Panel
        title={band || row ? <Why {...{ centre, view, band, row, complex }} /> : 'Why bands are weak'}
        controls={controls}
        aside={
          view && (
            <a href={`/symmetry${addressOf({ group: view.group })}`} className="link">
              Group <PointGroup group={view.group} /> on the symmetry page
            </a>
          )
        }
      >
        {(view || band) && (
          <div className="mb-3 grid items-end gap-x-4 gap-y-2.5 sm:grid-cols-[minmax(0,22rem)_auto]">
            <ChoiceList
              label="Band or transition"
              value={choice}
              onChange={setChosen}
              groups={[
                ...(bands.length > 0
                  ? [{ title: 'Assigned bands', choices: bands.map((each) => bandChoice(each, lists.length > 1)) }]
                  : []),
                ...(view && centre.ground
                  ? [
                      {
                        title: 'All transitions',
                        choices: view.rows.map(({ label }) => ({
                          value: `row ${label}`,
                          label: <Transition from={centre.ground!.label} to={label} />,
                        })),
                      },
                    ]
                  : []),
              ]}
            />
            {view && (
              <Segmented
                label="Judged in"
                showLabel
                options={views.map((each) => ({
                  value: each.view.kind,
                  label: (
                    <>
                      <PointGroup group={each.view.group} className="mr-1.5" /> {each.words}
                    </>
                  ),
                }))}
                value={view.kind}
                onChange={setKind}
              />
            )}
          </div>
        )}
        <Steps key={`${choice} ${view?.kind}`} {...{ complex, centre, view, band, row }} />
        {centre.notes.length > 0 && (
          <ul className="mt-3 text-xs text-ink-soft">
            {centre.notes.map((note) => (
              <li key={note}>{note}</li>
            ))}
          </ul>
        )}
      </Panel>
      {view && (
        <Panel title="All transitions" aside={`${view.rows.length} excited terms`}>
          <AllTransitions
            accession={complex.accession}
            table={centre}
            view={view}
            bands={bands}
            onChoose={(label) => setChosen(`row ${label}`)}
          />
        </Panel>
      )}
    </>
  );
}

const bandChoice = ({ band, spectrum }: PlacedBand, several: boolean) => ({
  value: `band ${band.id}`,
  label: (
    <span className="inline-flex items-center gap-2.5 whitespace-nowrap">
      <BandTag bandClass={band.assignment.class} />
      <span>
        <span className="num">{groupDigits(String(Math.round(band.wavenumber)))}</span> <Unit unit="cm-1" />
      </span>
      {band.assignment.to && <Transition from={band.assignment.from ?? null} to={band.assignment.to} />}
      {several && <span className="max-w-44 truncate text-xs text-ink-soft">{spectrum.title}</span>}
    </span>
  ),
});

type StepsProps = Pick<OfCentreProps, 'complex' | 'centre'> & {
  view: CentreTransitions['views'][number] | null;
  band: PlacedBand | null;
  row: CentreTransitions['views'][number]['rows'][number] | null;
};

function partsIn({ centre, view, band, row }: StepsProps) {
  if (!view) return [];
  if (row) return partsOfRow(centre, view, row, band);
  const own = band && ownTerms(view, band);
  return own ? [own] : [];
}

const skeletonOf = (complex: ComplexRecord, { element, geometry }: CentreTransitions) => ({
  element,
  geometry,
  sites: complex.centres.length === 1 ? complex.isomer.sites : null,
  chelates: complex.isomer.chelates,
});

function Why(props: StepsProps) {
  const { band, view } = props;
  const [part] = partsIn(props);
  const what = band ? 'this band' : 'this transition';
  if (!part || !view) return `The strength of ${what}`;
  return `Why ${what} is ${isStrong(view, part) ? 'strong' : 'weak'}`;
}

function Steps(props: StepsProps) {
  const { complex, centre, view, band } = props;
  const parts = partsIn(props);
  const [at, setAt] = useState(0);
  const part = parts[at];
  if (!view || !part) return band ? <ArgumentList lines={classArgument(band, centre)} /> : null;
  const lines = panelArgument(view, part, band, skeletonOf(complex, centre));
  return (
    <>
      {parts.length > 1 && (
        <div className="mb-2.5 flex flex-wrap items-center gap-x-3 gap-y-1 text-xs">
          <span className="text-ink-soft">
            In <PointGroup group={view.group} /> <Term term={props.row!.label} /> falls apart:
          </span>
          <Segmented
            label="Part"
            options={parts.map(({ from, to }, i) => ({ value: String(i), label: <Transition {...{ from, to }} /> }))}
            value={String(at)}
            onChange={(next) => setAt(Number(next))}
          />
        </div>
      )}
      <ArgumentList lines={lines} />
    </>
  );
}
