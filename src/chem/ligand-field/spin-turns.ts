import type { Matrix3, Vector3 } from '../geometry/vector.ts';
import { apply, transpose } from '../geometry/vector.ts';
import type { DoubleGroup } from '../symmetry/double-group.ts';
import { doubleGroup } from '../symmetry/double-group.ts';
import { rotation } from '../symmetry/matrices.ts';
import { rotateOrbitals } from './d-orbitals.ts';
import type { Matrix } from './matrix.ts';

type Quaternion = readonly [w: number, x: number, y: number, z: number];

/** A turn of space together with one of the two turns of spin over it. */
export interface DoubleTurn {
  turn: Quaternion;
  orbitals: Matrix;
}

/** The double group of a field with the turns that its classes make, in the frame of the field. */
export interface DoubleSetting {
  group: DoubleGroup;
  /** By class. Inversion does nothing to d electrons or spin and is left out. */
  turns: DoubleTurn[];
}

/**
 * @param axes - rows: x, y and z of the group's standard setting in the frame of the field
 * @throws DomainError as `doubleGroup`
 */
export function doubleSetting(symbol: string, axes: Matrix3): DoubleSetting {
  const group = doubleGroup(symbol);
  const intoFrame = transpose(axes);
  const turns = group.classes.map(({ representative: { turn } }) => {
    const [w, ...part] = turn;
    const [x, y, z] = apply(intoFrame, part as Vector3);
    return { turn: [w, x, y, z] as const, orbitals: rotateOrbitals(rotationOf([w, x, y, z])) };
  });
  return { group, turns };
}

function rotationOf([w, x, y, z]: Quaternion): Matrix3 {
  const sine = Math.hypot(x, y, z);
  if (sine < 1e-9) return rotation([0, 0, 1], 0);
  return rotation([x, y, z], 2 * Math.atan2(sine, w));
}

/** A square complex matrix, row after row. */
export interface ComplexMatrix {
  re: Float64Array;
  im: Float64Array;
}

const factorial = (n: number): number => (n <= 1 ? 1 : n * factorial(n - 1));

/**
 * What a turn does to the states |S, M⟩, M falling from S, with the phases of Condon and Shortley.
 *
 * A state is uˢ⁺ᴹ vˢ⁻ᴹ / √((S+M)!(S−M)!) in two spinors u and v, each of which turns by w − i(x, y, z)·σ.
 *
 * @see E. P. Wigner, Group Theory, Academic Press 1959, ch. 15 (from memory)
 */
export function turnOfSpin(multiplicity: number, [w, x, y, z]: Quaternion): ComplexMatrix {
  const twoS = multiplicity - 1;
  // Columns of w − i(xσx + yσy + zσz): u → (w − iz)u + (y − ix)v, v → (−y − ix)u + (w + iz)v.
  const ofU: Polynomial = [
    [w, -z],
    [y, -x],
  ];
  const ofV: Polynomial = [
    [-y, -x],
    [w, z],
  ];
  const matrix = { re: new Float64Array(multiplicity ** 2), im: new Float64Array(multiplicity ** 2) };
  for (let down = 0; down < multiplicity; down++) {
    let image: Polynomial = [[1, 0]];
    for (let k = 0; k < twoS - down; k++) image = times(image, ofU);
    for (let k = 0; k < down; k++) image = times(image, ofV);
    const norm = factorial(twoS - down) * factorial(down);
    image.forEach(([re, im], to) => {
      const scale = Math.sqrt((factorial(twoS - to) * factorial(to)) / norm);
      matrix.re[to * multiplicity + down] = scale * re;
      matrix.im[to * multiplicity + down] = scale * im;
    });
  }
  return matrix;
}

/** Coefficients (complex) by rising power of v. */
type Polynomial = (readonly [re: number, im: number])[];

function times(a: Polynomial, b: Polynomial): Polynomial {
  const product = Array.from({ length: a.length + b.length - 1 }, (): [number, number] => [0, 0]);
  a.forEach(([ar, ai], i) => {
    b.forEach(([br, bi], j) => {
      product[i + j]![0] += ar * br - ai * bi;
      product[i + j]![1] += ar * bi + ai * br;
    });
  });
  return product;
}
