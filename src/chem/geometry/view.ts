import { type Geometry, operationsOf } from './catalogue.ts';
import {
  add,
  apply,
  cross,
  dot,
  length,
  type Matrix3,
  normalise,
  scale,
  trace,
  transpose,
  type Vector3,
} from './vector.ts';

/** Where the polyhedron is looked at from. */
export interface View {
  /** Rows are the directions to the right, up, and towards the eye. */
  rotation: Matrix3;
  /** Weak perspective: 0 is orthographic; a point one bond length nearer is drawn larger by about this share. */
  perspective: number;
}

const PERSPECTIVE = 0.1;
/** Tilt that still reads as a view from the side, in degrees; crowded shells and flat ones bear more. */
const MAX_TILT = 22;
const MAX_TILT_CROWDED = 36;
const MAX_TILT_PLANAR = 50;
/** Room between drawn points, in bond lengths, that needs no other view. */
const ENOUGH_ROOM = 0.4;
/** Another view than that from the side is taken only for this many times the room. */
const WORTH_TURNING = 1.25;

const views = new Map<string, View>();

/**
 * A view in which a mirror plane of the polyhedron stands upright and edge-on, so that the drawings of two enantiomers
 * are each other's reflection from left to right, turned so that vertices and metal lie well apart.
 */
export function defaultView(geometry: Geometry): View {
  const known = views.get(geometry.symbol) ?? findView(geometry);
  views.set(geometry.symbol, known);
  return known;
}

/** The operation that the default view shows as a change of left and right: a permutation of the vertices. */
export function viewMirror(geometry: Geometry): readonly number[] {
  const [rightward] = defaultView(geometry).rotation;
  const mirror = operationsOf(geometry).find(({ matrix, proper }) => !proper && reverses(matrix, rightward));
  return mirror?.permutation ?? geometry.vertices.map((_, i) => i);
}

/** Least distance between two drawn points, the metal among them, in bond lengths. */
export function clearance(geometry: Geometry, view: View): number {
  const points = [...geometry.vertices, [0, 0, 0] as Vector3].map((vertex) => onScreen(view, vertex));
  let least = Number.POSITIVE_INFINITY;
  points.forEach((a, i) => {
    for (const b of points.slice(i + 1)) least = Math.min(least, Math.hypot(a.x - b.x, a.y - b.y));
  });
  return least;
}

/** A point on the screen in bond lengths, x to the right and y up; depth grows towards the eye. */
export function onScreen(view: View, point: Vector3): { x: number; y: number; depth: number; enlargement: number } {
  const [x, y, depth] = apply(view.rotation, point);
  const enlargement = 1 / (1 - view.perspective * depth);
  return { x: x * enlargement, y: y * enlargement, depth, enlargement };
}

/** Turn the view about the upright of the screen by `turn` and about its horizontal by `tilt`, in degrees. */
export function turned(view: View, turn: number, tilt: number): View {
  const [rightward, up, towards] = view.rotation;
  const [newRight, turnedTowards] = rotatePair(rightward, towards, turn);
  const [newUp, newTowards] = rotatePair(up, turnedTowards, tilt);
  return { ...view, rotation: [newRight, newUp, newTowards] };
}

/** Rotate two perpendicular vectors in their plane, the first towards the second's opposite. */
function rotatePair(a: Vector3, b: Vector3, angle: number): [Vector3, Vector3] {
  const [c, s] = [Math.cos((angle * Math.PI) / 180), Math.sin((angle * Math.PI) / 180)];
  return [add(scale(a, c), scale(b, -s)), add(scale(b, c), scale(a, s))];
}

interface RatedView {
  view: View;
  room: number;
}

/** With z upright where that leaves room; else with a vertex upright, else from any height. */
function findView(geometry: Geometry): View {
  const z: Vector3 = [0, 0, 1];
  const level = bestAbout(geometry, z, maxTilt(geometry));
  if (level.room >= ENOUGH_ROOM) return level.view;
  const others = [bestAbout(geometry, geometry.vertices[0]!, maxTilt(geometry)), bestAbout(geometry, z, 90)];
  return (others.find(({ room }) => room > level.room * WORTH_TURNING) ?? level).view;
}

/** The roomiest view along a mirror plane that holds `up`, tilted by up to `limit` degrees. */
function bestAbout(geometry: Geometry, up: Vector3, limit: number): RatedView {
  const sides = mirrorNormals(geometry)
    .filter((normal) => Math.abs(dot(normal, up)) < 1e-6)
    .flatMap((normal) => [normal, scale(normal, -1)])
    .map((rightward) => ({ rightward, towards: cross(rightward, up) }))
    .sort((a, b) => Math.sign(b.towards[2]) - Math.sign(a.towards[2]));
  const tilts = Array.from({ length: limit / 2 + 1 }, (_, k) => 2 * k);
  const rated = sides.flatMap(({ rightward, towards }) =>
    tilts.map((tilt): RatedView => {
      const view = turned({ rotation: [rightward, up, towards], perspective: PERSPECTIVE }, 0, tilt);
      return { view, room: clearance(geometry, view) };
    }),
  );
  return rated.reduce((best, next) => (next.room > best.room + 1e-6 ? next : best));
}

function maxTilt({ vertices, coordinationNumber }: Geometry): number {
  const flat = vertices.every(([, , z]) => Math.abs(z) < 1e-6);
  if (flat) return MAX_TILT_PLANAR;
  return coordinationNumber > 6 ? MAX_TILT_CROWDED : MAX_TILT;
}

/** Unit normals of the mirror planes; each is the direction that its reflection reverses. */
function mirrorNormals(geometry: Geometry): Vector3[] {
  return operationsOf(geometry)
    .filter(({ matrix, proper }) => !proper && Math.abs(trace(matrix) - 1) < 1e-3)
    .map(({ matrix }) => {
      // I − M is 2 n nᵀ, so any column that is not zero points along n.
      const columns = transpose(matrix).map((column, k) => {
        const unit: Vector3 = [Number(k === 0), Number(k === 1), Number(k === 2)];
        return add(unit, scale(column, -1));
      });
      return normalise(columns.reduce((a, b) => (length(b) > length(a) + 1e-9 ? b : a)));
    });
}

function reverses(matrix: Matrix3, direction: Vector3): boolean {
  return Math.abs(trace(matrix) - 1) < 1e-3 && length(add(apply(matrix, direction), direction)) < 1e-4;
}
