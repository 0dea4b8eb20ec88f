import { type UsualEpsilon, usualEpsilon } from '../assignment/usual-epsilon.ts';
import { chargeTransfer } from '../charge-transfer/index.ts';
import { dElectronCount, type Spin, spinChoices } from '../electrons.ts';
import { findElement } from '../elements.ts';
import { DomainError } from '../errors.ts';
import { estimateBeta, estimateDelta, JORGENSEN_SOURCE } from '../ligand-field/jorgensen.ts';
import { levels } from '../ligand-field/levels.ts';
import { freeIonRacah } from '../ligand-field/racah-b.ts';

export interface PlannedComplex {
  element: string;
  oxidationState: number;
  geometry: 'OC-6' | 'T-4';
  /** By donor atoms: three bidentate en count six. */
  donors: readonly { abbreviation: string; count: number }[];
  /** Whether the donor set has a centre of inversion; equal donors of an octahedron do. */
  centrosymmetric: boolean;
  /** Known or wished values in cm⁻¹ in place of the estimates. */
  delta?: number | undefined;
  B?: number | undefined;
}

/** A band that is to be expected. */
export interface PlannedBand {
  kind: 'd-d' | 'LMCT';
  /** Excited term in Oh or Td, or the ligand that gives the electron. */
  to: string;
  wavenumber: number;
  wavelength: number;
  spinAllowed: boolean;
  epsilon: UsualEpsilon;
}

export interface Plan {
  dCount: number;
  /** cm⁻¹; null where neither given nor to be estimated. */
  delta: number | null;
  B: number | null;
  ratioCB: number;
  /** Spin of the ground term as it comes out. */
  spin: Spin | null;
  ground: string | null;
  /** By rising energy. */
  bands: PlannedBand[];
  /** How each number was come by, and what could not be said. */
  reasons: string[];
}

/** Of the tetrahedron's splitting against the octahedron's with the same ligands. @see the angular overlap model */
const TETRAHEDRAL_SHARE = 4 / 9;
const DEFAULT_RATIO = 4.5;
/** Beyond it air and most solvents absorb, and other bands hide these. */
const HIGHEST = 50_000;
/** So many of the weak, spin-forbidden bands are told, the lowest. */
const SPIN_FORBIDDEN_TOLD = 3;

/**
 * What a complex that is still to be measured will show: Δ from f·g, B from h·k, the terms above the ground with the
 * usual strength of such bands, and LMCT from optical electronegativities. Estimates all: Δ is usually met within 10 %.
 *
 * @throws {DomainError} `out-of-range` for a d-count outside 1 to 9 (`oxidationState`), donors that do not fill the
 *   geometry (`donors`)
 */
export function planBands(complex: PlannedComplex): Plan {
  const { element, oxidationState, geometry } = complex;
  const dCount = dElectronCount(element, oxidationState);
  if (dCount === null)
    throw new DomainError(
      'out-of-range',
      `${element} has no d-electron count in state ${oxidationState}`,
      'oxidationState',
    );
  requireDonors(complex);
  const field = fieldOf(complex);
  const { bands, ground, spin } = fieldBands(complex, dCount, field);
  const { lmct, reasons } = chargeTransfer({
    element,
    oxidationState,
    geometry,
    ligands: complex.donors.map(({ abbreviation }) => abbreviation),
    delta: field.delta ?? undefined,
    B: field.B ?? undefined,
    spin,
  });
  const charge = lmct.flatMap(({ ligand, wavenumber, wavelength }): PlannedBand[] =>
    wavelength === null || wavenumber > HIGHEST
      ? []
      : [
          {
            kind: 'LMCT',
            to: ligand,
            wavenumber,
            wavelength,
            spinAllowed: true,
            epsilon: usualEpsilon({ ...siteOf(complex), kind: 'charge-transfer', spinAllowed: true }),
          },
        ],
  );
  return {
    dCount,
    ...field,
    spin,
    ground,
    bands: [...bands, ...charge].sort((a, b) => a.wavenumber - b.wavenumber),
    reasons: [...field.reasons, ...reasons],
  };
}

function requireDonors({ geometry, donors }: PlannedComplex): void {
  const places = geometry === 'OC-6' ? 6 : 4;
  const total = donors.reduce((sum, { count }) => sum + count, 0);
  if (total !== places)
    throw new DomainError('out-of-range', `${geometry} has ${places} donor atoms, not ${total}`, 'donors');
}

function fieldOf(complex: PlannedComplex) {
  const { element, oxidationState, geometry, donors } = complex;
  const places = geometry === 'OC-6' ? 6 : 4;
  // The tables are for octahedra: the same mean environment, six times.
  const six = donors.map(({ abbreviation, count }) => ({ abbreviation, count: (6 * count) / places }));
  const asked = { element, oxidationState, donors: six };
  const octahedral = estimateDelta(asked);
  const estimated = octahedral === null ? null : octahedral * (geometry === 'T-4' ? TETRAHEDRAL_SHARE : 1);
  const beta = estimateBeta(asked);
  const free = freeIonRacah(element, oxidationState);
  const B = complex.B ?? (beta === null || !free ? null : beta * free.B);
  const ratioCB = free?.ratioCB ?? DEFAULT_RATIO;
  const delta = complex.delta ?? estimated;
  const reasons = [
    complex.delta === undefined &&
      (estimated === null
        ? 'Δ cannot be estimated: f or g of this ion or of a ligand is not tabulated. Give Δ.'
        : `Δ ≈ f·g${geometry === 'T-4' ? ' × 4/9' : ''} (${JORGENSEN_SOURCE}); usually met within 10 %.`),
    complex.B === undefined &&
      (B === null
        ? 'B cannot be estimated: h or k, or B of the free ion, is not tabulated. Give B.'
        : `B ≈ (1 − h·k) × ${free!.B} cm⁻¹ of the free ion (${free!.source}).`),
  ].filter((reason) => reason !== false);
  return { delta: delta === null ? null : Math.round(delta), B: B === null ? null : Math.round(B), ratioCB, reasons };
}

const siteOf = ({ element, geometry, centrosymmetric }: PlannedComplex) => ({
  site:
    geometry === 'T-4'
      ? ('tetrahedral' as const)
      : centrosymmetric
        ? ('centrosymmetric' as const)
        : ('acentric' as const),
  period: findElement(element)?.period ?? 4,
});

function fieldBands(
  complex: PlannedComplex,
  dCount: number,
  { delta, B, ratioCB, reasons }: ReturnType<typeof fieldOf>,
): { bands: PlannedBand[]; ground: string | null; spin: Spin | null } {
  const none = { bands: [], ground: null, spin: null };
  if (dCount === 0 || dCount === 10) return none;
  // A single electron or hole feels no repulsion from its like.
  const repulsion = dCount === 1 || dCount === 9 ? 0 : B;
  if (delta === null || repulsion === null) {
    reasons.push('Without Δ and B no d–d band can be placed.');
    return none;
  }
  const { geometry } = complex;
  const field = { kind: 'cubic' as const, geometry, delta };
  const found = levels({ n: dCount, field, B: repulsion, C: ratioCB * repulsion }).levels;
  const ground = found[0]!;
  const excited = found.slice(1).filter(({ energy }) => energy > 1 && energy <= HIGHEST);
  const allowed = excited.filter(({ multiplicity }) => multiplicity === ground.multiplicity);
  const forbidden = excited
    .filter(({ multiplicity }) => multiplicity !== ground.multiplicity)
    .slice(0, SPIN_FORBIDDEN_TOLD);
  const bands = [...allowed, ...forbidden].map(({ energy, label, parent, multiplicity }): PlannedBand => {
    const spinAllowed = multiplicity === ground.multiplicity;
    // Free-ion parents mean something in weak fields, of the highest spin; a low-spin term mixes many of them.
    const weakField = multiplicity === Math.min(dCount, 10 - dCount) + 1;
    const twin = weakField && allowed.filter((level) => level.label === label).length > 1;
    return {
      kind: 'd-d',
      to: twin && parent ? `${label}(${parent})` : label!,
      wavenumber: Math.round(energy),
      wavelength: Math.round(1e8 / energy) / 10,
      spinAllowed,
      epsilon: usualEpsilon({ ...siteOf(complex), kind: 'd-d', spinAllowed }),
    };
  });
  const unpaired = (ground.multiplicity ?? 1) - 1; // without spin–orbit coupling every level has one
  const spin = spinChoices(dCount, geometry).find((choice) => choice.unpaired === unpaired)?.spin ?? null;
  return { bands, ground: ground.label, spin };
}
