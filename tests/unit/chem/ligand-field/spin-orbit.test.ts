import { describe, expect, test } from 'vitest';
import { hermitianEigen } from '#src/chem/ligand-field/hermitian-eigen.ts';
import { type Field, type LevelsRequest, levels, type ToldLevel } from '#src/chem/ligand-field/levels.ts';
import type { OverlapLigand } from '#src/chem/ligand-field/overlap.ts';
import { doubleGroup } from '#src/chem/symmetry/double-group.ts';
import { spinOrbitComponents } from '#src/chem/symmetry/double-products.ts';

const [B, C] = [830, 3700];
const COUNTS = [1, 2, 3, 4, 5, 6, 7, 8, 9];
const choose = (n: number, k: number): number => (k === 0 ? 1 : (choose(n - 1, k - 1) * n) / k);
const octahedral = (n: number, delta: number, zeta: number, more: Partial<LevelsRequest> = {}): ToldLevel[] =>
  levels({ n, field: { kind: 'cubic', geometry: 'OC-6', delta }, B, C, zeta, ...more }).levels;
const states = (all: readonly ToldLevel[]): number => all.reduce((sum, { degeneracy }) => sum + degeneracy, 0);
const mean = (all: readonly ToldLevel[]): number =>
  all.reduce((sum, { energy, degeneracy }) => sum + energy * degeneracy, 0) / states(all);
/** Energies with all components that coincide to 1e-5 counted as one. */
const merged = (all: readonly ToldLevel[]): { energy: number; degeneracy: number }[] => {
  const found: { energy: number; degeneracy: number }[] = [];
  for (const { energy, degeneracy } of all) {
    const last = found.at(-1);
    if (last && energy - last.energy < 1e-5) last.degeneracy += degeneracy;
    else found.push({ energy, degeneracy });
  }
  return found;
};

const ligandsOf = (axial: number): OverlapLigand[] =>
  [
    [0, 0],
    [180, 0],
    [90, 0],
    [90, 90],
    [90, 180],
    [90, 270],
  ].map(([theta, phi]) => ({
    theta: theta!,
    phi: phi!,
    eSigma: theta === 90 ? 6900 : 6900 * axial,
    ePi: theta === 90 ? 850 : 850 * axial,
  }));

describe('free ions', () => {
  // Landé's interval rule with A = ±ζ/2S: E. U. Condon, G. H. Shortley, The Theory of Atomic Spectra, 1935 (from memory).
  test.each([
    [2, 'F', [2, 3, 4], 1 / 2],
    [3, 'F', [1.5, 2.5, 3.5, 4.5], 1 / 3],
    [4, 'D', [0, 1, 2, 3, 4], 1 / 4],
    [6, 'D', [4, 3, 2, 1, 0], -1 / 4],
    [7, 'F', [4.5, 3.5, 2.5, 1.5], -1 / 3],
    [8, 'F', [4, 3, 2], -1 / 2],
  ] as const)('the ground term of d%i, %s, parts by Landé’s rule in the order of Hund', (n, _, momenta, share) => {
    const all = merged(
      levels({
        n,
        field: { kind: 'cubic', geometry: 'OC-6', delta: 0 },
        B: 1e6,
        C: 4e6,
        zeta: 10,
      }).levels,
    );
    momenta.forEach((J, i) => {
      expect(all[i]!.degeneracy).toBe(2 * J + 1);
      if (i === 0) return;
      const before = momenta[i - 1]!;
      const interval = 10 * share * ((J * (J + 1) - before * (before + 1)) / 2);
      expect((all[i]!.energy - all[i - 1]!.energy) / interval).toBeCloseTo(1, 3);
    });
  });

  test('2D of d1 parts by 5/2 ζ, of d9 the other way', () => {
    const one = merged(octahedral(1, 0, 300));
    expect(one.map(({ degeneracy }) => degeneracy)).toEqual([4, 6]);
    expect(one[1]!.energy).toBeCloseTo(750, 8);
    expect(merged(octahedral(9, 0, 300)).map(({ degeneracy }) => degeneracy)).toEqual([6, 4]);
  });
});

describe('octahedral d1', () => {
  // Γ7 at ζ above t2, Γ8 mixed by √(3/2) ζ: J. S. Griffith, The Theory of Transition-Metal Ions, 1961 (from memory).
  test.each([
    [20_000, 500],
    [3000, 2500],
    [15_000, -400],
  ])('Δ = %d, ζ = %d', (delta, zeta) => {
    const root = Math.hypot(delta + zeta / 2, Math.sqrt(6) * zeta);
    const expected = [
      ['Γ8+', 'G3/2g', (delta - zeta / 2 - root) / 2],
      ['Γ8+', 'G3/2g', (delta - zeta / 2 + root) / 2],
      ['Γ7+', 'E5/2g', zeta],
    ] as const;
    const lowest = Math.min(...expected.map(([, , energy]) => energy));
    const all = octahedral(1, delta, zeta);
    expect(all).toHaveLength(3);
    for (const [irrep, symmetry, energy] of expected) {
      expect(
        all.some((l) => l.irrep === irrep && l.symmetry === symmetry && Math.abs(l.energy - energy + lowest) < 1e-7),
      ).toBe(true);
    }
  });
});

describe('in every field', () => {
  test.each(COUNTS)(
    'd%i keeps its states and its centre of gravity, and comes in Kramers pairs where n is odd',
    (n) => {
      const ligands: OverlapLigand[] = [
        { theta: 12, phi: 40, eSigma: 7100, ePiX: 900, ePiY: -350, psi: 25 },
        { theta: 95, phi: 170, eSigma: 5200, ePi: 400 },
        { theta: 70, phi: 290, eSigma: 6100, ePiX: 0, ePiY: 1100, psi: 80 },
      ];
      const field: Field = { kind: 'overlap', ligands };
      const [without, withIt] = [0, 640].map((zeta) => levels({ n, field, B, C, zeta }).levels);
      expect(states(withIt!)).toBe(choose(10, n));
      // Both count from their own lowest level: the sum of squares about the mean is what ζ adds to, by trace (ζ Σ l·s)².
      const spread = (all: ToldLevel[]): number => {
        const centre = mean(all);
        return all.reduce((sum, { energy, degeneracy }) => sum + degeneracy * (energy - centre) ** 2, 0);
      };
      // Trace of (Σ l·s)² over dⁿ: that of one electron, 15, times the ways of placing it beside the others.
      const traceOfSquare = 15 * choose(8, n - 1);
      expect((spread(withIt!) - spread(without!)) / (640 ** 2 * traceOfSquare)).toBeCloseTo(1, 6);
      if (n % 2 === 1) for (const { degeneracy } of withIt!) expect(degeneracy % 2).toBe(0);
      else expect(withIt!.every(({ degeneracy }) => degeneracy === 1)).toBe(true);
    },
  );

  test.each(COUNTS)('a ζ that vanishes leaves the levels of d%i as they are', (n) => {
    const [without, withIt] = [merged(octahedral(n, 14_200, 0)), merged(octahedral(n, 14_200, 1e-7))];
    expect(withIt.map(({ degeneracy }) => degeneracy)).toEqual(without.map(({ degeneracy }) => degeneracy));
    withIt.forEach(({ energy }, i) => {
      expect(Math.abs(energy - without[i]!.energy)).toBeLessThan(1e-5);
    });
  });

  test.each(COUNTS)('a hole of d%i couples with the other sign', (n) => {
    const holes = levels({
      n: 10 - n,
      field: { kind: 'cubic', geometry: 'T-4', delta: 9000 },
      B,
      C,
      zeta: -500,
    }).levels;
    const electrons = octahedral(n, 9000, 500);
    expect(holes.map(({ degeneracy }) => degeneracy)).toEqual(electrons.map(({ degeneracy }) => degeneracy));
    holes.forEach(({ energy }, i) => {
      expect(Math.abs(energy - electrons[i]!.energy)).toBeLessThan(1e-5);
    });
  });

  const shapes: [string, Field][] = [
    ['Oh', { kind: 'cubic', geometry: 'OC-6', delta: 15_000 }],
    ['Td', { kind: 'cubic', geometry: 'T-4', delta: 6000 }],
    ['D4h', { kind: 'overlap', ligands: ligandsOf(0.6) }],
    [
      'D3h',
      {
        kind: 'overlap',
        ligands: [
          ...[0, 120, 240].map((phi) => ({ theta: 90, phi })),
          { theta: 0, phi: 0 },
          { theta: 180, phi: 0 },
        ].map((l) => ({ ...l, eSigma: 6000, ePi: 500 })),
      },
    ],
    [
      'D3',
      {
        kind: 'overlap',
        ligands: [0, 120, 240].flatMap((phi) => [
          { theta: 54, phi, eSigma: 7000, ePi: 600 },
          { theta: 126, phi: phi + 41, eSigma: 7000, ePi: 600 },
        ]),
      },
    ],
    ['C4v', { kind: 'overlap', ligands: ligandsOf(0.7).slice(1) }],
    [
      'D2d',
      {
        kind: 'overlap',
        ligands: [0, 180].flatMap((phi) => [
          { theta: 65, phi, eSigma: 5000 },
          { theta: 115, phi: phi + 90, eSigma: 5000 },
        ]),
      },
    ],
  ];

  // A weak coupling parts each term into the product of its spin and its orbital irrep.
  test.each(
    shapes.flatMap(([group, field], i) => (i < 3 ? [1, 2, 3, 4, 5] : [2, 3]).map((n) => [group, n, field] as const)),
  )('%s d%i: labels are those of spin times orbital part of every term', (group, n, field) => {
    const count = (labels: string[]) => {
      const counts: Record<string, number> = {};
      for (const label of labels) counts[label] = (counts[label] ?? 0) + 1;
      return counts;
    };
    const without = levels({ n, field, B, C });
    const withIt = levels({ n, field, B, C, zeta: 300 });
    expect([without.group, withIt.group]).toEqual([group, group]);
    const expected = without.levels.flatMap(({ multiplicity, irrep }) =>
      spinOrbitComponents(group, { multiplicity: multiplicity!, irrep: irrep! }).flatMap(
        ({ irrep: part, count: times }) => Array.from({ length: times }, () => part.bethe),
      ),
    );
    expect(count(withIt.levels.map(({ label }) => label!))).toEqual(count(expected));
    const { irreps } = doubleGroup(group);
    for (const { irrep, symmetry, degeneracy } of withIt.levels) {
      const own = irreps.find(({ bethe }) => bethe === irrep);
      expect(own).toMatchObject({ label: symmetry, dimension: degeneracy, spinor: n % 2 === 1 });
    }
  });

  test('a level tells the terms that it is made of', () => {
    const ground = octahedral(3, 17_400, 230)[0]!;
    expect(ground.composition![0]).toEqual({ term: '4A2g', share: expect.closeTo(1, 2) });
    for (const { composition } of octahedral(2, 17_400, 230)) {
      const sum = composition!.reduce((total, { share }) => total + share, 0);
      expect(sum).toBeGreaterThan(0.97);
      expect(sum).toBeLessThan(1 + 1e-9);
    }
  });
});

describe('zero-field splitting of an orbital singlet', () => {
  // Second order: D = 4λ² (1/E(Eg) − 1/E(B2g)), λ = ±ζ/2S: J. S. Griffith 1961, ch. 12 (from memory). It leaves out
  // levels of lower spin, which a large C puts out of reach, and the mixing of the two 4T1 or 3T1 by the distortion.
  test.each([
    [3, 1 / 3, ['Γ7+', 'Γ6+'], 2],
    [8, -1 / 2, ['Γ4+', 'Γ5+'], 1],
  ] as const)('tetragonal d%i', (n, share, [first, second], steps) => {
    const field: Field = { kind: 'overlap', ligands: ligandsOf(0.99) };
    const zeta = 100;
    const request = { n, field, B, C: 2e5 };
    const spinFree = levels(request).levels;
    const top = n === 3 ? 4 : 3;
    const [e, b2] = ['Eg', 'B2g'].map((irrep) => spinFree.find((l) => l.label === `${top}${irrep}`)!.energy);
    const D = 4 * (share * zeta) ** 2 * (1 / e! - 1 / b2!);
    const all = levels({ ...request, zeta }).levels;
    // ±1/2 of d3 and 0 of d8 first; their splitting is 2D and D.
    const [low, high] = [first, second].map((label) => all.find((l) => l.label === label)!.energy);
    expect(Math.abs(D)).toBeGreaterThan(1e-3);
    expect(Math.abs((high! - low!) / (steps * D) - 1)).toBeLessThan(0.02);
  });
});

test.each([
  ['zeta', Number.NaN],
  ['alpha', Number.POSITIVE_INFINITY],
])('%s of %d is refused', (name, value) => {
  expect(() => octahedral(3, 17_400, 0, { [name]: value })).toThrow(
    expect.objectContaining({ name: 'DomainError', field: name }),
  );
});

// α L(L + 1) over the terms of d2 is 12α of F, 2α of P: R. E. Trees, Phys. Rev. 83 (1951) 756 (from memory).
test('Trees’ correction moves each term of the free ion by α L(L + 1)', () => {
  const at = (alpha: number, parent: string, multiplicity: number): number =>
    octahedral(2, 0, 0, { alpha }).find((l) => l.parent === parent && l.multiplicity === multiplicity)!.energy;
  expect(at(50, 'P', 3) - at(0, 'P', 3)).toBeCloseTo(50 * (2 - 12), 6);
  expect(at(50, 'G', 1) - at(0, 'G', 1)).toBeCloseTo(50 * (20 - 12), 6);
  expect(at(50, 'S', 1) - at(0, 'S', 1)).toBeCloseTo(50 * (0 - 12), 6);
});

describe('hermitianEigen', () => {
  test('diagonalises, degenerate or not', () => {
    const n = 9;
    const value = (i: number, j: number): number => Math.sin(1 + 7 * i + 13 * j);
    const re = Float64Array.from({ length: n * n }, (_, k) =>
      value(Math.min(Math.floor(k / n), k % n), Math.max(Math.floor(k / n), k % n)),
    );
    const im = Float64Array.from({ length: n * n }, (_, k) => {
      const [i, j] = [Math.floor(k / n), k % n];
      return i === j ? 0 : Math.sign(i - j) * Math.cos(3 + i * j + i + j);
    });
    const { values, ...vectors } = hermitianEigen(re.slice(), im.slice(), n);
    for (let k = 0; k < n; k++) {
      let norm = 0;
      for (let i = 0; i < n; i++) {
        let [x, y] = [0, 0];
        for (let j = 0; j < n; j++) {
          x += re[i * n + j]! * vectors.re[k * n + j]! - im[i * n + j]! * vectors.im[k * n + j]!;
          y += re[i * n + j]! * vectors.im[k * n + j]! + im[i * n + j]! * vectors.re[k * n + j]!;
        }
        expect(x).toBeCloseTo(values[k]! * vectors.re[k * n + i]!, 12);
        expect(y).toBeCloseTo(values[k]! * vectors.im[k * n + i]!, 12);
        norm += vectors.re[k * n + i]! ** 2 + vectors.im[k * n + i]! ** 2;
      }
      expect(norm).toBeCloseTo(1, 12);
    }
  });

  // σ_y has ±1, twice over in a block diagonal of two.
  test('keeps a degenerate pair orthogonal', () => {
    const im = new Float64Array(16);
    for (const [i, j] of [
      [0, 1],
      [2, 3],
    ]) {
      im[i! * 4 + j!] = -1;
      im[j! * 4 + i!] = 1;
    }
    const { values, re, im: imaginary } = hermitianEigen(new Float64Array(16), im, 4);
    expect([...values].map((x) => Math.round(x * 1e12) / 1e12)).toEqual([-1, -1, 1, 1]);
    let overlap = [0, 0];
    for (let i = 0; i < 4; i++) {
      overlap = [
        overlap[0]! + re[i]! * re[4 + i]! + imaginary[i]! * imaginary[4 + i]!,
        overlap[1]! + re[i]! * imaginary[4 + i]! - imaginary[i]! * re[4 + i]!,
      ];
    }
    expect(Math.hypot(overlap[0]!, overlap[1]!)).toBeLessThan(1e-12);
  });
});
