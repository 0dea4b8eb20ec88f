import { Download } from 'lucide-react';
import { Fragment } from 'react';
import { BandTag } from '#src/components/marks/BandTag.tsx';
import { Irrep, PointGroup, Term, Unit } from '#src/components/notation/index.tsx';
import { groupDigits } from '#src/components/notation/quantity.ts';
import { CopyButton } from '#src/components/spectra/bands/CopyButton.tsx';
import { buttonClass } from '#src/components/ui/Button.tsx';
import { saveText } from '#src/components/ui/save-text.ts';
import type { PlacedBand, View } from './band-matching.ts';
import { Prose } from './Prose.tsx';
import type { CentreTransitions } from './panel-argument.ts';
import {
  MECHANISM_WORDS,
  type TransitionRow,
  transitionRows,
  transitionsCsv,
  transitionsText,
} from './transition-rows.ts';

interface Props {
  accession: string;
  table: CentreTransitions;
  view: View;
  bands: readonly PlacedBand[];
  /** Shows the argument of a row. */
  onChoose: (row: string) => void;
}

/** All transitions from the ground term, by excited term and polarisation, with the bands that were observed. */
export function AllTransitions({ accession, table, view, bands, onChoose }: Props) {
  const rows = transitionRows(table, view, bands);
  const parent = table.parent ?? view.group;
  return (
    <div>
      <div className="mb-2 flex flex-wrap items-center gap-x-4 gap-y-1">
        <p className="min-w-0 flex-1 text-xs text-ink-soft">
          In <PointGroup group={view.group} /> (<Prose text={view.setting} />
          ), from{' '}
          {view.ground.map((term, i) => (
            <Fragment key={term}>
              {i > 0 && ', '}
              <Term term={term} />
            </Fragment>
          ))}
          . Excited terms are those of <PointGroup group={parent} />.{' '}
          {/[1-9] on [xyz]|lies in/.test(view.axes) && <Prose text={view.axes} />}
        </p>
        <CopyButton text={transitionsText(table, view, bands)} what="the table" label="Copy" />
        <button
          type="button"
          className={buttonClass('plain', 'small')}
          onClick={() =>
            saveText(`${accession}-transitions.csv`, transitionsCsv(table, bands), 'text/csv;charset=utf-8')
          }
        >
          <Download aria-hidden="true" size={14} />
          CSV
        </button>
      </div>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard */}
      <section aria-label="All transitions" tabIndex={0} className="max-h-[30rem] overflow-auto border border-hairline">
        <table className="table table-compact">
          <thead className="sticky top-0 bg-glaze">
            <tr>
              <th scope="col">
                Excited term in <PointGroup group={parent} />
              </th>
              <th scope="col">
                In <PointGroup group={view.group} />
              </th>
              <th scope="col">Spin</th>
              {(['x', 'y', 'z'] as const).map((d) => (
                <th key={d} scope="col">
                  along <i>{d}</i>
                </th>
              ))}
              <th scope="col">Mechanism</th>
              <th scope="col">
                Expected ε / <Unit unit="dm3 mol-1 cm-1" />
              </th>
              <th scope="col">
                Bands / <Unit unit="cm-1" />
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <Line key={row.key} row={row} onChoose={onChoose} />
            ))}
          </tbody>
        </table>
      </section>
    </div>
  );
}

function Line({ row, onChoose }: { row: TransitionRow; onChoose: (row: string) => void }) {
  const { transition, excited, count, freeIon, leads, parts, bands } = row;
  const { from, to } = transition.expectedEpsilon;
  return (
    <tr>
      {leads && (
        <th scope="rowgroup" rowSpan={parts} className="border-b-faint! align-top! text-sm! font-normal! text-ink!">
          <button
            type="button"
            onClick={() => onChoose(excited)}
            className="link min-h-6"
            aria-label={`Explain ${excited}`}
            title="Show the argument"
          >
            <Term term={excited} />
          </button>
          <span className="ml-1.5 text-xs text-ink-soft">
            {count > 1 && `${count} levels, `}
            {freeIon.map((term, i) => (
              <Fragment key={term}>
                {i > 0 && ', '}
                <Term term={term} />
              </Fragment>
            ))}
          </span>
        </th>
      )}
      <td>
        <Term term={transition.from} /> → <Term term={transition.to} />
      </td>
      <td>{transition.spinAllowed ? 'allowed' : <span className="text-ink-soft">forbidden</span>}</td>
      {(['x', 'y', 'z'] as const).map((d) => (
        <td key={d}>
          {transition.dipole[d] ? (
            <span className="font-medium text-attest">allowed</span>
          ) : transition.vibronic[d].length > 0 ? (
            <span>
              by{' '}
              {transition.vibronic[d].map((irrep, i) => (
                <Fragment key={irrep}>
                  {i > 0 && ', '}
                  <Irrep irrep={irrep} />
                </Fragment>
              ))}
            </span>
          ) : (
            <span className="text-ink-soft">closed</span>
          )}
        </td>
      ))}
      <td>{MECHANISM_WORDS[transition.mechanism]}</td>
      <td className="num">
        {from === 0 ? `below ${groupDigits(String(to))}` : `${groupDigits(String(from))} to ${groupDigits(String(to))}`}
      </td>
      <td>
        <span className="flex min-w-24 max-w-56 flex-wrap gap-x-2.5">
          {bands.map(({ band, spectrum }) => (
            <a
              key={band.id}
              href={`/spectra/${spectrum.id}`}
              title={spectrum.title}
              className="link num inline-flex min-h-6 items-center gap-1.5"
            >
              <BandTag bandClass={band.assignment.class} />
              {groupDigits(String(Math.round(band.wavenumber)))}
            </a>
          ))}
        </span>
      </td>
    </tr>
  );
}
