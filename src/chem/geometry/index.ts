export { findGeometry, type Geometry, geometries } from './catalogue.ts';
export {
  countIsomers,
  enumerateIsomers,
  type Isomer,
  type IsomerList,
  type IsomerRequest,
  isomerIndex,
} from './enumerate-isomers.ts';
export { type IsomerSubject, isomersOf } from './isomers-of.ts';
export type { LigandSlot } from './ligand-slot.ts';
export { drawPolyhedron, type PolyhedronDrawing } from './projection.ts';
export { isomerRequest, type ReadLigand } from './request.ts';
export { defaultView, turned, type View } from './view.ts';
