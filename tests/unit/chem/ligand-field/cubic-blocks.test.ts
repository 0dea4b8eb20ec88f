import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { BlockSweep } from '#src/chem/ligand-field/block-sweep.ts';
import { blockEnergies, CUBIC_FIELD, cubicBlocks } from '#src/chem/ligand-field/cubic-blocks.ts';
import { fieldEnergies } from '#src/chem/ligand-field/field-levels.ts';
import { freeIonTerms } from '#src/chem/ligand-field/free-ion.ts';
import { groundLevels } from '#src/chem/ligand-field/ground-crossings.ts';
import { levels } from '#src/chem/ligand-field/levels.ts';
import { combine } from '#src/chem/ligand-field/matrix.ts';
import { cubicFieldSetting } from '#src/chem/ligand-field/overlap-group.ts';

const COUNTS = [1, 2, 3, 4, 5, 6, 7, 8, 9];
const strengths = fc.record({
  delta: fc.double({ min: -30_000, max: 30_000, noNaN: true }),
  B: fc.double({ min: 0, max: 1200, noNaN: true }),
  C: fc.double({ min: 0, max: 5000, noNaN: true }),
});

const blockLevels = (n: number, at: { delta: number; B: number; C: number }) =>
  cubicBlocks(n).flatMap((block) =>
    blockEnergies(block, at).map((energy) => ({
      energy,
      multiplicity: block.multiplicity,
      dimension: block.dimension,
      label: `${block.multiplicity}${block.irrep}g`,
    })),
  );

describe('blocks of spin and irrep', () => {
  test.each(COUNTS)('agree with the determinants of d%i to 1e-6 cm⁻¹', (n) => {
    fc.assert(
      fc.property(strengths, (at) => {
        const expand = (all: { energy: number; states: number }[]): number[] =>
          all.flatMap(({ energy, states }) => Array.from({ length: states }, () => energy)).sort((a, b) => a - b);
        const blocks = expand(
          blockLevels(n, at).map((l) => ({ energy: l.energy, states: l.multiplicity * l.dimension })),
        );
        const determinants = expand(
          fieldEnergies(n, combine([[at.delta, CUBIC_FIELD]]), at, null).map((l) => ({
            energy: l.energy,
            states: l.degeneracy,
          })),
        );
        expect(blocks).toHaveLength(determinants.length);
        // Levels of one spin that come within 1e-6 of field and repulsion are one entry there, with their mean.
        const slack = 1e-6 + 1e-6 * (Math.abs(at.delta) + at.B + at.C);
        blocks.forEach((energy, i) => {
          expect(Math.abs(energy - determinants[i]!)).toBeLessThan(slack);
        });
      }),
      { numRuns: n === 4 || n === 5 || n === 6 ? 5 : 15, seed: 7 },
    );
  });

  test.each(COUNTS)('carry the labels that the determinants of d%i have in Oh', (n) => {
    const at = { delta: 13_700, B: 811, C: 3333 };
    const told = fieldEnergies(n, combine([[at.delta, CUBIC_FIELD]]), at, cubicFieldSetting('Oh'));
    const key = (label: string | null, energy: number) => `${label} ${energy.toFixed(4)}`.replace('-0.0000', '0.0000');
    const blocks = blockLevels(n, at).map(({ label, energy }) => ({ label, energy }));
    expect(blocks.map((l) => key(l.label, l.energy)).sort()).toEqual(told.map((l) => key(l.label, l.energy)).sort());
    // And to 1e-6 cm⁻¹ one by one.
    const sorted = (all: readonly { label: string | null; energy: number }[]) =>
      [...all].sort((a, b) => `${a.label}`.localeCompare(`${b.label}`) || a.energy - b.energy);
    sorted(blocks).forEach(({ energy }, i) => {
      expect(Math.abs(energy - sorted(told)[i]!.energy)).toBeLessThan(1e-6);
    });
  });

  test('have at most ten rows, and a diagonal field', () => {
    for (const n of COUNTS) {
      for (const { field, upper } of cubicBlocks(n)) {
        expect(field.rows).toBeLessThanOrEqual(10);
        expect(upper).toEqual([...upper].sort((a, b) => a - b));
        field.data.forEach((x, k) => {
          if (k % (field.rows + 1) !== 0) expect(x).toBe(0);
        });
      }
    }
  });

  test.each(COUNTS)('the field has no trace over the states of d%i, spin by spin', (n) => {
    for (const multiplicity of new Set(cubicBlocks(n).map((block) => block.multiplicity))) {
      const trace = cubicBlocks(n)
        .filter((block) => block.multiplicity === multiplicity)
        .reduce(
          (sum, { field, dimension }) =>
            sum + dimension * field.data.reduce((t, x, k) => t + (k % (field.rows + 1) === 0 ? x : 0), 0),
          0,
        );
      expect(Math.abs(trace)).toBeLessThan(1e-9);
    }
  });

  test.each(COUNTS)('electrons of d%i in an octahedron are holes in a tetrahedron', (n) => {
    fc.assert(
      fc.property(strengths, ({ delta, B, C }) => {
        const relative = (all: ReturnType<typeof blockLevels>): number[] => {
          const energies = all.map(({ energy }) => energy).sort((a, b) => a - b);
          return energies.map((energy) => energy - energies[0]!);
        };
        const [electrons, holes] = [
          relative(blockLevels(n, { delta, B, C })),
          relative(blockLevels(10 - n, { delta: -delta, B, C })),
        ];
        electrons.forEach((energy, i) => {
          expect(Math.abs(energy - holes[i]!)).toBeLessThan(1e-6);
        });
      }),
      { numRuns: 10, seed: 3 },
    );
  });

  test.each(COUNTS)('a field that vanishes leaves the terms of the free d%i', (n) => {
    const [B, C] = [913, 4001];
    const terms = freeIonTerms(n, B, C);
    for (const { energy, multiplicity } of blockLevels(n, { delta: 1e-9, B, C })) {
      const nearest = Math.min(
        ...terms.filter((t) => t.multiplicity === multiplicity).map((t) => Math.abs(t.energy - energy)),
      );
      expect(nearest).toBeLessThan(1e-6);
    }
  });

  // Strong-field matrices of d²: Y. Tanabe, S. Sugano, J. Phys. Soc. Jpn. 9 (1954) 753; J. S. Griffith 1961 (from memory).
  test.each([
    ['1T2', 'B + 2C', [1, 2], [0, 2], 2 * Math.sqrt(3)],
    ['1E', 'B + 2C, 2C', [1, 2], [0, 2], 2 * Math.sqrt(3)],
  ])('%s of d2', (term, _, [b1, c1], [b2, c2], off) => {
    const [B, C, delta] = [917, 4133, 18_900];
    const block = cubicBlocks(2).find(({ multiplicity, irrep }) => `${multiplicity}${irrep}` === term)!;
    const first = b1! * B + c1! * C - 0.8 * delta;
    const second = b2! * B + c2! * C + (term === '1T2' ? 0.2 : 1.2) * delta;
    const half = Math.hypot((first - second) / 2, off * B);
    const found = blockEnergies(block, { delta, B, C });
    [(first + second) / 2 - half, (first + second) / 2 + half].forEach((energy, i) => {
      expect(Math.abs(found[i]! / energy - 1)).toBeLessThan(1e-8);
    });
  });

  // Field-independent quartets above 6A1 of d⁵: 10B + 5C, 17B + 5C, 22B + 7C, in every textbook (common practice).
  test('4A1, 4E and 4A2 of d5 do not feel the field', () => {
    const [B, C] = [917, 4133];
    for (const delta of [0, 4000, 21_000, -9000]) {
      const all = blockLevels(5, { delta, B, C });
      const ground = all.find(({ label }) => label === '6A1g')!.energy;
      const above = (label: string): number[] =>
        all.filter((l) => l.label === label).map(({ energy }) => energy - ground);
      const expected = { '4A1g': [10 * B + 5 * C], '4A2g': [22 * B + 7 * C], '4Eg': [10 * B + 5 * C, 17 * B + 5 * C] };
      for (const [label, energies] of Object.entries(expected)) {
        above(label).forEach((energy, i) => {
          expect(Math.abs(energy / energies[i]! - 1)).toBeLessThan(1e-8);
        });
      }
    }
  });
});

test.each(COUNTS)('shares of the configurations of d%i sum to one, and rise to one in a strong field', (n) => {
  for (const { configurations } of levels({
    n,
    field: { kind: 'cubic', geometry: 'OC-6', delta: 15_000 },
    B: 800,
    C: 3500,
  }).levels) {
    expect(configurations!.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 12);
  }
  const [ground] = levels({ n, field: { kind: 'cubic', geometry: 'OC-6', delta: 1e7 }, B: 800, C: 3500 }).levels;
  const best = ground!.configurations!.reduce((a, b) => (b.share > a.share ? b : a));
  expect(best.configuration).toBe(`t2g${Math.min(n, 6)} eg${Math.max(0, n - 6)}`);
  expect(best.share).toBeGreaterThan(0.999);
});

describe('ground levels', () => {
  test.each(COUNTS.flatMap((n) => [1, -1].map((sign) => [n, sign as 1 | -1] as const)))(
    'd%i with sign %i: those of a close grid',
    (n, sign) => {
      const sweeps = cubicBlocks(n).map((block) => new BlockSweep(block, sign, 1, 4.5));
      const { first, changes } = groundLevels(sweeps, 60);
      const values = new Float64Array(10);
      const lowest = (x: number): number => {
        const energies = sweeps.map((sweep) => {
          sweep.energies(x, values);
          return values[0]!;
        });
        return energies.indexOf(Math.min(...energies));
      };
      for (let x = 0.05; x <= 60; x += 0.05) {
        const told = changes.filter((change) => change.x <= x).at(-1)?.to ?? first;
        if (changes.every((change) => Math.abs(change.x - x) > 1e-3)) expect(told).toBe(lowest(x));
      }
    },
  );
});
