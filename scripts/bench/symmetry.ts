import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { doubleGroup, generateDoubleGroup } from '../../src/chem/symmetry/double-group.ts';
import { finiteGroup, generateGroup } from '../../src/chem/symmetry/finite-group.ts';
import { finiteSymbols } from '../../src/chem/symmetry/generators.ts';
import type { BenchRow } from '../bench.ts';

const ROUNDS = 15;

const median = (times: number[]) => times.sort((a, b) => a - b)[Math.floor(times.length / 2)]!;

function timed(work: () => unknown): number {
  const start = performance.now();
  work();
  return performance.now() - start;
}

/** Matrices of one group, as many and as large as its table needs. */
interface Sizes {
  /** All operations below each other, and beside each other: their product holds every product of two. */
  column: Matrix;
  row: Matrix;
  /** Symmetric, one row a class. */
  classes: Matrix;
}

/** @param dimension - of the matrices of the operations: 3 in space, 2 for spin */
function sizesOf(order: number, classes: number, dimension: number): Sizes {
  const value = (i: number, j: number) => Math.sin(1 + 7 * i + 3 * j);
  const filled = (rows: number, columns: number) =>
    new Matrix(Array.from({ length: rows }, (_, i) => Array.from({ length: columns }, (_, j) => value(i, j))));
  const square = filled(classes, classes);
  return {
    column: filled(dimension * order, dimension),
    row: filled(dimension, dimension * order),
    classes: Matrix.add(square, square.transpose()),
  };
}

/**
 * Every character table of a finite group and of its double group generated anew from its operations, beside the dense
 * linear algebra of the same sizes alone: all products of two operations, and one decomposition a table.
 */
const row: BenchRow = {
  name: `all ${2 * finiteSymbols.length} character tables of finite groups, beside dense linear algebra of their sizes`,
  run() {
    const sizes = finiteSymbols.flatMap((symbol) => {
      const [single, double] = [finiteGroup(symbol)!, doubleGroup(symbol)];
      return [sizesOf(single.order, single.classes.length, 3), sizesOf(double.order, double.classes.length, 2)];
    });
    const generateAll = () => finiteSymbols.map((symbol) => [generateGroup(symbol), generateDoubleGroup(symbol)]);
    const decomposeAll = () =>
      sizes.map(({ column, row, classes }) => [
        column.mmul(row),
        new EigenvalueDecomposition(classes, { assumeSymmetric: true }),
      ]);
    // Once each before timing, then in turns, so that a slow moment of the machine falls on both.
    generateAll();
    decomposeAll();
    const [ours, baseline]: [number[], number[]] = [[], []];
    for (let round = 0; round < ROUNDS; round++) {
      ours.push(timed(generateAll));
      baseline.push(timed(decomposeAll));
    }
    return { ours: median(ours), baseline: median(baseline), ratio: median(baseline) / median(ours) };
  },
};

export default row;
