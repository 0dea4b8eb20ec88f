import type { ReactNode } from 'react';
import type { MergeSide } from '../../contracts/merges.ts';
import { BandStrip } from '../marks/BandStrip.tsx';
import { Cuvette } from '../marks/Cuvette.tsx';
import { Formula, PointGroup } from '../notation/index.tsx';
import { shortDay } from '../ui/dates.ts';
import { Facts } from '../ui/Panel.tsx';
import { centreText, whoSees } from './sides.ts';

interface MergeSpecimenProps {
  side: MergeSide;
  /** Names of the members that the other record has otherwise. */
  differs: readonly string[];
  /** The button that merges the other record into this one. */
  children: ReactNode;
}

/** One of two records side by side: what it is, who sees it, what hangs on it. What differs stands on a ground. */
export function MergeSpecimen({ side, differs, children }: MergeSpecimenProps) {
  const { complex } = side;
  const marked = (name: string, value: ReactNode) =>
    differs.includes(name) ? <mark className="bg-zaffre-wash px-1 text-ink">{value}</mark> : value;
  return (
    <article className="specimen flex min-w-0 flex-col gap-3 px-5 py-4" aria-label={complex.accession}>
      <header className="flex items-start gap-3">
        <Cuvette
          colour={complex.colour}
          title={complex.colour ? `Solution at peak visible absorbance 1: ${complex.colour}` : 'No colour known'}
        />
        <div className="min-w-0">
          <a href={`/complexes/${complex.accession}`} className="link num">
            {complex.accession}
          </a>
          <p className="text-lg break-words">
            <Formula
              formula={[complex.isomer.chirality, complex.isomer.descriptor]
                .filter(Boolean)
                .concat(complex.formula)
                .join('-')}
            />
          </p>
        </div>
      </header>
      <Facts
        facts={[
          ['Centres', marked('centres', centreText(complex))],
          ['Point group', complex.pointGroup && marked('pointGroup', <PointGroup group={complex.pointGroup} />)],
          ['Home lab', marked('lab', complex.lab.name)],
          ['Seen by', marked('visibility', whoSees(complex))],
          ['State', marked('state', complex.state)],
          ['Embargo', complex.embargoUntil && marked('embargoUntil', `until ${shortDay(complex.embargoUntil)}`)],
          ['Registered', `${shortDay(side.createdAt)}, ${side.maker}`],
          [
            'Holds',
            <span key="holds" className="num">
              {complex.spectra} spectra · {side.preparations} preparations · in {side.folios} folios
            </span>,
          ],
          ['Notes', side.notes && <span className="whitespace-pre-wrap">{side.notes}</span>],
        ]}
      />
      {complex.strip.length > 0 && <BandStrip bands={complex.strip} />}
      <div className="mt-auto flex flex-col items-start gap-2 border-t border-hairline pt-3">
        {children}
        {side.obstacles.length > 0 && (
          <ul className="flex flex-col gap-1 text-xs text-ink-soft">
            {side.obstacles.map((obstacle) => (
              <li key={obstacle}>{obstacle}</li>
            ))}
          </ul>
        )}
      </div>
    </article>
  );
}
