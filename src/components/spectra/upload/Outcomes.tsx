import { ButtonLink } from '#src/components/ui/Button.tsx';
import type { Outcome } from './useUpload.ts';

interface OutcomesProps {
  outcomes: readonly Outcome[];
  accession: string;
  /** No file waits any more. */
  isOver: boolean;
}

/** What was stored so far, and what was there already. */
export function Outcomes({ outcomes, accession, isOver }: OutcomesProps) {
  return (
    <div role="status" className={outcomes.length === 0 ? 'sr-only' : ''}>
      {outcomes.length > 0 && (
        <div className="border border-hairline bg-zaffre-wash px-4 py-3">
          <ul className="flex flex-col gap-1">
            {outcomes.map(({ file, title, id, isDuplicate }) => (
              <li key={`${file} ${id}`}>
                {isDuplicate ? 'On this complex already, and not stored again: ' : 'Stored: '}
                <a href={`/spectra/${id}`} className="link">
                  {title}
                </a>
                {title !== file && <span className="text-xs text-ink-soft"> from {file}</span>}
              </li>
            ))}
          </ul>
          {isOver && (
            <p className="mt-3">
              <ButtonLink href={`/complexes/${accession}`}>Back to the complex</ButtonLink>
            </p>
          )}
        </div>
      )}
    </div>
  );
}
