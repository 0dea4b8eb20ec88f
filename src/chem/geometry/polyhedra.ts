import type { Vector3 } from './vector.ts';

/** One line of the table of polyhedral symbols, with where the donors stand. */
export interface Polyhedron {
  symbol: string;
  name: string;
  shape: string;
  vertices: Vector3[];
}

const degrees = (angle: number): number => (angle * Math.PI) / 180;

/** Unit vector from polar angle θ (from z) and azimuth φ (from x), in degrees. */
function at(theta: number, phi: number): Vector3 {
  const sine = Math.sin(degrees(theta));
  return [sine * Math.cos(degrees(phi)), sine * Math.sin(degrees(phi)), Math.cos(degrees(theta))];
}

/** n vertices on a circle about z, the first at azimuth `first`. */
const ring = (n: number, theta: number, first = 0): Vector3[] =>
  Array.from({ length: n }, (_, k) => at(theta, first + (360 / n) * k));

const top: Vector3 = [0, 0, 1];
const bottom: Vector3 = [0, 0, -1];
const right: Vector3 = [1, 0, 0];
const left: Vector3 = [-1, 0, 0];
const bipyramid = (n: number): Vector3[] => [top, bottom, ...ring(n, 90)];

/** Polar angle of a tetrahedral vertex from the next: arccos(−1/3). */
const TETRAHEDRAL = (Math.acos(-1 / 3) * 180) / Math.PI;
/** Apex to base of the square pyramids: arccos(−1/4), near the 104° of least repulsion. */
const PYRAMIDAL = (Math.acos(-1 / 4) * 180) / Math.PI;
/** Trigonal prism with square side faces on the unit sphere: circumradius of the triangle and half the height. */
const PRISM_RADIUS = Math.sqrt(4 / 7);
const PRISM_HALF = Math.sqrt(3 / 7);
const PRISM_ANGLE = (Math.acos(PRISM_HALF) * 180) / Math.PI;
/** Square antiprism with all edges equal: h² = r² cos 45° / 2. */
const ANTIPRISM_ANGLE = (Math.atan(1 / Math.sqrt(Math.SQRT1_2 / 2)) * 180) / Math.PI;
/** Octahedron seen along a threefold axis: arccos(1/√3). */
const OCTAHEDRAL_FACE = (Math.acos(1 / Math.sqrt(3)) * 180) / Math.PI;
/** Polar angles of the A and B sites of the dodecahedron: Hoard and Silverton, Inorg. Chem. 2 (1963) 235; from memory. */
const DODECAHEDRON_A = 36.9;
const DODECAHEDRON_B = 69.5;

const prism: Vector3[] = [...ring(3, PRISM_ANGLE, 60), ...ring(3, 180 - PRISM_ANGLE, 60)];

/** Prism lying along y, one pillar on the side `sign` of z: that pillar, then the opposite face. */
function lyingPrism(sign: 1 | -1): Vector3[] {
  const [r, h] = [PRISM_RADIUS, PRISM_HALF];
  const side = (r * Math.sqrt(3)) / 2;
  const ends: Vector3[] = [
    [0, h, sign * r],
    [0, -h, sign * r],
  ];
  const face: Vector3[] = [
    [side, h, (-sign * r) / 2],
    [side, -h, (-sign * r) / 2],
    [-side, -h, (-sign * r) / 2],
    [-side, h, (-sign * r) / 2],
  ];
  return [...ends, ...face];
}

const square: Vector3[] = [right, left, [0, 1, 0], [0, -1, 0]];

/**
 * Polyhedral symbols of IUPAC for coordination numbers 2 to 9 (Red Book 2005, tables IR-9.2 and IR-9.3; that of 9 from
 * memory), each with unit vectors from the metal.
 *
 * The principal axis is z, a C2′ of Dnh and Dnd is x, a σv of Cnv is the plane xz, square planes have donors on x and
 * y. Angles that the symbol leaves open (bent, pyramidal, capped shapes) are chosen here; counts and groups do not
 * hang on them.
 */
export const polyhedra: readonly Polyhedron[] = [
  { symbol: 'L-2', name: 'linear', shape: 'line', vertices: [top, bottom] },
  { symbol: 'A-2', name: 'bent', shape: 'angle', vertices: [at(60, 0), at(60, 180)] },
  { symbol: 'TP-3', name: 'trigonal planar', shape: 'trigonal plane', vertices: ring(3, 90) },
  { symbol: 'TPY-3', name: 'trigonal pyramidal', shape: 'trigonal pyramid', vertices: ring(3, TETRAHEDRAL) },
  { symbol: 'TS-3', name: 'T-shaped', shape: 'T-shape', vertices: [top, right, left] },
  {
    symbol: 'T-4',
    name: 'tetrahedral',
    shape: 'tetrahedron',
    vertices: [...ring(2, TETRAHEDRAL / 2, 45), ...ring(2, 180 - TETRAHEDRAL / 2, 135)],
  },
  { symbol: 'SP-4', name: 'square planar', shape: 'square plane', vertices: square },
  {
    symbol: 'SPY-4',
    name: 'square pyramidal, metal at the apex',
    shape: 'square pyramid',
    vertices: ring(4, PYRAMIDAL),
  },
  { symbol: 'SS-4', name: 'see-saw', shape: 'see-saw', vertices: [right, left, at(60, 90), at(60, 270)] },
  { symbol: 'TBPY-5', name: 'trigonal bipyramidal', shape: 'trigonal bipyramid', vertices: bipyramid(3) },
  { symbol: 'SPY-5', name: 'square pyramidal', shape: 'square pyramid', vertices: [top, ...ring(4, PYRAMIDAL)] },
  { symbol: 'OC-6', name: 'octahedral', shape: 'octahedron', vertices: [top, bottom, ...square] },
  { symbol: 'TPR-6', name: 'trigonal prismatic', shape: 'trigonal prism', vertices: prism },
  { symbol: 'PBPY-7', name: 'pentagonal bipyramidal', shape: 'pentagonal bipyramid', vertices: bipyramid(5) },
  {
    symbol: 'OCF-7',
    name: 'face-capped octahedral',
    shape: 'face-capped octahedron',
    vertices: [top, ...ring(3, 75), ...ring(3, 130, 60)],
  },
  {
    symbol: 'TPRS-7',
    name: 'square-face monocapped trigonal prismatic',
    shape: 'square-face monocapped trigonal prism',
    vertices: [top, ...lyingPrism(-1)],
  },
  {
    symbol: 'CU-8',
    name: 'cubic',
    shape: 'cube',
    vertices: [...ring(4, OCTAHEDRAL_FACE, 45), ...ring(4, 180 - OCTAHEDRAL_FACE, 45)],
  },
  {
    symbol: 'SAPR-8',
    name: 'square antiprismatic',
    shape: 'square antiprism',
    vertices: [...ring(4, ANTIPRISM_ANGLE, 22.5), ...ring(4, 180 - ANTIPRISM_ANGLE, -22.5)],
  },
  {
    symbol: 'DD-8',
    name: 'dodecahedral',
    shape: 'dodecahedron',
    vertices: [
      ...ring(2, DODECAHEDRON_A, 45),
      ...ring(2, 180 - DODECAHEDRON_A, 135),
      ...ring(2, DODECAHEDRON_B, 135),
      ...ring(2, 180 - DODECAHEDRON_B, 45),
    ],
  },
  { symbol: 'HBPY-8', name: 'hexagonal bipyramidal', shape: 'hexagonal bipyramid', vertices: bipyramid(6) },
  {
    symbol: 'OCT-8',
    name: 'trans-bicapped octahedral',
    shape: 'trans-bicapped octahedron',
    vertices: [top, bottom, ...ring(3, OCTAHEDRAL_FACE, 30), ...ring(3, 180 - OCTAHEDRAL_FACE, -30)],
  },
  {
    symbol: 'TPRT-8',
    name: 'triangular-face bicapped trigonal prismatic',
    shape: 'triangular-face bicapped trigonal prism',
    vertices: [top, bottom, ...prism],
  },
  {
    symbol: 'TPRS-8',
    name: 'square-face bicapped trigonal prismatic',
    shape: 'square-face bicapped trigonal prism',
    vertices: [at(60, 0), at(60, 180), ...lyingPrism(1)],
  },
  {
    symbol: 'TPRS-9',
    name: 'square-face tricapped trigonal prismatic',
    shape: 'square-face tricapped trigonal prism',
    vertices: [...ring(3, 90), ...prism],
  },
  { symbol: 'HBPY-9', name: 'heptagonal bipyramidal', shape: 'heptagonal bipyramid', vertices: bipyramid(7) },
];
