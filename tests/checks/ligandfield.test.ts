import { describe, expect, test } from 'vitest';
import { D_ORBITALS } from '#src/chem/ligand-field/d-orbitals.ts';
import { blockEnergies, cubicBlocks } from '#src/chem/ligand-field/cubic-blocks.ts';
import type { Level } from '#src/chem/ligand-field/field-levels.ts';
import { type FitCandidate, type FitRequest, fit } from '#src/chem/ligand-field/index.ts';
import { estimateBeta, estimateDelta, ionFactors, ligandFactors } from '#src/chem/ligand-field/jorgensen.ts';
import { type CubicGeometry, levels } from '#src/chem/ligand-field/levels.ts';
import { type OverlapLigand, orbitalEnergies, overlapField } from '#src/chem/ligand-field/overlap.ts';
import { SPECTROCHEMICAL_SERIES } from '#src/chem/ligand-field/spectrochemical-series.ts';
import { freeIonRacah } from '#src/chem/ligand-field/racah-b.ts';
import { tetragonalField } from '#src/chem/ligand-field/tetragonal.ts';
import { evaluate } from './expression.ts';
import file from './ligandfield.json';

type Rec = any;
const ofKind = (kind: string): Rec[] => {
  const found = (file.records as Rec[]).filter((record) => record.kind === kind);
  if (found.length === 0) throw new Error(`No record of the kind ${kind}`);
  return found;
};

const GEOMETRY: Record<string, CubicGeometry> = { Oh: 'OC-6', Td: 'T-4' };
const cubic = (n: number, geometry: string, delta: number, B: number, C: number) =>
  levels({ n, field: { kind: 'cubic', geometry: GEOMETRY[geometry]!, delta }, B, C });

/** The lowest level with this label; `4T1g(P)` names the parent too. */
function find(all: Level[], text: string): Level {
  const [, label, parent] = /^(\w+)\s*(?:\((\w)\))?/.exec(text)!;
  const level = all.find((l) => l.label === label && (parent === undefined || l.parent === parent));
  if (!level) throw new Error(`No level ${text}`);
  return level;
}

test.each(ofKind('closedForm'))('closed form $id', ({ dCount, geometry, Delta_cm1, B_cm1, expect: wanted, tolerance, source }) => {
  const { levels: all } = cubic(dCount, geometry, Delta_cm1, B_cm1, 4 * B_cm1);
  // C moves no level of highest spin against another, so that any C serves.
  const ground = find(all, wanted.groundTerm);
  for (const [label, energy] of Object.entries<number>(wanted.bands_cm1)) {
    expect(Math.abs(find(all, label).energy - ground.energy - energy), `${label}: ${source}`).toBeLessThanOrEqual(tolerance.bands_cm1);
  }
});

test.each(ofKind('strongFieldMatrix'))('strong-field matrix $id', ({ dCount, geometry, term, expect: wanted, source }) => {
  const [B, C, D] = [830, 3400, 15700];
  const value = (text: string): number => evaluate(text, { B, C, D });
  const diagonal = Object.entries<string>(wanted).filter(([key]) => key !== 'off-diagonal').map(([, text]) => value(text));
  expect(diagonal.length).toBeLessThanOrEqual(2);
  const [a, b] = diagonal as [number, number?];
  const mean = (a + (b ?? a)) / 2;
  const half = Math.hypot((a - (b ?? a)) / 2, wanted['off-diagonal'] ? value(wanted['off-diagonal']) : 0);
  const eigenvalues = b === undefined ? [a] : [mean - half, mean + half];
  const block = cubicBlocks(dCount).find(({ multiplicity, irrep }) => term === `${multiplicity}${irrep}${geometry === 'Oh' ? 'g' : ''}`)!;
  const found = blockEnergies(block, { delta: geometry === 'Oh' ? D : -D, B, C });
  expect(found, source).toHaveLength(eigenvalues.length);
  found.forEach((energy, i) => expect(Math.abs(energy - eigenvalues[i]!)).toBeLessThan(1e-6));
});

test.each(ofKind('levels'))('levels $id', ({ dCount, geometry, Delta_cm1, B_cm1, C_cm1, expect: wanted, tolerance, source }) => {
  const { levels: all } = cubic(dCount, geometry, Delta_cm1, B_cm1, C_cm1);
  const rest = [...all];
  for (const { spinMultiplicity, orbitalDegeneracy, energy_cm1 } of wanted.levels) {
    const at = rest.findIndex(
      (l) =>
        l.multiplicity === spinMultiplicity &&
        l.degeneracy === spinMultiplicity * orbitalDegeneracy &&
        Math.abs(l.energy - energy_cm1) <= tolerance.energy_cm1,
    );
    expect(at, `${spinMultiplicity} × ${orbitalDegeneracy} at ${energy_cm1}: ${source}`).toBeGreaterThanOrEqual(0);
    rest.splice(at, 1);
  }
  // None was left out below the highest that is listed.
  const highest = Math.max(...wanted.levels.map((l: Rec) => l.energy_cm1));
  expect(rest.filter((l) => l.energy < highest - tolerance.energy_cm1)).toEqual([]);
});

test.each(ofKind('expression'))('expression $id', ({ case: title, transition, expect: wanted, source }) => {
  const n = Number(/^d(\d)/.exec(title)![1]);
  const low = title.includes('low');
  const exact = wanted.includes('exact');
  const [B, C] = [1, 4.5];
  // First order in the repulsion is the limit of a strong field; high spin needs a weak one and is exact here.
  const Delta = low ? 1e6 : 10;
  if (!low) expect(exact || wanted.includes('10B'), title).toBe(true);
  const { levels: all } = cubic(n, 'Oh', Delta, B, C);
  const [from, to] = transition.split('->').map((part: string) => part.trim()) as [string, string];
  expect(all[0]!.label).toBe(from);
  const parent = /\((\w)\)/.exec(to)?.[0] ?? '';
  const value = evaluate(wanted.replace(/\(exact.*$/, ''), { Delta, B, C });
  for (const label of to.replace(/\s*\(\w\)/, '').split(',')) {
    expect(Math.abs(find(all, label + parent).energy - value), source).toBeLessThan(exact ? 1e-6 : 1e-3);
  }
});

const at = (theta: number, phi: number) => ({ theta, phi });
const CUBE = (Math.acos(1 / Math.sqrt(3)) * 180) / Math.PI;
const square = [0, 90, 180, 270].map((phi) => at(90, phi));
const poles = [at(0, 0), at(180, 0)];
const triangle = [0, 120, 240].map((phi) => at(90, phi));
const SHAPES: Record<string, { theta: number; phi: number }[]> = {
  octahedral: [...square, ...poles],
  'square planar': square,
  'square pyramidal': [...square, poles[0]!],
  tetrahedral: [at(CUBE, 45), at(CUBE, 225), at(180 - CUBE, 135), at(180 - CUBE, 315)],
  cubic: [45, 135, 225, 315].flatMap((phi) => [at(CUBE, phi), at(180 - CUBE, phi)]),
  'trigonal bipyramidal': [...triangle, ...poles],
  'trigonal planar': triangle,
  linear: poles,
};
const shape = (name: string, eSigma: number, ePi: number): OverlapLigand[] =>
  SHAPES[name]!.map((direction) => ({ ...direction, eSigma, ePi }));

test.each(ofKind('aomOrbitals'))('overlap $id', ({ shape: name, expect: wanted, tolerance, source }) => {
  const sigma = overlapField(shape(name, 1, 0));
  const pi = overlapField(shape(name, 0, 1));
  D_ORBITALS.forEach((orbital, i) => {
    expect(Math.abs(sigma.data[6 * i]! - wanted[orbital].e_sigma), `${orbital}: ${source}`).toBeLessThanOrEqual(tolerance);
    expect(Math.abs(pi.data[6 * i]! - wanted[orbital].e_pi), `${orbital}: ${source}`).toBeLessThanOrEqual(tolerance);
  });
});

/** Mean energy of e (z², x²−y²) above t2 in a cubic field. */
const gap = (name: string, eSigma: number, ePi: number): number => {
  const { data } = overlapField(shape(name, eSigma, ePi));
  return (data[0]! + data[6]!) / 2 - (data[12]! + data[18]! + data[24]!) / 3;
};

test.each(ofKind('aomRelations'))('overlap $id', ({ expect: wanted, source }) => {
  const [e_sigma, e_pi] = [7100, 900];
  expect(gap('octahedral', e_sigma, e_pi), source).toBeCloseTo(evaluate(wanted.Delta_o, { e_sigma, e_pi }), 6);
  expect(-gap('tetrahedral', e_sigma, e_pi), source).toBeCloseTo(evaluate(wanted.Delta_t.split(',')[0], { e_sigma, e_pi }), 6);
  const { data } = overlapField(shape('square planar', e_sigma, e_pi));
  for (const [, names, text] of wanted.squarePlanarOrder.matchAll(/([\w,-]+) \(([^)]*)\)/g)) {
    for (const name of names.split(',')) {
      expect(data[6 * D_ORBITALS.indexOf(name)]!, name).toBeCloseTo(evaluate(text, { e_sigma, e_pi }), 6);
    }
  }
});

test.each(ofKind('aomExample'))('overlap $id', ({ e_sigma_cm1, e_pi_cm1, expect: wanted, tolerance, source }) => {
  expect(Math.abs(gap('octahedral', e_sigma_cm1, e_pi_cm1) - wanted.Delta_o_cm1), source).toBeLessThanOrEqual(tolerance.Delta_o_cm1);
});

describe('tetragonal', () => {
  test.each(ofKind('tetragonal'))('$id', ({ Dq, Ds, Dt, expect: wanted, tolerance, source }) => {
    const field = tetragonalField({ Dq, Ds, Dt });
    for (const [text, energy] of Object.entries<number>(wanted)) {
      for (const name of text.split(' ')[1]!.split(',')) {
        const found = field.data[6 * D_ORBITALS.indexOf(name as (typeof D_ORBITALS)[number])]!;
        expect(Math.abs(found - energy), `${name}: ${source}`).toBeLessThanOrEqual(tolerance);
      }
    }
    const sorted = Object.entries<number>(wanted).flatMap(([text, energy]) => (text.startsWith('e') ? [energy, energy] : [energy]));
    sorted.sort((a, b) => a - b);
    orbitalEnergies(field).forEach(({ energy }, i) => expect(Math.abs(energy - sorted[i]!)).toBeLessThanOrEqual(tolerance));
  });
});

/** `Cr3+` in its parts. */
function readIon(text: string): [element: string, charge: number] {
  const [, element, charge] = /^([A-Z][a-z]?)(\d)\+$/.exec(text)!;
  return [element!, Number(charge)];
}

test.each(ofKind('freeIonRacahB'))('free ion $ion', ({ ion, expect: wanted, tolerance, source }) => {
  const found = freeIonRacah(...readIon(ion));
  expect(Math.abs((found?.B ?? Number.NaN) - wanted.B_cm1), source).toBeLessThanOrEqual(tolerance.B_cm1);
  expect(source).toContain(found!.source);
});

/** Abbreviations of the register for the ligands as the table writes them. */
const ABBREVIATION: Record<string, string> = {
  'SCN- (S-bonded)': 'SCN',
  'NCS- (N-bonded)': 'NCS',
  'C2O4 2-': 'ox',
  CH3CN: 'MeCN',
};
const abbreviate = (text: string): string => ABBREVIATION[text] ?? text.replace(/-$/, '');

test.each(ofKind('jorgensenTable'))('factors $id', ({ expect: wanted, tolerance, source }) => {
  for (const [ligand, f] of Object.entries<number>(wanted.f ?? {})) {
    expect(Math.abs((ligandFactors(abbreviate(ligand))?.f ?? Number.NaN) - f), `${ligand}: ${source}`).toBeLessThanOrEqual(tolerance.f);
  }
  for (const [ligand, h] of Object.entries<number>(wanted.h ?? {})) {
    expect(Math.abs((ligandFactors(abbreviate(ligand))?.h ?? Number.NaN) - h), `${ligand}: ${source}`).toBeLessThanOrEqual(tolerance.h);
  }
  for (const [ion, g] of Object.entries<number>(wanted.g_cm1 ?? {})) {
    expect(Math.abs((ionFactors(...readIon(ion))?.g ?? Number.NaN) / g - 1), `${ion}: ${source}`).toBeLessThanOrEqual(tolerance.g_relative);
  }
  for (const [ion, k] of Object.entries<number>(wanted.k ?? {})) {
    expect(Math.abs((ionFactors(...readIon(ion))?.k ?? Number.NaN) - k), `${ion}: ${source}`).toBeLessThanOrEqual(tolerance.k);
  }
});

const complexOf = (metal: string, ligand: string, count: number) => {
  const [element, oxidationState] = readIon(metal);
  return { element, oxidationState, donors: [{ abbreviation: abbreviate(ligand), count }] };
};

test.each(ofKind('deltaEstimate'))('estimate of Δ $id', ({ metal, ligand, count, expect: wanted, tolerance, source }) => {
  const delta = estimateDelta(complexOf(metal, ligand, count)) ?? Number.NaN;
  expect(Math.abs(delta / wanted.Delta_cm1 - 1), source).toBeLessThanOrEqual(tolerance.Delta_relative);
});

test.each(ofKind('nephelauxeticEstimate'))('estimate of β $id', ({ metal, ligand, expect: wanted, tolerance, source }) => {
  const beta = estimateBeta(complexOf(metal, ligand, 6)) ?? Number.NaN;
  expect(Math.abs(beta - wanted.beta), source).toBeLessThanOrEqual(tolerance.beta);
});

/** A record of observed bands as a request; `free` leaves their terms out. */
function fitRequest({ dCount, geometry, freeIon, complex, bands_cm1 }: Rec, free: boolean): FitRequest {
  const [, element] = /^\[([A-Z][a-z]?)/.exec(complex)!;
  const oxidationState = Number(/(\d)\+$/.exec(freeIon?.ion ?? '')?.[1] ?? (/\]2\+/.test(complex) ? 2 : 3));
  const named = Array.isArray(bands_cm1) ? bands_cm1.map((wavenumber: number) => ['', wavenumber]) : Object.entries(bands_cm1);
  return {
    n: dCount,
    geometry: geometry.startsWith('Td') ? 'T-4' : 'OC-6',
    metal: element,
    oxidationState,
    // The file says high or low spin where both are known of the ion, and takes C = 4B for low spin.
    ...(/(low|high) spin/.test(geometry) ? { spin: /low/.test(geometry) ? 'low' : 'high' } : {}),
    ...(/low/.test(geometry) ? { ratioCB: 4 } : {}),
    bands: named.map(([term, wavenumber]) => ({
      wavenumber: wavenumber as number,
      // 4A1g and the lowest 4Eg of d5 coincide at every field: one band.
      ...(free || term === '' ? {} : { to: (term as string).replace(/^4A1g,4Eg\(G\)$/, '4A1g') }),
    })),
  };
}

const fits = [...ofKind('bandFit'), ...ofKind('singleBand')];
const within = (value: number | null, wanted: number, share: number): boolean => value !== null && Math.abs(value / wanted - 1) <= share;

/** The file's first-order values for low spin have those of complete configuration interaction beside them, which ours is. */
function agrees({ delta, B, C, beta }: FitCandidate, { expect: first, expectFullCI, tolerance }: Rec): boolean {
  const wanted = { ...first, ...expectFullCI };
  return (
    (wanted.Delta_cm1 === undefined || within(delta, wanted.Delta_cm1, tolerance.Delta_relative)) &&
    (wanted.B_cm1 === undefined || within(B, wanted.B_cm1, tolerance.B_relative)) &&
    (wanted.C_cm1 === undefined || within(C, wanted.C_cm1, tolerance.C_relative)) &&
    (expectFullCI !== undefined || wanted.nephelauxeticRatio === undefined || Math.abs((beta ?? Number.NaN) - wanted.nephelauxeticRatio) <= tolerance.nephelauxeticRatio)
  );
}

describe(`fits of assigned bands, ${fits.length} of ${fits.length} worked examples`, () => {
  test.each(fits)('$id $complex', (record) => {
    const [best] = fit(fitRequest(record, false)).candidates;
    expect(agrees(best!, record), `${JSON.stringify(best)}: ${record.source}`).toBe(true);
    if (record.freeIon) {
      expect(best!.freeIon!.B).toBe(record.freeIon.B_cm1);
      expect(record.freeIon.source).toContain(best!.freeIon!.source);
    }
  });
});

describe(`fits of bands without terms, the accepted assignment first in ${fits.length} of ${fits.length}`, () => {
  test.each(fits)('$id $complex', (record) => {
    const [best] = fit(fitRequest(record, true)).candidates;
    expect(agrees(best!, record), `${JSON.stringify(best)}: ${record.source}`).toBe(true);
    const accepted = Array.isArray(record.bands_cm1) ? [/-> (\w+)/.exec(record.transition)![1]] : fitRequest(record, false).bands.map(({ to }) => to);
    expect(best!.assignments.map(({ to }) => to)).toEqual(accepted);
  });
});

test.each(ofKind('dqFromTwoBands'))('two bands of one irrep $id', ({ complex, nu2_cm1, nu3_cm1, expect: wanted, tolerance, source }) => {
  const tetrahedral = complex === '[CoCl4]2-';
  const term = tetrahedral ? '4T1' : '3T1g';
  const [best] = fit({
    n: tetrahedral ? 7 : 8,
    geometry: tetrahedral ? 'T-4' : 'OC-6',
    bands: [nu2_cm1, nu3_cm1].map((wavenumber) => ({ wavenumber, to: term })),
  }).candidates;
  expect(Math.abs(best!.delta! - wanted.Delta_cm1), source).toBeLessThanOrEqual(tolerance.Delta_cm1);
  expect(Math.abs(best!.B! - wanted.B_cm1), source).toBeLessThanOrEqual(tolerance.B_cm1);
});

test.each(ofKind('spectrochemicalPair'))('series $id: $expect.weaker before $expect.stronger', ({ expect: wanted, source }) => {
  const place = (name: string): number => {
    const written = name.replace(/^NCS- \(S-bonded\)$/, 'SCN').replace(/^NCS- \(N-bonded\)$/, 'NCS').replace(/-$/, '');
    const at = (SPECTROCHEMICAL_SERIES as readonly string[]).indexOf(written);
    expect(at, name).toBeGreaterThanOrEqual(0);
    return at;
  };
  expect(place(wanted.weaker), source).toBeLessThan(place(wanted.stronger));
  // Where Jørgensen's table has both, it agrees.
  const [f, other] = [wanted.weaker, wanted.stronger].map((name: string) => ligandFactors(name.replace(/-$/, ''))?.f);
  if (f !== undefined && other !== undefined) expect(f).toBeLessThan(other);
});

test.each(ofKind('metalSeries'))('metals $id: well-separated ions keep their order', ({ expect: wanted, source }) => {
  const places = wanted.split(' < ').map((ion: string, at: number) => ({ at, g: ionFactors(...readIon(ion))?.g }));
  const known = places.filter(({ g }: Rec) => g !== undefined);
  expect(known.length).toBeGreaterThan(10);
  for (const a of known) for (const b of known) if (b.at - a.at >= 4) expect(a.g, source).toBeLessThan(b.g);
});
