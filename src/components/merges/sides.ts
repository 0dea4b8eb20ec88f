import type { MergeSide } from '../../contracts/merges.ts';

/** What the page calls the members that are compared. */
const NAMES: Record<string, string> = {
  formula: 'formula',
  centres: 'centres',
  ligands: 'ligands',
  isomer: 'isomer',
  pointGroup: 'point group',
  lab: 'home lab',
  visibility: 'who sees it',
  embargoUntil: 'embargo',
  state: 'state',
};

/** "They differ in home lab and who sees it." */
export function differenceSentence(differs: readonly string[]): string {
  const names = differs.map((name) => NAMES[name] ?? name);
  if (names.length === 0) return 'They are alike in every member that is compared.';
  const last = names.at(-1)!;
  return `They differ in ${names.length === 1 ? last : `${names.slice(0, -1).join(', ')} and ${last}`}.`;
}

/** Who sees a record, as a person would say it. */
export const whoSees = ({ visibility, lab }: Pick<MergeSide['complex'], 'visibility' | 'lab'>): string =>
  visibility === 'programme' ? 'the whole programme' : `people of ${lab.name}`;

/** "Co(III), OC-6" of each centre. */
export const centreText = (complex: MergeSide['complex']): string =>
  complex.centres
    .map(({ element, geometry, spinState }) =>
      [element, geometry, spinState && `${spinState} spin`].filter(Boolean).join(', '),
    )
    .join('; ');
