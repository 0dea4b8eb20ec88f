import type { BandRecord } from '#src/contracts/spectra.ts';

const LOOKS: Record<BandRecord['state'], string> = {
  attested: 'text-attest',
  disputed: 'text-alert',
  proposed: 'text-ink',
};

/** How an assignment stands, and by whom, as far as this reader is told. */
export function BandState({ band }: { band: BandRecord }) {
  const who = [
    band.proposedBy && `proposed by ${band.proposedBy}`,
    band.judgedBy && `${band.state} by ${band.judgedBy}`,
    band.judgement,
  ].filter(Boolean);
  return (
    <span className="inline-flex flex-col">
      <span className={LOOKS[band.state]}>{band.state}</span>
      {who.length > 0 && <span className="text-xs whitespace-normal text-ink-soft">{who.join('; ')}</span>}
    </span>
  );
}
