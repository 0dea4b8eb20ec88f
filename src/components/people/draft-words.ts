import type { DraftCounts } from '../../contracts/people.ts';

/** "1 spectrum", "2 spectra". */
const counted = (n: number, one: string, many: string) => `${n} ${n === 1 ? one : many}`;

/** What a person began and did not register, in words: "2 complexes and 1 spectrum"; null where there is nothing. */
export function draftWords({ complexes, preparations, spectra }: DraftCounts): string | null {
  const parts = [
    complexes > 0 && counted(complexes, 'complex', 'complexes'),
    preparations > 0 && counted(preparations, 'preparation', 'preparations'),
    spectra > 0 && counted(spectra, 'spectrum', 'spectra'),
  ].filter((part) => part !== false);
  if (parts.length === 0) return null;
  return parts.length === 1 ? parts[0]! : `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)}`;
}

export const draftTotal = ({ complexes, preparations, spectra }: DraftCounts): number =>
  complexes + preparations + spectra;

/** "1 access token", "2 access tokens". */
export const countWords = (n: number, one: string): string => counted(n, one, `${one}s`);
