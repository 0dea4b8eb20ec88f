import type { GeometryPath } from './correlation.ts';
import type { OverlapLigand } from './overlap.ts';

/** What every ligand of a path does to the d orbitals, in one unit of energy. */
export interface LigandStrength {
  eSigma: number;
  ePi: number;
}

/** arccos(1/√3) in degrees: between the threefold axis of an octahedron, or the S4 of a tetrahedron, and a ligand. */
const CUBIC_ANGLE = (Math.acos(1 / Math.sqrt(3)) * 180) / Math.PI;

const at = (theta: number, phi: number, strength: LigandStrength): OverlapLigand => ({ theta, phi, ...strength });

/**
 * Octahedron (0) to square plane (1): two trans ligands on z fade to nothing, by way of a trans-tetragonal complex; D4h.
 *
 * @param floor - share of their strength that the two keep at the end; 0 unless told
 */
export function tetragonalPath({ eSigma, ePi }: LigandStrength, floor = 0): GeometryPath {
  return (place) => {
    const share = 1 - place * (1 - floor);
    const axial = { eSigma: eSigma * share, ePi: ePi * share };
    return [
      ...[0, 90, 180, 270].map((phi) => at(90, phi, { eSigma, ePi })),
      ...[0, 180].map((theta) => at(theta, 0, axial)),
    ];
  };
}

/**
 * Octahedron (0) to trigonal prism (1): the two triangles turn against each other about the threefold axis z, by as much
 * each, so that the twofold axes stay where they are; D3.
 */
export function trigonalTwist(strength: LigandStrength): GeometryPath {
  return (place) => {
    const turn = 30 * (1 - place);
    return [0, 120, 240].flatMap((phi) => [
      at(CUBIC_ANGLE, phi + turn, strength),
      at(180 - CUBIC_ANGLE, phi - turn, strength),
    ]);
  };
}

/** Tetrahedron (0) to square plane (1): the ligands are pressed towards the plane across z; D2d. */
export function flattening(strength: LigandStrength): GeometryPath {
  return (place) => {
    const theta = CUBIC_ANGLE + (90 - CUBIC_ANGLE) * place;
    return [
      ...[0, 180].map((phi) => at(theta, phi, strength)),
      ...[90, 270].map((phi) => at(180 - theta, phi, strength)),
    ];
  };
}
