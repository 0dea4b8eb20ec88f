import { findElement } from '../elements.ts';
import type { Ligand } from '../ligands/index.ts';

/** Whether a metal-to-ligand band is to be expected, with the reason. */
export interface MlctJudgement {
  ligand: string;
  plausible: boolean;
  reason: string;
}

/** First-row ions of charge 2+ that give an electron to a π* orbital easily (common practice). */
const GENEROUS = new Set(['Ti', 'V', 'Cr', 'Fe']);

/**
 * Judge metal-to-ligand charge transfer: it needs an occupied metal level that is not held too tightly, and a
 * low-lying empty ligand orbital.
 *
 * @see A. B. P. Lever, Inorganic Electronic Spectroscopy, 2nd ed., 1984, ch. 5; common practice
 */
export function judgeMlct(
  ligand: Ligand,
  { element, oxidationState, dCount }: { element: string; oxidationState: number; dCount: number },
): MlctJudgement {
  const say = (plausible: boolean, reason: string) => ({ ligand: ligand.abbreviation, plausible, reason });
  if (dCount === 0) return say(false, 'A d⁰ ion has no metal electron to give.');
  if (ligand.piCharacter !== 'acceptor') return say(false, `${ligand.abbreviation} has no low-lying empty π* orbital.`);
  if (ligand.donors.every((donor) => donor === 'P' || donor === 'As'))
    return say(false, `${ligand.abbreviation} takes π electrons only weakly: such bands lie deep in the ultraviolet.`);
  const period = findElement(element)?.period ?? 4;
  if (oxidationState <= 1) return say(true, giving(element, oxidationState, dCount));
  if (oxidationState === 2 && (period > 4 || GENEROUS.has(element)))
    return say(true, giving(element, oxidationState, dCount));
  if (oxidationState === 3 && period === 6)
    return say(true, `${element}(III) gives an electron less easily: expect the band in the near ultraviolet.`);
  return say(
    false,
    `${element} in oxidation state ${oxidationState} holds its d electrons too tightly for a band in the visible.`,
  );
}

const giving = (element: string, oxidationState: number, dCount: number): string =>
  `d${superscript(dCount)} ${element} in oxidation state ${oxidationState} has occupied dπ orbitals, and the ligand an empty π* orbital.`;

const superscript = (n: number): string => [...String(n)].map((digit) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(digit)]).join('');
