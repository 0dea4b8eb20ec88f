import type { ReactNode } from 'react';
import { BandTag } from '#src/components/marks/BandTag.tsx';
import { bandStyle } from '#src/components/marks/band-classes.ts';
import { Formula, Quantity, Transition, Unit } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';
import type { BandRecord } from '#src/contracts/spectra.ts';
import { HEIGHTS } from '../words.ts';
import { BandJudgement } from './BandJudgement.tsx';
import { BandState } from './BandState.tsx';

interface BandTableProps {
  bands: readonly BandRecord[];
  /** Names the region, since a page may hold several: "Bands of QN-114". */
  label: string;
  onJudged: () => void;
}

/** Bands in rising wavenumber with their assignments, and the buttons of those who may judge. */
export function BandTable({ bands, label, onJudged }: BandTableProps) {
  const rising = [...bands].sort((a, b) => a.wavenumber - b.wavenumber);
  const mayJudge = bands.some(({ may }) => may.judge);
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
    <section aria-label={label} tabIndex={0} className="overflow-x-auto">
      <table className="table table-compact">
        <thead>
          <tr>
            <th scope="col">
              <span className="sr-only">Class</span>
            </th>
            <Head>
              <Unit unit="cm-1" />
            </Head>
            <Head>nm</Head>
            <Head>ε</Head>
            <Head>FWHM</Head>
            <Head>
              <i>f</i>
            </Head>
            <th scope="col">Assignment</th>
            <th scope="col">State</th>
            {mayJudge && (
              <th scope="col">
                <span className="sr-only">Judge</span>
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {rising.map((band) => (
            <Row key={band.id} band={band} mayJudge={mayJudge} onJudged={onJudged} />
          ))}
        </tbody>
      </table>
    </section>
  );
}

const Head = ({ children }: { children: ReactNode }) => (
  <th scope="col" className="text-right!">
    {children}
  </th>
);

const Figure = ({ children }: { children: ReactNode }) => <td className="num text-right!">{children}</td>;

function Row({ band, mayJudge, onJudged }: { band: BandRecord; mayJudge: boolean; onJudged: () => void }) {
  const { assignment } = band;
  return (
    <tr>
      <td>
        <BandTag bandClass={assignment.class} />
      </td>
      <Figure>
        <Quantity value={Math.round(band.wavenumber)} uncertainty={band.uncertainty} />
      </Figure>
      <Figure>
        {formatNumber(band.wavelength, 3)}
        {band.shoulder && <abbr title="shoulder"> sh</abbr>}
      </Figure>
      <Figure>
        {band.epsilon === null && band.quantity !== 'epsilon' ? (
          <span className="text-ink-soft">
            {HEIGHTS[band.quantity]} {formatNumber(band.height, 3)}
          </span>
        ) : (
          <Quantity value={band.epsilon} figures={3} />
        )}
      </Figure>
      <Figure>{band.fwhm === null ? '–' : formatNumber(Math.round(band.fwhm), 3)}</Figure>
      <Figure>
        <Quantity value={band.oscillatorStrength} figures={2} />
      </Figure>
      <td>
        <Assigned assignment={assignment} />
        {assignment.reason && <p className="max-w-72 text-xs whitespace-normal text-ink-soft">{assignment.reason}</p>}
        {band.verdict && <p className="max-w-72 text-xs whitespace-normal text-alert">{band.verdict}</p>}
      </td>
      <td>
        <BandState band={band} />
      </td>
      {mayJudge && (
        <td className="text-right!">
          <BandJudgement band={band} onJudged={onJudged} />
        </td>
      )}
    </tr>
  );
}

/** An assignment as a transition, or by its class where no term is given. */
export function Assigned({ assignment }: { assignment: BandRecord['assignment'] }) {
  const { from, to, ligand } = assignment;
  if (assignment.class === 'unassigned' && !from && !to) return <span className="text-ink-soft">unassigned</span>;
  return (
    <>
      {from || to ? <Transition from={from ?? null} to={to ?? null} /> : bandStyle(assignment.class).name}
      {ligand && (
        <span className="text-ink-soft">
          , <Formula formula={ligand} />
        </span>
      )}
    </>
  );
}
