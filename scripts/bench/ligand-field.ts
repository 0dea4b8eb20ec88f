import { EigenvalueDecomposition, Matrix as MlMatrix } from 'ml-matrix';
import { CUBIC_FIELD } from '#src/chem/ligand-field/cubic-blocks.ts';
import { diagram } from '#src/chem/ligand-field/diagram.ts';
import { levels } from '#src/chem/ligand-field/levels.ts';
import { combine, type Matrix, zeros } from '#src/chem/ligand-field/matrix.ts';
import { coupledSpace } from '#src/chem/ligand-field/spin-coupling.ts';
import { spinMatrix, spinSpaces } from '#src/chem/ligand-field/spin-spaces.ts';
import type { BenchResult, BenchRow } from '../bench.ts';

const [RATIO, MAX, POINTS] = [4.477, 40, 101];
const ROUNDS = 15;

const median = (times: number[]) => times.sort((a, b) => a - b)[Math.floor(times.length / 2)]!;

function timed(work: () => unknown): number {
  const start = performance.now();
  work();
  return performance.now() - start;
}

/** Both in turns, so that a slow moment of the machine falls on both. `share`: parts of the baseline that were run. */
function inTurns(ours: () => unknown, baseline: () => unknown, share: number, rounds = ROUNDS): BenchResult {
  for (let round = 0; round < 20; round++) ours();
  const times = { ours: [] as number[], baseline: [] as number[] };
  for (let round = 0; round < rounds; round++) {
    times.ours.push(timed(ours));
    times.baseline.push(timed(baseline) / share);
  }
  const [mine, other] = [median(times.ours), median(times.baseline)];
  return { ours: mine, baseline: other, ratio: other / mine };
}

/** All 252 determinants of d⁵ in one dense matrix, at Δ/B. */
function dense(x: number): MlMatrix {
  const { size, components } = coupledSpace(5);
  const matrix = new MlMatrix(size, size);
  for (const { space, offset } of components) {
    const block = spinMatrix(space, combine([[x, CUBIC_FIELD]]), { B: 1, C: RATIO });
    for (let i = 0; i < block.rows; i++) {
      for (let j = 0; j < block.rows; j++) matrix.set(offset + i, offset + j, block.data[i * block.rows + j]!);
    }
  }
  return matrix;
}

const decompose = (matrix: MlMatrix) => new EigenvalueDecomposition(matrix, { assumeSymmetric: true }).realEigenvalues;
const draw = (n: number) => diagram({ n, geometry: 'OC-6', ratioCB: RATIO, max: MAX, points: POINTS });

const octahedron = (
  [
    [0, 0],
    [180, 0],
    [90, 0],
    [90, 90],
    [90, 180],
    [90, 270],
  ] as const
).map(([theta, phi]) => ({ theta, phi, eSigma: theta === 90 ? 7000 : 6000, ePi: theta === 90 ? 800 : 300 }));

function largestBlock(): MlMatrix {
  const field: Matrix = zeros(5);
  for (let i = 0; i < 5; i++)
    for (let j = 0; j <= i; j++) field.data[i * 5 + j] = field.data[j * 5 + i] = 900 * Math.sin(i + 2 * j);
  const space = spinSpaces(5).reduce((a, b) => (b.basis.columns > a.basis.columns ? b : a));
  const block = spinMatrix(space, field, { B: 700, C: 3000 });
  return new MlMatrix(
    Array.from({ length: block.rows }, (_, i) => [...block.data.subarray(i * block.rows, (i + 1) * block.rows)]),
  );
}

const rows: BenchRow[] = [
  {
    name: `diagram of d⁵, ${POINTS} points with its crossings, beside ${POINTS} dense 252 × 252 decompositions (ml-matrix; one timed a round and scaled)`,
    run: () => {
      const matrix = dense(17.3);
      return inTurns(
        () => draw(5),
        () => decompose(matrix),
        1 / POINTS,
        7,
      );
    },
  },
  {
    name: 'diagrams of d² to d⁸, beside one dense d⁵ point',
    run: () => {
      const matrix = dense(17.3);
      return inTurns(
        () => [2, 3, 4, 5, 6, 7, 8].map(draw),
        () => decompose(matrix),
        1,
        7,
      );
    },
  },
  {
    name: 'overlap levels of d⁵ in D4h with labels, beside the bare decomposition of its largest block (75 × 75, ml-matrix)',
    run: () => {
      const block = largestBlock();
      return inTurns(
        () => levels({ n: 5, field: { kind: 'overlap', ligands: octahedron }, B: 700, C: 3000 }),
        () => decompose(block),
        1,
      );
    },
  },
];

export default rows;
