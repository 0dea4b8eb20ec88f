import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';
import { mediumText } from '../words.ts';

type SentenceBand = Pick<BandRecord, 'wavenumber' | 'epsilon' | 'shoulder'> &
  Partial<Pick<BandRecord, 'found' | 'uncertainty'>>;

/** Three significant figures, as papers give ε; no grouping, so that the text can be read again by programs. */
const rounded = (epsilon: number) => String(Number(epsilon.toPrecision(3)));

/** A wavelength in whole nm; of a fitted band with its standard uncertainty to two figures: `464.03 ± 0.86`. */
function positionText({ wavenumber, found, uncertainty }: SentenceBand): string {
  const wavelength = 1e7 / wavenumber;
  if (found !== 'fitted' || !uncertainty) return String(Math.round(wavelength));
  const error = (uncertainty * wavelength ** 2) / 1e7;
  const decimals = Math.min(6, Math.max(0, 1 - Math.floor(Math.log10(error))));
  return `${wavelength.toFixed(decimals)} ± ${error.toFixed(decimals)}`;
}

/**
 * A band list as the sentence papers use: `λmax/nm (ε/dm³ mol⁻¹ cm⁻¹): 351 (33), 464sh (40); water, 298 K`. Longest
 * wavelength last; fitted positions with their standard uncertainty; a band without ε stands with its wavelength alone.
 *
 * @returns null where there is no band
 */
export function bandSentence(
  bands: readonly SentenceBand[],
  conditions: Pick<SpectrumSummary, 'solvent' | 'temperature'>,
): string | null {
  if (bands.length === 0) return null;
  const rising = [...bands].sort((a, b) => b.wavenumber - a.wavenumber);
  const parts = rising.map((band) => {
    const { epsilon, shoulder } = band;
    const position = `${positionText(band)}${shoulder ? 'sh' : ''}`;
    return epsilon === null ? position : `${position} (${rounded(epsilon)})`;
  });
  const head = rising.some(({ epsilon }) => epsilon !== null) ? 'λmax/nm (ε/dm³ mol⁻¹ cm⁻¹)' : 'λmax/nm';
  const medium = mediumText(conditions);
  return `${head}: ${parts.join(', ')}${medium ? `; ${medium}` : ''}`;
}
