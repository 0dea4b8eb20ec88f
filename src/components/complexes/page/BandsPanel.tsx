import { BandTable } from '#src/components/spectra/bands/BandTable.tsx';
import { bandSentence } from '#src/components/spectra/bands/band-sentence.ts';
import { CopyButton } from '#src/components/spectra/bands/CopyButton.tsx';
import { curveLabel } from '#src/components/spectra/page/curves.ts';
import { Panel } from '#src/components/ui/Panel.tsx';
import { queryClient } from '#src/components/ui/query-client.ts';
import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';

interface BandsPanelProps {
  lists: readonly { spectrum: SpectrumSummary; bands: BandRecord[] }[];
  hasSpectra: boolean;
}

/** Bands with their assignments, spectrum by spectrum. */
export function BandsPanel({ lists, hasSpectra }: BandsPanelProps) {
  const filled = lists.filter(({ bands }) => bands.length > 0);
  const count = filled.reduce((sum, { bands }) => sum + bands.length, 0);
  return (
    <Panel title="Bands" aside={count > 0 && (count === 1 ? '1 band' : `${count} bands`)}>
      {filled.length === 0 && (
        <p className="text-ink-soft">
          {hasSpectra
            ? 'No band is proposed yet. Bands are picked on the page of a spectrum.'
            : 'Bands are picked on a spectrum; there is none yet.'}
        </p>
      )}
      <div className="flex flex-col gap-5">
        {filled.map(({ spectrum, bands }) => (
          <div key={spectrum.id}>
            <div className="mb-1 flex flex-wrap items-center gap-x-3">
              <h3 className="min-w-0 text-sm">
                <a href={`/spectra/${spectrum.id}`} className="link">
                  {spectrum.title}
                </a>{' '}
                <span className="text-xs font-normal text-ink-soft">{curveLabel(spectrum)}</span>
              </h3>
              <span className="ml-auto">
                <CopyButton
                  text={bandSentence(bands, spectrum) ?? ''}
                  what="the band list"
                  label="Copy as a sentence"
                />
              </span>
            </div>
            <BandTable
              bands={bands}
              label={`Bands of ${spectrum.title}`}
              onJudged={() => void queryClient.invalidateQueries({ queryKey: ['bands', spectrum.id] })}
            />
          </div>
        ))}
      </div>
    </Panel>
  );
}
