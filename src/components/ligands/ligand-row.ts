/** A ligand of the library as the table shows it. */
export interface LigandRow {
  abbreviation: string;
  name: string;
  synonyms: readonly string[];
  charge: number;
  donors: readonly string[];
  denticity: number;
  hapticity: number | null;
  piCharacter: 'donor' | 'none' | 'acceptor';
  /** Jørgensen's f, water = 1. */
  f: number | null;
  /** Optical electronegativity from π orbitals, and from σ orbitals. */
  opticalPi: number | null;
  opticalSigma: number | null;
  source: string | null;
}

/** The atoms that bind, in the order of the chain: `N, N`; with the hapticity of what binds side-on: `η5-C`. */
export function donorText({ donors, hapticity }: Pick<LigandRow, 'donors' | 'hapticity'>): string {
  return hapticity === null ? donors.join(', ') : `η${hapticity}-${donors[0] ?? ''}`;
}

/** `1−`, `2+`, `0`. */
export function chargeText(charge: number): string {
  if (charge === 0) return '0';
  return `${Math.abs(charge)}${charge > 0 ? '+' : '−'}`;
}
