import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';
import { mediumText } from '../words.ts';

type SentenceBand = Pick<BandRecord, 'wavenumber' | 'epsilon' | 'shoulder'>;

/** Three significant figures, as papers give ε; no grouping, so that the text can be read again by programs. */
const rounded = (epsilon: number) => String(Number(epsilon.toPrecision(3)));

/**
 * A band list as the sentence papers use: `λmax/nm (ε/dm³ mol⁻¹ cm⁻¹): 351 (33), 464sh (40); water, 298 K`. Longest
 * wavelength last; a band without ε stands with its wavelength alone.
 *
 * @returns null where there is no band
 */
export function bandSentence(
  bands: readonly SentenceBand[],
  conditions: Pick<SpectrumSummary, 'solvent' | 'temperature'>,
): string | null {
  if (bands.length === 0) return null;
  const rising = [...bands].sort((a, b) => b.wavenumber - a.wavenumber);
  const parts = rising.map(({ wavenumber, epsilon, shoulder }) => {
    const position = `${Math.round(1e7 / wavenumber)}${shoulder ? 'sh' : ''}`;
    return epsilon === null ? position : `${position} (${rounded(epsilon)})`;
  });
  const head = rising.some(({ epsilon }) => epsilon !== null) ? 'λmax/nm (ε/dm³ mol⁻¹ cm⁻¹)' : 'λmax/nm';
  const medium = mediumText(conditions);
  return `${head}: ${parts.join(', ')}${medium ? `; ${medium}` : ''}`;
}
