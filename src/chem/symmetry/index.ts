export { findGroup, groups, type Irrep, type IrrepCount, type PointGroup } from './groups.ts';
export { antisymmetricPower, directProduct, symmetricPower } from './products.ts';
export { dOrbitals, splitMomentum, splitTerm } from './splitting.ts';
