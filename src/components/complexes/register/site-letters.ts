import type { LigandReading } from '#src/chem/formula/index.ts';

/** What stands in the disc of each vertex, and what the letters mean. */
export interface SiteLetters {
  letters: string[];
  /** Letter and ligands, for those that the letter alone does not tell. */
  key: { letter: string; ligand: string }[];
}

const PRIMES = ['', '′', '″', '‴'];

/**
 * Short letters for the donors of a drawing: the donor atom, with primes where two kinds of ligand bring the same.
 *
 * @param sites - donor label at each vertex, as the list of isomers gives it: `Cl`, `PPh3`, `N`, `N(bpy)`
 */
export function siteLetters(sites: readonly string[], ligands: readonly LigandReading[]): SiteLetters {
  const kinds = [...new Set(sites)].sort();
  const known = kinds.map((label) => ({ label, ...describe(label, ligands) }));
  const seen = new Map<string, number>();
  const letterOf = new Map<string, { letter: string; ligand: string }>();
  for (const { label, donor, ligand } of known) {
    const nth = seen.get(donor) ?? 0;
    seen.set(donor, nth + 1);
    letterOf.set(label, { letter: `${donor}${PRIMES[nth] ?? `(${nth + 1})`}`, ligand });
  }
  const ambiguous = known.some(({ donor }) => (seen.get(donor) ?? 0) > 1);
  return {
    letters: sites.map((label) => letterOf.get(label)!.letter),
    key: ambiguous ? kinds.map((label) => letterOf.get(label)!) : [],
  };
}

/** The donor atom behind a label, and the ligand or ligands that bring it. */
function describe(label: string, ligands: readonly LigandReading[]): { donor: string; ligand: string } {
  const qualified = /^([A-Z][a-z]?)'*\((.+)\)$/.exec(label);
  if (qualified) return { donor: qualified[1]!, ligand: qualified[2]! };
  const single = ligands.find(({ abbreviation, denticity }) => abbreviation === label && denticity === 1);
  if (single) return { donor: single.donors[0] ?? label, ligand: single.abbreviation };
  const bringers = ligands.filter(({ donors, denticity }) => denticity > 1 && donors.includes(label));
  return { donor: label.replace(/'+$/, ''), ligand: bringers.map(({ abbreviation }) => abbreviation).join(', ') };
}
