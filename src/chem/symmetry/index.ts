export { type Descent, descend } from './descent.ts';
export { type DoubleGroup, type DoubleIrrep, doubleGroup } from './double-group.ts';
export { doubleProduct, spinOrbitComponents } from './double-products.ts';
export { type Atom, type CoordinateVibrations, vibrationsOfAtoms } from './from-coordinates/index.ts';
export { findGroup, groups, type Irrep, type IrrepCount, type PointGroup } from './groups.ts';
export { antisymmetricPower, directProduct, symmetricPower } from './products.ts';
export { type SelectionAnalysis, type SelectionRequest, selectionAnalysis } from './selection.ts';
export { dOrbitals, splitMomentum, splitTerm } from './splitting.ts';
export { type Skeleton, type SkeletonVibrations, type Vibration, vibrations } from './vibrations.ts';
