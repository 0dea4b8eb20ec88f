import type { CubicGeometry } from '#src/chem/ligand-field/index.ts';
import type { ComplexRecord } from '#src/contracts/complexes.ts';

type Centre = ComplexRecord['centres'][number];

/** Whether a diagram can be drawn for a centre; `note` says by what liberty. */
export type Applicability =
  | { kind: 'none'; sentence: string }
  | { kind: 'cubic'; n: number; geometry: CubicGeometry; note: string | null };

const CUBIC: Record<string, { geometry: CubicGeometry; note: string | null }> = {
  'OC-6': { geometry: 'OC-6', note: null },
  'T-4': { geometry: 'T-4', note: null },
  'CU-8': { geometry: 'CU-8', note: null },
  'SP-4': {
    geometry: 'OC-6',
    note: 'A square plane is far from cubic. Levels are those of the octahedron it derives from: of use for names, not for numbers.',
  },
  'SPY-5': {
    geometry: 'OC-6',
    note: 'A square pyramid is taken as an octahedron that lacks a ligand: E and T levels split beyond what is drawn.',
  },
  'TPR-6': {
    geometry: 'OC-6',
    note: 'A trigonal prism is taken as the octahedron it is twisted from: levels split and shift beyond what is drawn.',
  },
  'TBPY-5': {
    geometry: 'OC-6',
    note: 'A trigonal bipyramid has no cubic parent. The octahedron stands in for it; take numbers for orders of size only.',
  },
  'SS-4': {
    geometry: 'T-4',
    note: 'A see-saw is taken as a tetrahedron that is bent open: levels split beyond what is drawn.',
  },
  'SAPR-8': {
    geometry: 'CU-8',
    note: 'A square antiprism is taken as the cube it is twisted from: levels split beyond what is drawn.',
  },
  'DD-8': {
    geometry: 'CU-8',
    note: 'A dodecahedron is taken as the cube it is bent from: levels split beyond what is drawn.',
  },
};

const none = (sentence: string): Applicability => ({ kind: 'none', sentence });

/** What a level diagram can say of a centre. */
export function applicabilityOf({ element, dCount, geometry }: Centre, donorSetGroup: string | null): Applicability {
  if (dCount === null)
    return none(
      `The d electrons of ${element} cannot be counted by the formula alone, so there are no d levels to draw.`,
    );
  if (!Number.isInteger(dCount))
    return none(
      `${element} shares electrons with its partners (d count ${dCount}): levels of one ion do not describe it.`,
    );
  if (dCount <= 0)
    return none(`A d⁰ ion has no d–d transition: bands of this centre are charge transfer or of the ligands.`);
  if (dCount >= 10) return none(`A d¹⁰ ion has no d–d transition: its d shell is full, and bands are of another kind.`);
  if (geometry === null) return none('The geometry is not stated. State it, and the levels follow.');
  const cubic = CUBIC[geometry];
  if (!cubic) return none(`${geometry} has no cubic parent near enough for a diagram of one Δ.`);
  const mixed = cubic.note === null && donorSetGroup !== null && !['Oh', 'Td'].includes(donorSetGroup);
  const note = mixed
    ? 'The donors are not all alike: Δ is that of their mean environment, and E and T levels split beyond what is drawn.'
    : cubic.note;
  return { kind: 'cubic', n: dCount, geometry: cubic.geometry, note };
}
