import type { FitCandidate } from '#src/chem/ligand-field/index.ts';
import { Quantity, Term } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';

interface CandidateListProps {
  candidates: readonly FitCandidate[];
  chosen: number;
  onChoose: (index: number) => void;
}

const SHOWN = 5;

/** Fits of the bands, the best first, each with its assignment and what speaks against it. */
export function CandidateList({ candidates, chosen, onChoose }: CandidateListProps) {
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-xs text-ink-soft">Candidates, the best first</legend>
      <ol className="flex flex-col border-t border-faint">
        {candidates.slice(0, Math.max(SHOWN, chosen + 1)).map((candidate, i) => (
          <li key={i} className="border-b border-faint">
            <label className="grid cursor-pointer grid-cols-[auto_minmax(0,1fr)] gap-x-2.5 px-1 py-2 has-checked:bg-zaffre-wash has-focus-visible:outline-2 has-focus-visible:outline-zaffre">
              <input
                type="radio"
                name="level-candidate"
                checked={i === chosen}
                onChange={() => onChoose(i)}
                className="mt-1 accent-zaffre"
              />
              <span className="min-w-0">
                <span className="flex flex-wrap gap-x-3">
                  {candidate.assignments.map(({ wavenumber, to }) => (
                    <span key={wavenumber} className="whitespace-nowrap">
                      <span className="num text-xs text-ink-soft">{formatNumber(Math.round(wavenumber), 7)}</span>{' '}
                      <Term term={to} />
                    </span>
                  ))}
                </span>
                <span className="block text-xs text-ink-soft">
                  <i>Δ</i>{' '}
                  <Quantity value={candidate.delta === null ? null : Math.round(candidate.delta)} figures={6} />,{' '}
                  <i>B</i> <Quantity value={candidate.B === null ? null : Math.round(candidate.B)} figures={6} />,
                  ground <Term term={candidate.ground} />, rms{' '}
                  <span className="num">{candidate.rms < 0.5 ? '0' : formatNumber(Math.round(candidate.rms), 5)}</span>
                </span>
                {candidate.remarks.map((remark) => (
                  <span key={remark} className="block text-xs text-alert">
                    {remark}
                  </span>
                ))}
              </span>
            </label>
          </li>
        ))}
      </ol>
    </fieldset>
  );
}
