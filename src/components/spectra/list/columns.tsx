import type { ReactNode } from 'react';
import { Cuvette } from '#src/components/marks/Cuvette.tsx';
import { Formula, Quantity, Unit } from '#src/components/notation/index.tsx';
import { shortDay } from '#src/components/ui/dates.ts';
import type { SpectrumSummary } from '#src/contracts/spectra.ts';
import { FLAGS, solventText, TECHNIQUES } from '../words.ts';
import { rangeNm } from './spectra-query.ts';

/** Columns that are there for who asks for them: the title tells the same. */
export const HIDDEN_AT_FIRST: Record<string, boolean> = { synthetic: true };

/** A column of the list. */
export interface SpectrumColumn {
  id: string;
  name: string;
  /** Head of the column where it is more than its name. */
  head?: ReactNode;
  /** Name of the order on the server. */
  sort?: 'title' | 'complex' | 'created';
  figures?: boolean;
  value: (spectrum: SpectrumSummary) => string | number | null;
  cell?: (spectrum: SpectrumSummary) => ReactNode;
}

const flagsText = ({ flags }: SpectrumSummary) => flags.map(({ code }) => FLAGS[code] ?? code).join(', ');

/** The columns of the list, in order. */
export const COLUMNS: readonly SpectrumColumn[] = [
  {
    id: 'colour',
    name: 'Colour',
    head: <span className="sr-only">Colour</span>,
    value: ({ colour }) => colour,
    cell: ({ colour }) => (
      <span className="relative z-10">
        <Cuvette
          colour={colour}
          title={colour ? `Solution at peak visible absorbance 1, ${colour}` : 'Colour not told'}
        />
      </span>
    ),
  },
  {
    id: 'title',
    name: 'Title',
    sort: 'title',
    value: ({ title }) => title,
    cell: ({ id, title, state, synthetic }) => (
      <>
        {/* The link covers its row, so that a click anywhere opens the spectrum. */}
        <a
          href={`/spectra/${id}`}
          className="block max-w-60 truncate no-underline after:absolute after:inset-0"
          title={title}
        >
          {title}
        </a>
        {synthetic && <span className="mr-2 text-xs text-ink-soft">SYNTHETIC</span>}
        {state !== 'registered' && <span className="text-xs text-alert">{state}</span>}
      </>
    ),
  },
  {
    id: 'complex',
    name: 'Complex',
    sort: 'complex',
    value: ({ complex }) => complex,
    cell: ({ complex, formula }) => (
      <span className="flex flex-col leading-tight">
        <Formula formula={formula} />
        <span className="num text-xs text-ink-soft">{complex}</span>
      </span>
    ),
  },
  { id: 'lab', name: 'Lab', value: ({ lab }) => lab.name },
  { id: 'technique', name: 'Technique', value: ({ technique }) => TECHNIQUES[technique] },
  { id: 'solvent', name: 'Solvent', value: ({ solvent }) => solventText(solvent) },
  {
    id: 'temperature',
    name: 'Temperature',
    head: (
      <>
        <i>T</i> / <Unit unit="K" />
      </>
    ),
    figures: true,
    value: ({ temperature }) => temperature,
    cell: ({ temperature }) => <Quantity value={temperature} />,
  },
  {
    id: 'range',
    name: 'Range',
    head: 'Range / nm',
    figures: true,
    value: (spectrum) => rangeNm(spectrum).join('–'),
  },
  { id: 'bands', name: 'Bands', figures: true, value: ({ bandCount }) => bandCount },
  {
    id: 'flags',
    name: 'Flags',
    value: flagsText,
    cell: (spectrum) =>
      spectrum.flags.length === 0 ? (
        <span className="text-ink-soft">none</span>
      ) : (
        <span className="text-xs" title={spectrum.flags.map(({ detail }) => detail).join('; ')}>
          <span aria-hidden="true" className="text-alert">
            ▲{' '}
          </span>
          {spectrum.flags.length === 1 ? flagsText(spectrum) : `${spectrum.flags.length} flags`}
          {spectrum.flags.length > 1 && <span className="sr-only">: {flagsText(spectrum)}</span>}
        </span>
      ),
  },
  {
    id: 'synthetic',
    name: 'Origin',
    value: ({ synthetic }) => (synthetic ? 'SYNTHETIC' : 'measured'),
    cell: ({ synthetic }) =>
      synthetic ? (
        <span className="text-xs font-medium">SYNTHETIC</span>
      ) : (
        <span className="text-ink-soft">measured</span>
      ),
  },
  {
    id: 'created',
    name: 'Added',
    sort: 'created',
    value: ({ createdAt }) => createdAt.slice(0, 10),
    cell: ({ createdAt }) => shortDay(createdAt),
  },
];
