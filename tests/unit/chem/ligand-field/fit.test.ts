import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { possibleGrounds } from '#src/chem/ligand-field/fit/ground.ts';
import { targetEnergies, targetTable } from '#src/chem/ligand-field/fit/targets.ts';
import { type FitCandidate, type FitRequest, fit } from '#src/chem/ligand-field/index.ts';
import { leastSquares } from '#src/chem/ligand-field/least-squares.ts';
import { type CubicGeometry, levels } from '#src/chem/ligand-field/levels.ts';

/** Made-up bands of a complex with these values: its lowest spin-allowed levels. */
function bandsOf(n: number, geometry: CubicGeometry, delta: number, B: number, C: number): FitRequest['bands'] {
  const { levels: all } = levels({ n, field: { kind: 'cubic', geometry, delta }, B, C });
  const ground = all[0]!;
  return all
    .slice(1)
    .filter(({ multiplicity }) => multiplicity === ground.multiplicity)
    .map(({ energy, label }) => ({ wavenumber: energy, to: label! }));
}
const without = (bands: FitRequest['bands']): FitRequest['bands'] => bands.map(({ wavenumber }) => ({ wavenumber }));
const numbersOf = (value: unknown): number[] =>
  typeof value === 'number'
    ? [value]
    : value && typeof value === 'object'
      ? Object.values(value).flatMap(numbersOf)
      : [];

describe('a fit gives back what made the bands', () => {
  test.each([
    [2, 'OC-6', 17_900, 640],
    [2, 'T-4', 9000, 600],
    [3, 'OC-6', 17_400, 700],
    [3, 'CU-8', 7000, 700],
    [7, 'OC-6', 9100, 880],
    [7, 'T-4', 3500, 740],
    [8, 'OC-6', 8600, 900],
    [8, 'T-4', 3700, 780],
  ] as const)('d%i %s, terms told or not', (n, geometry, delta, B) => {
    const bands = bandsOf(n, geometry, delta, B, 4.5 * B).slice(0, 3);
    for (const asked of [bands, without(bands)]) {
      const [best] = fit({ n, geometry, ratioCB: 4.5, bands: asked }).candidates;
      expect(best!.delta).toBeCloseTo(delta, 3);
      expect(best!.B).toBeCloseTo(B, 3);
      expect(best!.C).toBeCloseTo(4.5 * B, 3);
      expect(best!.rms).toBeLessThan(1e-5);
      expect(best!.converged).toBe(true);
      expect(best!.assignments.map(({ to }) => to.replace(/\(.\)/, ''))).toEqual(bands.map(({ to }) => to));
    }
  });

  test.each([
    [1, 'OC-6', undefined],
    [4, 'OC-6', 'high'],
    [6, 'OC-6', 'high'],
    [9, 'OC-6', undefined],
    [6, 'T-4', 'high'],
  ] as const)('d%i %s has one spin-allowed band, which gives Δ alone', (n, geometry, spin) => {
    const [best] = fit({ n, geometry, spin, bands: [{ wavenumber: 11_300 }] }).candidates;
    expect(best).toMatchObject({
      delta: expect.closeTo(11_300, 6),
      B: null,
      C: null,
      beta: null,
      rms: expect.closeTo(0, 6),
    });
  });

  test.each([
    [4, 26_000],
    [5, 30_000],
    [6, 23_000],
    [7, 24_000],
  ])('d%i low spin with its lowest bands told', (n, delta) => {
    const { levels: all } = levels({ n, field: { kind: 'cubic', geometry: 'OC-6', delta }, B: 560, C: 2400 });
    const seen = new Set<string>();
    const bands = all
      .slice(1)
      .filter(({ multiplicity, label }) => {
        const first = multiplicity === all[0]!.multiplicity && label !== all[0]!.label && !seen.has(label!);
        if (first) seen.add(label!);
        return first;
      })
      .slice(0, 3)
      .map(({ energy, label }) => ({ wavenumber: energy, to: label! }));
    const [best] = fit({ n, geometry: 'OC-6', spin: 'low', ratioCB: 2400 / 560, bands }).candidates;
    expect(best!.delta! / delta).toBeCloseTo(1, 6);
    expect(best!.B!).toBeCloseTo(560, 3);
    expect(best).toMatchObject({ spin: 'low', ground: all[0]!.label });
  });

  test('C too, where a spin-forbidden band bears it', () => {
    const { levels: all } = levels({
      n: 3,
      field: { kind: 'cubic', geometry: 'OC-6', delta: 17_400 },
      B: 700,
      C: 3250,
    });
    const wanted = ['2Eg', '4T2g', '4T1g', '2T2g'];
    const bands = wanted.map((to) => ({ wavenumber: all.find(({ label }) => label === to)!.energy, to }));
    const free = fit({ n: 3, geometry: 'OC-6', bands }).candidates[0]!;
    expect(free).toMatchObject({ ratioSource: 'fitted', degreesOfFreedom: 1 });
    expect(free.C!).toBeCloseTo(3250, 2);
    expect(free.ratioCB!).toBeCloseTo(3250 / 700, 5);
    const tied = fit({ n: 3, geometry: 'OC-6', ratioCB: 4, bands }).candidates[0]!;
    expect(tied).toMatchObject({ ratioSource: 'given', ratioCB: 4, degreesOfFreedom: 2 });
    expect(tied.C).toBeCloseTo(4 * tied.B!, 9);
    expect(tied.errors.C).toBeNull();
  });

  test('spin-allowed bands do not bear C', () => {
    const bands = bandsOf(3, 'OC-6', 17_400, 700, 3000);
    expect(fit({ n: 3, geometry: 'OC-6', bands }).candidates[0]).toMatchObject({
      ratioSource: 'assumed',
      ratioCB: 4.5,
    });
    const chromium = fit({ n: 3, geometry: 'OC-6', metal: 'V', oxidationState: 3, bands }).candidates[0];
    expect(chromium).toMatchObject({ ratioSource: 'free ion', ratioCB: 4.42, freeIon: { B: 861 } });
  });
});

describe('standard errors', () => {
  const bands = [
    { wavenumber: 17_400, to: '4T2g' },
    { wavenumber: 24_500, to: '4T1g(F)' },
  ];
  test('come from the uncertainties where no degree of freedom is left, or are null', () => {
    expect(fit({ n: 3, geometry: 'OC-6', bands }).candidates[0]!.errors).toEqual({ delta: null, B: null, C: null });
    const half = [{ ...bands[0]!, uncertainty: 80 }, bands[1]!];
    expect(fit({ n: 3, geometry: 'OC-6', bands: half }).candidates[0]!.errors.delta).toBeNull();
    const told = bands.map((band) => ({ ...band, uncertainty: 80 }));
    const { errors, correlation, delta, B } = fit({ n: 3, geometry: 'OC-6', bands: told }).candidates[0]!;
    // Δ is the first band itself; B by moving each band by its uncertainty and fitting again.
    expect(errors.delta).toBeCloseTo(80, 6);
    const moved = [0, 1].map((which) => {
      const other = told.map((band, i) => (i === which ? { ...band, wavenumber: band.wavenumber + 0.8 } : band));
      return fit({ n: 3, geometry: 'OC-6', bands: other }).candidates[0]!;
    });
    const slopes = moved.map((candidate) => ((candidate.B! - B!) / 0.8) * 80);
    expect(errors.B! / Math.hypot(...slopes)).toBeCloseTo(1, 3);
    const shared = moved.reduce((sum, candidate, i) => sum + ((candidate.delta! - delta!) / 0.8) * 80 * slopes[i]!, 0);
    expect(correlation.deltaB).toBeCloseTo(shared / (errors.delta! * errors.B!), 3);
  });

  test('come from the residuals where there are more bands than parameters, and grow with them', () => {
    const third = (off: number) =>
      [...bands, { wavenumber: 38_700 + off, to: '4T1g(P)' }].map((b) => ({ ...b, uncertainty: 100 }));
    const [near, far] = [0, 2000].map((off) => fit({ n: 3, geometry: 'OC-6', bands: third(off) }).candidates[0]!);
    expect(near!.degreesOfFreedom).toBe(1);
    expect(near!.errors.B!).toBeGreaterThan(0);
    expect(far!.errors.B!).toBeGreaterThan(near!.errors.B!);
  });

  test('a certain band outweighs an uncertain one', () => {
    const weighted = (first: number, last: number) =>
      fit({
        n: 8,
        geometry: 'OC-6',
        bands: [
          { wavenumber: 8500, to: '3T2g', uncertainty: first },
          { wavenumber: 13_800, to: '3T1g(F)', uncertainty: 100 },
          { wavenumber: 25_300, to: '3T1g(P)', uncertainty: last },
        ],
      }).candidates[0]!;
    expect(Math.abs(weighted(1, 1000).assignments[0]!.residual)).toBeLessThan(0.5);
    expect(Math.abs(weighted(1000, 1).assignments[2]!.residual)).toBeLessThan(0.5);
  });
});

describe('terms as people write them', () => {
  test('a repeated term is its n-th level above the ground in rising order', () => {
    const bands = [
      { wavenumber: 38_700, to: '4T1g' },
      { wavenumber: 17_400, to: '4T2g' },
      { wavenumber: 24_500, to: '4T1g' },
    ];
    const [best] = fit({ n: 3, geometry: 'OC-6', bands }).candidates;
    expect(best!.assignments.map(({ to, level }) => [to, level])).toEqual([
      ['4T1g(P)', 2],
      ['4T2g', 1],
      ['4T1g(F)', 1],
    ]);
  });

  test('the parent names the level; the ground itself is not counted', () => {
    const bands = [
      { wavenumber: 25_700, to: '3T1g(P)' },
      { wavenumber: 17_800, to: '3T2g' },
    ];
    const plain = bands.map(({ wavenumber, to }) => ({ wavenumber, to: to.replace('(P)', '') }));
    expect(fit({ n: 2, geometry: 'OC-6', bands }).candidates[0]).toEqual(
      fit({ n: 2, geometry: 'OC-6', bands: plain }).candidates[0],
    );
  });

  const one = (to: string) => [{ wavenumber: 17_000, to }, { wavenumber: 25_000 }];
  test.each<[Partial<FitRequest>, string, RegExp]>([
    [{ bands: one('4T3g') }, 'bands/0/to', /no level 4T3g above the ground 4A2g/],
    [{ bands: one('3T2g') }, 'bands/0/to', /Spin-allowed ones are 4T1g, 4T2g/],
    [{ bands: one('4A2g') }, 'bands/0/to', /is the ground level/],
    [{ bands: one('4T2') }, 'bands/0/to', /no level/],
    [{ bands: one('blue') }, 'bands/0/to', /write it like/],
    [{ bands: [...one('4T2g'), { wavenumber: 20_000, to: '4T2g' }] }, 'bands/2/to', /more bands than that/],
    [{ bands: one('4T1g(G)') }, 'bands/0/to', /leave the brackets out/],
    [{ spin: 'low', bands: one('4T2g') }, 'spin', /no low-spin state/],
    [{ bands: [] }, 'bands', /1 to 12 bands/],
    [{ bands: [{ wavenumber: 24_000, to: '4T1g(F)' }] }, 'bands', /add a second/],
    [{ bands: [{ wavenumber: Number.NaN }] }, 'bands/0/wavenumber', /above 0/],
    [{ bands: [{ wavenumber: 1, uncertainty: 0 }] }, 'bands/0/uncertainty', /above 0/],
    [{ n: 0, bands: one('4T2g') }, 'n', /1 to 9/],
    [{ geometry: 'SP-4' as 'OC-6', bands: one('4T2g') }, 'geometry', /OC-6, T-4 or CU-8/],
    [{ ratioCB: -1, bands: one('4T2g') }, 'ratioCB', /above 0/],
  ])('%o is refused at %s', (part, field, message) => {
    const request: FitRequest = { n: 3, geometry: 'OC-6', bands: [], ...part };
    expect(() => fit(request)).toThrow(
      expect.objectContaining({ name: 'DomainError', field, message: expect.stringMatching(message) }),
    );
  });
});

describe('candidates', () => {
  test('come in different assignments, no level twice, and tell what speaks against them', () => {
    const { candidates } = fit({
      n: 7,
      geometry: 'OC-6',
      metal: 'Co',
      oxidationState: 2,
      bands: [{ wavenumber: 8100 }, { wavenumber: 19_600 }],
    });
    expect(candidates.length).toBeGreaterThan(2);
    // [Co(H2O)6]2+: 4T2g and 4T1g(P) are the two bands seen (common practice).
    expect(candidates[0]!.assignments.map(({ to }) => to)).toEqual(['4T2g', '4T1g(P)']);
    for (const { assignments } of candidates) {
      expect(new Set(assignments.map(({ to, level }) => `${to} ${level}`)).size).toBe(2);
      expect(assignments[0]!.calculated).toBeLessThanOrEqual(assignments[1]!.calculated);
    }
    expect(candidates.slice(1).every(({ remarks }: FitCandidate) => Array.isArray(remarks))).toBe(true);
    expect(candidates.some(({ remarks }) => remarks.length > 0)).toBe(true);
  });

  // Bands and assignments of aqua and ammine ions as the textbooks print them: A. B. P. Lever, Inorganic Electronic
  // Spectroscopy, 2nd ed., Elsevier 1984; B. N. Figgis, M. A. Hitchman, Wiley-VCH 2000 (from memory).
  test.each([
    ['Mn', 2, 5, [18_870, 23_120, 24_960, 27_980, 29_750], ['4T1g(G)', '4T2g(G)', '4A1g', '4T2g(D)', '4Eg(D)']],
    ['Cr', 3, 3, [15_000, 17_400, 24_500, 37_800], ['2Eg', '4T2g', '4T1g(F)', '4T1g(P)']],
    ['V', 3, 2, [17_200, 25_600, 36_000], ['3T2g', '3T1g(P)', '3A2g']],
    ['Ni', 2, 8, [8500, 13_800, 15_300, 25_300], ['3T2g', '3T1g(F)', '1Eg', '3T1g(P)']],
    ['Co', 3, 6, [13_000, 21_000, 29_500], ['3T1g', '1T1g', '1T2g']],
  ] as const)(
    '%s(%i), d%i: spin-forbidden bands among the others find their place',
    (metal, oxidationState, n, bands, terms) => {
      const asked = bands.map((wavenumber) => ({ wavenumber }));
      const [best] = fit({ n, geometry: 'OC-6', metal, oxidationState, bands: asked }).candidates;
      expect(best!.assignments.map(({ to }) => to)).toEqual(terms);
    },
  );

  test('the spin told decides the ground', () => {
    const bands = [{ wavenumber: 21_000 }, { wavenumber: 29_500 }];
    for (const spin of ['high', 'low'] as const) {
      const { candidates } = fit({ n: 6, geometry: 'OC-6', spin, bands });
      expect(candidates.every((candidate) => candidate.ground === (spin === 'low' ? '1A1g' : '5T2g'))).toBe(true);
    }
  });

  // Whatever is asked, an answer holds finite numbers or is a refusal that says where.
  test('never a NaN', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 9 }),
        fc.constantFrom<CubicGeometry>('OC-6', 'T-4', 'CU-8'),
        fc.array(fc.double({ min: 1, max: 60_000, noNaN: true }), { minLength: 1, maxLength: 3 }),
        fc.boolean(),
        (n, geometry, wavenumbers, certain) => {
          const bands = wavenumbers.map((wavenumber) => ({ wavenumber, ...(certain ? { uncertainty: 50 } : {}) }));
          try {
            const { candidates } = fit({ n, geometry, bands });
            expect(candidates.length).toBeGreaterThan(0);
            expect(numbersOf(candidates).every(Number.isFinite)).toBe(true);
          } catch (error) {
            expect(error).toMatchObject({ name: 'DomainError', field: 'bands' });
          }
        },
      ),
      { numRuns: 25, seed: 11 },
    );
  });
});

test.each([2, 3, 5, 6, 8])('derivatives of the levels of d%i are those of small steps', (n) => {
  const [ground] = possibleGrounds(n, 'OC-6', undefined, 4.5);
  const table = targetTable(n, 'OC-6', ground!, 4.5);
  const at = { delta: 12_300, B: 741, C: 3120 };
  const here = targetEnergies(table, table.targets, at);
  (['delta', 'B', 'C'] as const).forEach((name, i) => {
    const step = 0.01;
    const [up, down] = [step, -step].map((by) =>
      targetEnergies(table, table.targets, { ...at, [name]: at[name] + by }),
    );
    here.forEach(({ gradient }, t) => {
      expect(Math.abs((up![t]!.energy - down![t]!.energy) / (2 * step) - gradient[i]!)).toBeLessThan(1e-5);
    });
  });
});

describe('leastSquares', () => {
  const line = (x: readonly number[]) => (p: readonly number[]) => ({
    values: x.map((t) => p[0]! + p[1]! * t),
    gradients: x.map((t) => [1, t]),
  });
  test('a straight line, by hand', () => {
    const problem = {
      model: line([0, 1, 2]),
      observed: [1, 2, 4],
      weights: [1, 1, 1],
      start: [10, -3],
      lower: [-100, -100],
      upper: [100, 100],
    };
    const { parameters, sum, converged } = leastSquares(problem);
    expect(parameters[0]).toBeCloseTo(5 / 6, 9);
    expect(parameters[1]).toBeCloseTo(1.5, 9);
    expect(sum).toBeCloseTo(1 / 6, 9);
    expect(converged).toBe(true);
  });

  test('stays within its bounds', () => {
    const bounded = leastSquares({
      model: line([0, 1, 2]),
      observed: [1, 2, 4],
      weights: [1, 1, 1],
      start: [0, 0],
      lower: [0, 0],
      upper: [0.5, 1.6],
    });
    expect(bounded.parameters[0]).toBeLessThanOrEqual(0.5);
    expect(bounded.parameters[1]).toBeLessThanOrEqual(1.6);
  });
});
