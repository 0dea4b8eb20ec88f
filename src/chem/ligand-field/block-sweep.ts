import { blockMatrix, type CubicBlock } from './cubic-blocks.ts';
import { EigenvalueSolver, symmetricEigen } from './symmetric-eigen.ts';

/** Lowest level of a block at one field strength, and how fast it moves with the field. */
export interface Lowest {
  energy: number;
  /** dE/dΔ, after Hellmann and Feynman. */
  slope: number;
}

/** The levels of one block at many strengths of the field, for one B and C; nothing is allocated on the way. */
export class BlockSweep {
  readonly size: number;
  readonly #base: Float64Array;
  readonly #field: Float64Array;
  readonly #work: Float64Array;
  readonly #solver: EigenvalueSolver;

  /** @param sign - 1 with e above t2, −1 with t2 above e */
  constructor(block: CubicBlock, sign: 1 | -1, B: number, C: number) {
    this.size = block.field.rows;
    this.#base = blockMatrix(block, { delta: 0, B, C }).data;
    this.#field = Float64Array.from({ length: this.size }, (_, i) => sign * block.field.data[i * (this.size + 1)]!);
    this.#work = new Float64Array(this.#base.length);
    this.#solver = new EigenvalueSolver(this.size);
  }

  /** Energies at Δ, ascending, into `values`. */
  energies(delta: number, values: Float64Array): void {
    this.#fill(delta);
    this.#solver.solve(this.#work, this.size, values);
  }

  lowest(delta: number): Lowest {
    this.#fill(delta);
    const { values, vectors } = symmetricEigen({ rows: this.size, columns: this.size, data: this.#work });
    let slope = 0;
    for (let i = 0; i < this.size; i++) slope += this.#field[i]! * vectors.data[i * this.size]! ** 2;
    return { energy: values[0]!, slope };
  }

  #fill(delta: number): void {
    const { size } = this;
    this.#work.set(this.#base);
    for (let i = 0; i < size; i++) this.#work[i * (size + 1)] = this.#work[i * (size + 1)]! + delta * this.#field[i]!;
  }
}
