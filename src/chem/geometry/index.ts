export { findGeometry, type Geometry, geometries } from './catalogue';
export {
  countIsomers,
  enumerateIsomers,
  type Isomer,
  type IsomerList,
  type IsomerRequest,
  isomerIndex,
} from './enumerate-isomers';
export type { LigandSlot } from './ligand-slot';
export { drawPolyhedron, type PolyhedronDrawing } from './projection';
export { isomerRequest, type ReadLigand } from './request';
export { defaultView, turned, type View } from './view';
