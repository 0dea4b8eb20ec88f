import type { ToldLevel } from '#src/chem/ligand-field/index.ts';
import { selectionAnalysis } from '#src/chem/symmetry/index.ts';
import type { BandRecord } from '#src/contracts/spectra.ts';

export interface LevelRow {
  key: string;
  /** Term, with its free-ion parent where a term comes twice. */
  label: string;
  energy: number;
  degeneracy: number;
  isGround: boolean;
  spinAllowed: boolean | null;
  verdict: string;
  /** Under spin–orbit coupling: the terms it is mixed of, the largest two. */
  composition: { term: string; share: number }[] | null;
  /** Bands on it, and how far the level lies above each, cm⁻¹. */
  bands: { band: BandRecord; distance: number }[];
}

const MECHANISMS: Record<string, string> = {
  allowed: 'spin and Laporte allowed',
  vibronic: 'spin allowed, Laporte forbidden: vibronic',
  'spin-forbidden': 'spin forbidden',
  'spin-forbidden-vibronic': 'spin and Laporte forbidden',
};

/** Levels as a table tells them: what the rules say from the ground level, and which observed bands lie on them. */
export function levelRows(
  group: string | null,
  levels: readonly ToldLevel[],
  matched: readonly { band: BandRecord; level: number | null }[],
): LevelRow[] {
  const ground = levels[0];
  const verdicts = new Map<string, { spinAllowed: boolean; verdict: string }>();
  const judge = (to: string) => {
    const known = verdicts.get(to);
    if (known || !group || !ground?.label) return known ?? null;
    const { spinAllowed, mechanism } = selectionAnalysis({ group, from: ground.label, to });
    const verdict = { spinAllowed, verdict: (mechanism && MECHANISMS[mechanism]) ?? 'forbidden' };
    verdicts.set(to, verdict);
    return verdict;
  };
  return levels.map((level, i) => {
    const label = level.label ?? '';
    const twin = levels.some((other, k) => k !== i && other.label === label);
    const coupled = level.composition !== undefined;
    const said = i === 0 || coupled ? null : judge(label);
    return {
      key: `${label} ${i}`,
      label: twin && level.parent ? `${label}(${level.parent})` : label,
      energy: level.energy,
      degeneracy: level.degeneracy,
      isGround: i === 0,
      spinAllowed: said?.spinAllowed ?? null,
      verdict: i === 0 ? 'ground level' : (said?.verdict ?? ''),
      composition: level.composition ? largestTwo(level.composition) : null,
      bands: matched.flatMap(({ band, level: at }) =>
        at === i ? [{ band, distance: level.energy - band.wavenumber }] : [],
      ),
    };
  });
}

const largestTwo = (composition: readonly { term: string; share: number }[]) =>
  [...composition].sort((a, b) => b.share - a.share).slice(0, 2);

/** Levels as bands are matched to them: a mixed one goes by the term it is mostly made of. */
export const byTerm = (levels: readonly ToldLevel[]): { label: string | null; parent: string | null }[] =>
  levels.map(({ label, parent, composition }) => ({
    label: composition ? (largestTwo(composition)[0]?.term ?? null) : label,
    parent,
  }));
