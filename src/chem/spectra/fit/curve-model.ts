import { type BandShape, componentAt, PARAMETERS_OF } from './band-shapes.ts';
import type { Model } from './least-squares.ts';

/** What a fitted curve is a sum of: bands first, then the edge's two parameters, then the constant's one. */
export interface Composition {
  shape: BandShape;
  bands: number;
  /** A charge-transfer band beyond the upper end, of which only the rising foot is seen. */
  edge: boolean;
  constant: boolean;
}

export const parameterCount = ({ shape, bands, edge, constant }: Composition): number =>
  bands * PARAMETERS_OF[shape] + (edge ? 2 : 0) + (constant ? 1 : 0);

/** Index of the first of the edge's parameters: its height at the upper end, and the logarithm of its e-fold rise. */
export const edgeIndex = ({ shape, bands }: Composition): number => bands * PARAMETERS_OF[shape];

/** The curve on given wavenumbers. The edge is h exp((ν − ν_end) / s). */
export function curveModel(x: ArrayLike<number>, composition: Composition): Model {
  const { shape, bands, edge, constant } = composition;
  const size = PARAMETERS_OF[shape];
  const end = x[x.length - 1] ?? 0;
  const edgeAt = edgeIndex(composition);
  const constantAt = edgeAt + (edge ? 2 : 0);
  return (i, p, gradient) => {
    let value = 0;
    for (let band = 0; band < bands; band++) value += componentAt(shape, x[i]!, p, band * size, gradient, band * size);
    if (edge) {
      const u = (x[i]! - end) / Math.exp(p[edgeAt + 1]!);
      const rise = Math.exp(u);
      value += p[edgeAt]! * rise;
      if (gradient) {
        gradient[edgeAt] = rise;
        gradient[edgeAt + 1] = -p[edgeAt]! * rise * u;
      }
    }
    if (constant) {
      value += p[constantAt]!;
      if (gradient) gradient[constantAt] = 1;
    }
    return value;
  };
}
