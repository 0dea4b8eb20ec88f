import { type ReactNode, useMemo, useState } from 'react';
import { findGroup } from '#src/chem/symmetry/index.ts';
import { BandTag } from '#src/components/marks/BandTag.tsx';
import { PointGroup, Term, Transition, Unit } from '#src/components/notation/index.tsx';
import { groupDigits } from '#src/components/notation/quantity.ts';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';
import { AllTransitions } from './AllTransitions.tsx';
import { ArgumentList } from './ArgumentList.tsx';
import { firstBand, type PlacedBand, type Row } from './band-matching.ts';
import { ChoiceList } from './ChoiceList.tsx';
import { groupAddress } from './GroupLink.tsx';
import { type Judged, judgedGroups } from './judged-groups.ts';
import { Prose } from './Prose.tsx';
import {
  type CentreTransitions,
  chosenRow,
  classArgument,
  isStrong,
  ownTerms,
  panelArgument,
  partsOfRow,
} from './panel-argument.ts';

interface Props {
  complex: ComplexRecord;
  lists: readonly { spectrum: SpectrumSummary; bands: BandRecord[] }[];
  centre: CentreTransitions;
  index: number;
  controls: ReactNode;
}

/** The argument for one centre, and all its transitions. */
export function CentrePanel({ complex, lists, centre, index, controls }: Props) {
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
  const groups = judgedGroups(centre, complex);
  const [kind, setKind] = useState(groups[0]?.kind ?? null);
  const judged = groups.find((each) => each.kind === kind) ?? groups[0] ?? null;
  const view = judged?.view ?? null;
  const first = firstBand(bands);
  const [chosen, setChosen] = useState<string | null>(null);
  const choice = chosen ?? (first ? `band ${first.band.id}` : `row ${view?.rows[0]?.label}`);
  const band = bands.find((each) => choice === `band ${each.band.id}`) ?? null;
  const row = view && chosenRow(centre, view, band, band ? null : choice.replace(/^row /, ''));
  return (
    <>
      <Panel
        title={band || row ? <Why {...{ centre, judged, band, row, complex }} /> : 'Why bands are weak'}
        controls={controls}
        aside={
          judged && (
            <a href={groupAddress(judged.group)} className="link">
              <PointGroup group={judged.group} /> on the symmetry page
            </a>
          )
        }
      >
        {(row || band) && (
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
            {judged && (
              <Segmented
                label="Judged in"
                showLabel
                options={groups.map((each) => ({
                  value: each.kind,
                  label: (
                    <>
                      <PointGroup group={each.group} className="mr-1.5" /> {each.words}
                    </>
                  ),
                }))}
                value={judged.kind}
                onChange={setKind}
              />
            )}
          </div>
        )}
        <Steps key={`${choice} ${judged?.kind}`} {...{ complex, centre, judged, band, row }} />
        {centre.notes.length > 0 && (
          <ul className="mt-3 text-xs text-ink-soft">
            {centre.notes.map((note) => (
              <li key={note}>
                <Prose text={note} />
              </li>
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

type StepsProps = Pick<Props, 'complex' | 'centre'> & {
  judged: Judged | null;
  band: PlacedBand | null;
  row: Row | null;
};

function partsIn({ centre, judged, band, row }: StepsProps) {
  if (!judged) return [];
  if (row && judged.view) return partsOfRow(centre, judged.view, row, band);
  const own = band && ownTerms(judged.group, band);
  return own ? [own] : [];
}

const skeletonOf = (complex: ComplexRecord, { element, geometry }: CentreTransitions) => ({
  element,
  geometry,
  sites: complex.centres.length === 1 ? complex.isomer.sites : null,
  chelates: complex.isomer.chelates,
});

function Why(props: StepsProps) {
  const { band, judged } = props;
  const [part] = partsIn(props);
  const what = band ? 'this band' : 'this transition';
  if (!part || !judged) return `The strength of ${what}`;
  return `Why ${what} is ${isStrong(judged.group, part, band) ? 'strong' : 'weak'}`;
}

function Steps(props: StepsProps) {
  const { complex, centre, judged, band, row } = props;
  const parts = partsIn(props);
  const [at, setAt] = useState(0);
  const part = parts[at];
  if (!judged || !part)
    return band ? (
      <ArgumentList
        lines={classArgument(band, {
          ...centre,
          centrosymmetric: judged ? findGroup(judged.group)!.centrosymmetric : true,
        })}
      />
    ) : null;
  const lines = panelArgument(judged, part, band, skeletonOf(complex, centre));
  return (
    <>
      {row && parts.length > 1 && (
        <div className="mb-2.5 flex flex-wrap items-center gap-x-3 gap-y-1 text-xs">
          <span className="text-ink-soft">
            In <PointGroup group={judged.group} />, <Term term={row.label} /> falls apart:
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
