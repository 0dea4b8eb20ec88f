import type { Geometry } from './catalogue.ts';
import { hullFaces } from './hull.ts';
import { add, length, normalise, scale, type Vector3 } from './vector.ts';
import { clearance, defaultView, onScreen, type View } from './view.ts';

/** Numbers for a drawing in a square box, in its units, x to the right and y down as in SVG. */
export interface PolyhedronDrawing {
  size: number;
  metal: DrawnPoint;
  /** Back to front. */
  vertices: (DrawnPoint & { vertex: number })[];
  /** Back to front; `back` where the edge lies on the far side. */
  edges: { from: number; to: number; x1: number; y1: number; x2: number; y2: number; depth: number; back: boolean }[];
  /** Faces of the convex hull, back to front. */
  faces: { vertices: number[]; points: [number, number][]; depth: number; back: boolean }[];
  /** Chelate rings as quadratic curves from (x1, y1) over the control point (cx, cy) to (x2, y2), back to front. */
  arcs: (Curve & { from: number; to: number; depth: number; back: boolean })[];
  /** Radius of a donor's disc that keeps discs apart and inside the box. */
  radius: number;
}

/** `depth` in bond lengths towards the eye; `enlargement` is how much nearer things are drawn larger. */
interface DrawnPoint {
  x: number;
  y: number;
  depth: number;
  enlargement: number;
}

interface Curve {
  x1: number;
  y1: number;
  cx: number;
  cy: number;
  x2: number;
  y2: number;
}

/** How far the control point of an arc stands from the metal, in bond lengths: arcs bulge off the edge. */
const ARC_REACH = 1.25;
/** Donor discs take this share of the room between the closest drawn points, and at most this share of the box. */
const DISC_SHARE = 0.45;
const MAX_DISC = 0.095;

/**
 * A polyhedron with its chelate rings as plain numbers, for whoever writes the lines.
 *
 * @param chelates - pairs of vertices joined by a ring
 * @param options - `size` of the box (104 by default), `view` (that of `defaultView` by default)
 */
export function drawPolyhedron(
  geometry: Geometry,
  chelates: readonly (readonly [number, number])[] = [],
  options: { size?: number; view?: View } = {},
): PolyhedronDrawing {
  const size = options.size ?? 104;
  const view = options.view ?? defaultView(geometry);
  const reach = size / 2 / (1 + 2 * MAX_DISC + view.perspective / 2);
  const place = (point: Vector3): DrawnPoint => {
    const { x, y, depth, enlargement } = onScreen(view, point);
    return { x: size / 2 + x * reach, y: size / 2 - y * reach, depth, enlargement };
  };
  const points = geometry.vertices.map(place);
  const depthOf = (vertices: readonly number[]): number =>
    vertices.reduce((sum, vertex) => sum + points[vertex]!.depth, 0) / vertices.length;
  const isBack = (depth: number): boolean => depth < -1e-6;

  const edges = geometry.edges.map(([from, to]) => {
    const [a, b] = [points[from]!, points[to]!];
    const depth = depthOf([from, to]);
    return { from, to, x1: a.x, y1: a.y, x2: b.x, y2: b.y, depth, back: isBack(depth) };
  });
  const faces = hullFaces(geometry.vertices).map((vertices) => {
    const depth = depthOf(vertices);
    const corners = vertices.map((vertex): [number, number] => [points[vertex]!.x, points[vertex]!.y]);
    return { vertices, points: corners, depth, back: isBack(depth) };
  });
  const arcs = chelates.map(([from, to]) => {
    const [a, b] = [points[from]!, points[to]!];
    const control = place(controlPoint(geometry.vertices[from]!, geometry.vertices[to]!));
    const depth = depthOf([from, to]);
    return { from, to, x1: a.x, y1: a.y, cx: control.x, cy: control.y, x2: b.x, y2: b.y, depth, back: isBack(depth) };
  });
  return {
    size,
    metal: place([0, 0, 0]),
    vertices: backToFront(points.map((point, vertex) => ({ ...point, vertex }))),
    edges: backToFront(edges),
    faces: backToFront(faces),
    arcs: backToFront(arcs),
    radius: Math.min(size * MAX_DISC, reach * clearance(geometry, view) * DISC_SHARE),
  };
}

function controlPoint(a: Vector3, b: Vector3): Vector3 {
  const middle = add(a, b);
  return length(middle) < 1e-6 ? [0, 0, 0] : scale(normalise(middle), ARC_REACH);
}

const backToFront = <T extends { depth: number }>(items: T[]): T[] => [...items].sort((a, b) => a.depth - b.depth);
