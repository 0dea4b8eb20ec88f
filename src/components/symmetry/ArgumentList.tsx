import { Check, Waves, X } from 'lucide-react';
import type { ArgumentLine } from './argument.ts';
import { Pieces } from './Pieces.tsx';

const SIGNS = {
  allowed: { Icon: Check, looks: 'text-attest' },
  forbidden: { Icon: X, looks: 'text-alert' },
  lent: { Icon: Waves, looks: 'text-zaffre' },
} as const;

/** The numbered argument. A sign beside a step says which way it points; the sentence says so, too. */
export function ArgumentList({ lines }: { lines: readonly ArgumentLine[] }) {
  return (
    <ol className="flex flex-col gap-1.5">
      {lines.map(({ topic, verdict, pieces }, i) => {
        const sign = verdict && SIGNS[verdict];
        return (
          <li key={i} className="grid grid-cols-[22px_minmax(0,1fr)] gap-x-1.5">
            <span className="font-semibold text-zaffre tabular-nums" aria-hidden="true">
              {i + 1}
            </span>
            <span className="max-w-[72ch]">
              <span className="font-medium">{topic}:</span> <Pieces pieces={pieces} />
              {sign && (
                <sign.Icon aria-hidden="true" size={14} className={`ml-1.5 inline-block align-[-2px] ${sign.looks}`} />
              )}
            </span>
          </li>
        );
      })}
    </ol>
  );
}
