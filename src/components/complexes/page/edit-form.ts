import type { IsomerList } from '#src/chem/geometry/index.ts';
import type { Difference } from '#src/components/ui/Conflict.tsx';
import type { ComplexPatch, ComplexRecord } from '#src/contracts/complexes.ts';
import type { Choices, IsomerPick, Settled } from '../register/settle.ts';

/** What can be changed of a complex, as it is typed and chosen. `choices` is null while the identity is left alone. */
export interface EditDraft {
  notes: string;
  visibility: 'programme' | 'lab';
  /** A day, or empty for none. */
  embargo: string;
  choices: Choices | null;
}

export const editDraft = ({ notes, visibility, embargoUntil }: ComplexRecord): EditDraft => ({
  notes: notes ?? '',
  visibility,
  embargo: embargoUntil?.slice(0, 10) ?? '',
  choices: null,
});

/** The isomer of a record in the list of them: by its sites, and its hand where one is told. */
export function presentPick({ isomer }: Pick<ComplexRecord, 'isomer'>, list: IsomerList): IsomerPick {
  const { sites, chelates, chirality } = isomer;
  if (!sites) return null;
  const key = JSON.stringify([sites, chelates ?? []]);
  const index = list.isomers.findIndex((one) => JSON.stringify([one.sites, one.chelates]) === key);
  if (index < 0) return null;
  const hasHand = chirality !== null && chirality !== 'rac' && list.isomers[index]!.chirality === chirality;
  return { index, rac: list.isomers[index]!.chiral && !hasHand };
}

const sameIsomer = (a: IsomerPick, b: IsomerPick) => a?.index === b?.index && a?.rac === b?.rac;

/** What of the identity is to be changed; nothing where it comes out as it stands. */
function identityPatch(complex: ComplexRecord, settled: Settled): ComplexPatch {
  const centre = complex.centres[0];
  const patch: ComplexPatch = {};
  const moved = settled.geometry !== (centre?.geometry ?? null);
  if (moved) patch.geometry = settled.geometry;
  const present = settled.list && !moved ? presentPick(complex, settled.list) : null;
  if (moved || !sameIsomer(settled.pick, present)) {
    patch.isomer = settled.pick?.index ?? null;
    if (settled.pick?.rac) patch.chirality = 'rac';
  }
  if (settled.spinState !== (centre?.spinState ?? null)) patch.spinState = settled.spinState;
  return patch;
}

/** What is sent: only what differs from the record. */
export function editPatch(complex: ComplexRecord, draft: EditDraft, settled: Settled | null): ComplexPatch {
  const was = editDraft(complex);
  const patch: ComplexPatch = draft.choices && settled ? identityPatch(complex, settled) : {};
  const notes = draft.notes.trim();
  if (notes !== was.notes) patch.notes = notes || null;
  if (draft.visibility !== was.visibility) patch.visibility = draft.visibility;
  if (draft.embargo !== was.embargo) patch.embargoUntil = draft.embargo ? `${draft.embargo}T00:00:00.000Z` : null;
  return patch;
}

/** Whether a change touches what the record is, so that attestations are reopened. */
export const touchesIdentity = (patch: ComplexPatch): boolean =>
  ['geometry', 'isomer', 'chirality'].some((name) => name in patch);

const isomerWords = (descriptor: string | null, chirality: string | null, stated: boolean) =>
  [chirality, descriptor].filter(Boolean).join('-') || (stated ? 'the one form' : 'not stated');

/** What of a change differs from a record that somebody else changed meanwhile. */
export function editDifferences(present: ComplexRecord, draft: EditDraft, settled: Settled | null): Difference[] {
  const patch = editPatch(present, draft, settled);
  const centre = present.centres[0];
  const { descriptor, chirality, sites } = present.isomer;
  const rows: [keyof ComplexPatch, Difference][] = [
    ['notes', { name: 'Notes', present: present.notes ?? '', mine: draft.notes.trim() }],
    ['visibility', { name: 'Seen by', present: present.visibility, mine: draft.visibility }],
    ['embargoUntil', { name: 'Embargo', present: present.embargoUntil?.slice(0, 10) ?? '', mine: draft.embargo }],
    ['geometry', { name: 'Geometry', present: centre?.geometry ?? '', mine: settled?.geometry ?? '' }],
    [
      'isomer',
      {
        name: 'Isomer',
        present: isomerWords(descriptor, chirality, sites !== null),
        mine: isomerWords(settled?.isomer?.descriptor ?? null, settled?.chirality ?? null, settled?.pick != null),
      },
    ],
    ['spinState', { name: 'Spin state', present: centre?.spinState ?? '', mine: settled?.spinState ?? '' }],
  ];
  return rows.filter(([name]) => name in patch).map(([, row]) => row);
}
