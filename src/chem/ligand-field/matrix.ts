/** A real matrix, row after row in one array. */
export interface Matrix {
  readonly rows: number;
  readonly columns: number;
  readonly data: Float64Array;
}

export function zeros(rows: number, columns = rows): Matrix {
  return { rows, columns, data: new Float64Array(rows * columns) };
}

export function identity(size: number): Matrix {
  const unit = zeros(size);
  for (let i = 0; i < size; i++) unit.data[i * size + i] = 1;
  return unit;
}

/** The matrix with these rows. */
export function fromRows(rows: readonly (readonly number[])[]): Matrix {
  return { rows: rows.length, columns: rows[0]?.length ?? 0, data: Float64Array.from(rows.flat()) };
}

/** Adds `factor · source` to `target` in place. */
export function addScaled(target: Matrix, source: Matrix, factor: number): void {
  for (let i = 0; i < target.data.length; i++) target.data[i]! += factor * source.data[i]!;
}

/** Σ factor · matrix of matrices of one shape. */
export function combine(terms: readonly (readonly [number, Matrix])[]): Matrix {
  const sum = zeros(terms[0]![1].rows, terms[0]![1].columns);
  for (const [factor, matrix] of terms) addScaled(sum, matrix, factor);
  return sum;
}

/** a · b; rows of zeros in a cost nothing, as most of our operators are sparse. */
export function product(a: Matrix, b: Matrix): Matrix {
  const c = zeros(a.rows, b.columns);
  for (let i = 0; i < a.rows; i++) {
    for (let k = 0; k < a.columns; k++) {
      const factor = a.data[i * a.columns + k]!;
      if (factor === 0) continue;
      for (let j = 0; j < b.columns; j++) c.data[i * c.columns + j]! += factor * b.data[k * b.columns + j]!;
    }
  }
  return c;
}

export function transpose(a: Matrix): Matrix {
  const t = zeros(a.columns, a.rows);
  for (let i = 0; i < a.rows; i++) {
    for (let j = 0; j < a.columns; j++) t.data[j * t.columns + i] = a.data[i * a.columns + j]!;
  }
  return t;
}

/** Vᵀ · M · V: an operator in the space that the columns of V span. */
export function within(basis: Matrix, operator: Matrix): Matrix {
  return product(transpose(basis), product(operator, basis));
}

/** The columns `indices` of a matrix, in that order. */
export function pickColumns(a: Matrix, indices: readonly number[]): Matrix {
  const picked = zeros(a.rows, indices.length);
  for (let i = 0; i < a.rows; i++) {
    indices.forEach((column, j) => {
      picked.data[i * picked.columns + j] = a.data[i * a.columns + column]!;
    });
  }
  return picked;
}

/** Matrices of as many rows each, as one. */
export function besideEachOther(parts: readonly Matrix[]): Matrix {
  const joined = zeros(
    parts[0]!.rows,
    parts.reduce((sum, { columns }) => sum + columns, 0),
  );
  let at = 0;
  for (const { rows, columns, data } of parts) {
    for (let i = 0; i < rows; i++)
      joined.data.set(data.subarray(i * columns, (i + 1) * columns), i * joined.columns + at);
    at += columns;
  }
  return joined;
}

export function diagonal(values: readonly number[]): Matrix {
  const matrix = zeros(values.length);
  values.forEach((value, i) => {
    matrix.data[i * values.length + i] = value;
  });
  return matrix;
}
