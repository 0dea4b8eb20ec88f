import { Transition } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { Checkbox, Select } from '#src/components/ui/controls.tsx';
import type { BandSource } from './observed-bands.ts';

interface BandChoiceProps {
  sources: readonly BandSource[];
  source: BandSource | null;
  chosen: readonly string[];
  onSource: (spectrumId: string) => void;
  onChosen: (ids: string[]) => void;
}

/** Which spectrum the bands are of, and which of them are fitted. */
export function BandChoice({ sources, source, chosen, onSource, onChosen }: BandChoiceProps) {
  if (!source)
    return (
      <p className="text-xs text-ink-soft">
        No band is assigned d–d or left unassigned, so there is nothing to fit. The sliders show what an estimate gives.
      </p>
    );
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-xs text-ink-soft">Bands to fit</legend>
      {sources.length > 1 && (
        <Select
          label={<span className="sr-only">Spectrum</span>}
          value={source.spectrum.id}
          onChange={(event) => onSource(event.currentTarget.value)}
          options={sources.map(({ spectrum }) => ({ value: spectrum.id, label: spectrum.title }))}
          className="mb-1"
        />
      )}
      {source.bands.map(({ id, wavenumber, assignment }) => (
        <Checkbox
          key={id}
          checked={chosen.includes(id)}
          onChange={(event) =>
            onChosen(event.currentTarget.checked ? [...chosen, id] : chosen.filter((other) => other !== id))
          }
          label={
            <span className="inline-flex flex-wrap gap-x-2.5">
              <span className="num">{formatNumber(Math.round(wavenumber), 7)}</span>
              {assignment.class === 'd-d' && assignment.to ? (
                <Transition from={assignment.from ?? null} to={assignment.to} />
              ) : (
                <span className="text-xs text-ink-soft">
                  {assignment.class === 'd-d' ? 'd–d, without a term' : 'not assigned'}
                </span>
              )}
            </span>
          }
        />
      ))}
    </fieldset>
  );
}
