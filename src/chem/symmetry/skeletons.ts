import { geometries } from '../geometry/catalogue.ts';
import type { Skeleton } from './vibrations.ts';

/** Where several polyhedra share a group, the one that complexes show most. */
const usual: Record<string, string> = { D3h: 'TBPY-5', C4v: 'SPY-5', Dinfh: 'L-2' };

/** The skeleton of equal donors that stands for a group when no other is told, or null where no polyhedron has it. */
export function plainSkeleton(group: string): Skeleton | null {
  const geometry = geometries.find(({ symbol, group: own }) => own === group && (usual[group] ?? symbol) === symbol);
  return geometry ? { geometry: geometry.symbol, sites: geometry.vertices.map(() => 'A') } : null;
}
