import { turned, type View } from '#src/chem/geometry/index.ts';
import { add, length, scale, type Vector3 } from '#src/chem/geometry/vector.ts';
import { onScreen } from '#src/chem/geometry/view.ts';
import type { ModeVector, PlacedAtoms } from '#src/chem/symmetry/mode-vectors.ts';

interface Point {
  x: number;
  y: number;
}

/** Lines and discs of a vibration in a square box, x to the right and y down as in SVG. */
export interface ModeDrawing {
  bonds: { key: string; from: Point; to: Point }[];
  /** Back to front. */
  atoms: (Point & { index: number; radius: number })[];
  /** From the place at rest to where the swing leads; only of atoms that move. */
  arrows: { index: number; shaft: [Point, Point]; head: Point[] }[];
  axes: { name: string; from: Point; to: Point; label: Point }[];
}

export interface DrawingOptions {
  size: number;
  /** Degrees about the upright and the horizontal of the screen. */
  turn: number;
  tilt: number;
  /** −1 to 1. */
  phase: number;
}

/** Share of the farthest distance that the atom moving most swings by, and that its arrow is long. */
const SWING = 0.22;
const ARROW = 0.36;
const PERSPECTIVE = 0.08;
const HEAD = 7;

/** View from between x and y of the labels, z upright. */
export function viewOf({ frame: [x, y, z] }: PlacedAtoms, { turn, tilt }: Pick<DrawingOptions, 'turn' | 'tilt'>): View {
  return turned({ rotation: [x, z, scale(y, -1)], perspective: PERSPECTIVE }, turn, tilt);
}

/** Draws one vibration at one moment of its swing. */
export function drawMode(placed: PlacedAtoms, mode: ModeVector | null, options: DrawingOptions): ModeDrawing {
  const { size, phase } = options;
  const view = viewOf(placed, options);
  const reach = Math.max(...placed.positions.map(length), 1e-6);
  const unit = size / (3.1 * reach);
  const place = (p: Vector3): Point & { depth: number; enlargement: number } => {
    const { x, y, depth, enlargement } = onScreen(view, scale(p, 1 / reach));
    return { x: size / 2 + x * reach * unit, y: size / 2 - y * reach * unit, depth, enlargement };
  };
  const most = Math.max(...(mode?.vectors ?? []).map(length), 1e-6);
  const moved = placed.positions.map((p, i) =>
    mode ? add(p, scale(mode.vectors[i]!, (phase * SWING * reach) / most)) : p,
  );
  const points = moved.map(place);
  const radius = Math.min(13, (0.2 * size) / Math.sqrt(placed.positions.length + 3));
  return {
    bonds: placed.bonds.map(([i, j]) => ({ key: `${i} ${j}`, from: points[i]!, to: points[j]! })),
    atoms: points
      .map(({ x, y, depth, enlargement }, index) => ({ x, y, depth, index, radius: radius * enlargement }))
      .sort((a, b) => a.depth - b.depth),
    arrows: (mode?.vectors ?? []).flatMap((vector, index) => {
      if (length(vector) < 0.03 * most) return [];
      const start = placed.positions[index]!;
      const [from, to] = [place(start), place(add(start, scale(vector, (ARROW * reach) / most)))];
      return [{ index, ...arrow(from, to, radius * from.enlargement) }];
    }),
    axes: axesOf(placed, view, size),
  };
}

/** An arrow that begins at the rim of the atom, so that its letters stay free. */
function arrow(centre: Point, aim: Point, rim: number): { shaft: [Point, Point]; head: Point[] } {
  const [dx, dy] = [aim.x - centre.x, aim.y - centre.y];
  const long = Math.hypot(dx, dy);
  // Seen from straight behind, an arrow is a point.
  const [ux, uy] = long < 1e-6 ? [0, 0] : [dx / long, dy / long];
  const out = (distance: number): Point => ({ x: centre.x + ux * distance, y: centre.y + uy * distance });
  const [tip, base] = [out(rim + long), out(rim + Math.max(0, long - HEAD))];
  const size = Math.min(HEAD, long);
  return {
    shaft: [out(rim), base],
    head: [
      tip,
      { x: base.x - uy * size * 0.5, y: base.y + ux * size * 0.5 },
      { x: base.x + uy * size * 0.5, y: base.y - ux * size * 0.5 },
    ],
  };
}

/** The axes of the labels in a corner of the box. */
function axesOf({ frame }: PlacedAtoms, view: View, size: number): ModeDrawing['axes'] {
  const [long, origin] = [24, { x: 34, y: size - 34 }];
  return frame.map((axis, k) => {
    const { x, y } = onScreen({ ...view, perspective: 0 }, axis);
    return {
      name: 'xyz'[k]!,
      from: origin,
      to: { x: origin.x + long * x, y: origin.y - long * y },
      label: { x: origin.x + (long + 9) * x, y: origin.y - (long + 9) * y },
    };
  });
}
