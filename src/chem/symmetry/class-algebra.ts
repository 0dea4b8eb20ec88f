import { eigenvectors } from './eigenvectors.ts';

/** A finite set of operations with its multiplication, classes and real irreducible characters. */
export interface ClassAlgebra {
  /** Indices of operations by class; the identity's class first. */
  classes: number[][];
  /** Class of each operation. */
  classOf: number[];
  /** `powerClass(k)[c]`: class of the k-th power of the operations of class c. */
  powerClass: (power: number) => number[];
  /** Real characters by class, a complex-conjugate pair as the one sum of both. */
  characters: number[][];
}

/**
 * Multiplication table of a closed set: `table[a][b]` is the index of a·b.
 *
 * @param mark - a number that differs between elements, and is the same for equal ones but for rounding
 */
export function multiplicationTable<T>(
  elements: readonly T[],
  multiply: (a: T, b: T) => T,
  mark: (element: T) => number,
): number[][] {
  const sorted = elements.map((element, i) => ({ mark: mark(element), i })).sort((a, b) => a.mark - b.mark);
  const marks = Float64Array.from(sorted, (entry) => entry.mark);
  const indexOf = (value: number): number => {
    let [low, high] = [0, marks.length - 1];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (marks[middle]! < value) low = middle + 1;
      else high = middle;
    }
    const before = low > 0 && value - marks[low - 1]! < marks[low]! - value;
    return sorted[before ? low - 1 : low]!.i;
  };
  return elements.map((a) => elements.map((b) => indexOf(mark(multiply(a, b)))));
}

/**
 * Classes and characters of a finite group given by its multiplication table.
 *
 * The sums over classes joined with their inverses commute, and in a basis of unit length each multiplies by a
 * symmetric matrix; their common eigenvectors are the characters (Burnside's method; J. D. Dixon, Numer. Math. 10
 * (1967) 446, from memory). One weighted sum of them, the weights having no rational relation, parts all of them.
 *
 * @param times - from `multiplicationTable`, the identity first
 */
export function classAlgebra(times: readonly (readonly number[])[]): ClassAlgebra {
  const inverse = times.map((row) => row.indexOf(0));

  const classOf = times.map(() => -1);
  const classes: number[][] = [];
  times.forEach((_, g) => {
    if (classOf[g]! >= 0) return;
    const members = [...new Set(times.map((row, h) => times[row[g]!]![inverse[h]!]!))].sort((a, b) => a - b);
    for (const member of members) classOf[member] = classes.length;
    classes.push(members);
  });

  const powerClass = (power: number): number[] =>
    classes.map(([g]) => {
      let product = 0;
      for (let k = 0; k < power; k++) product = times[product]![g!]!;
      return classOf[product]!;
    });
  const joined = joinInverses(classes, classOf, inverse);
  const squares = powerClass(2);
  const characters = eigenvectors(weightedSum(joined, times, inverse)).map((vector) => {
    const raw = classes.map((_, c) => vector[joined.of[c]!]! / Math.sqrt(joined.sizes[joined.of[c]!]!));
    const scale = Math.sqrt(times.length) * Math.sign(raw[0]!);
    const real = raw.map((x) => x * scale);
    // Frobenius and Schur: the mean of χ(g²) is 1 for a real irrep, −1 for one with real characters alone, 0 for each of
    // a complex pair.
    const mean = classes.reduce((sum, { length }, c) => sum + length * real[squares[c]!]!, 0) / times.length;
    return real.map((x) => exactCosine(Math.abs(mean) > 0.5 ? x : x * Math.SQRT2));
  });
  return { classes, classOf, powerClass, characters };
}

interface JoinedClasses {
  /** Joined class of each class. */
  of: number[];
  sizes: number[];
  /** Joined class of each operation. */
  ofOperation: number[];
  /** One operation of each. */
  representatives: number[];
}

function joinInverses(
  classes: readonly number[][],
  classOf: readonly number[],
  inverse: readonly number[],
): JoinedClasses {
  const lower = classes.map(([g], c) => Math.min(c, classOf[inverse[g!]!]!));
  const kept = [...new Set(lower)];
  const of = lower.map((c) => kept.indexOf(c));
  const sizes = kept.map((_, j) => classes.reduce((sum, { length }, c) => sum + (of[c] === j ? length : 0), 0));
  return { of, sizes, ofOperation: classOf.map((c) => of[c]!), representatives: kept.map((c) => classes[c]![0]!) };
}

function weightedSum(
  { sizes, ofOperation, representatives }: JoinedClasses,
  times: readonly (readonly number[])[],
  inverse: readonly number[],
): number[][] {
  const weight = (j: number): number => Math.sqrt(primes[j]!) / sizes[j]!;
  const sum = sizes.map(() => sizes.map(() => 0));
  representatives.forEach((z, c) => {
    ofOperation.forEach((a, g) => {
      const b = ofOperation[times[inverse[g]!]![z]!]!;
      sum[b]![c]! += weight(a) * Math.sqrt(sizes[c]! / sizes[b]!);
    });
  });
  return sum;
}

const primes = [2, 3, 5, 7, 11, 13, 17, 19, 23, 29, 31, 37, 41, 43, 47, 53, 59, 61, 67, 71, 73, 79];

/** The integer or the 2 cos(2πk/m) that a computed character stands for. */
export function exactCosine(value: number): number {
  const near = Math.round(value);
  if (Math.abs(value - near) < 1e-6) return near || 0;
  for (const m of [10, 12, 14, 16, 20, 24, 28, 32]) {
    for (let k = 1; k < m; k++) {
      const cosine = 2 * Math.cos((2 * Math.PI * k) / m);
      if (Math.abs(value - cosine) < 1e-6) return cosine;
    }
  }
  throw new Error(`${value} is no character of a point group in the list`);
}
