import { findGeometry } from '#src/chem/geometry/index.ts';
import { descend, type IrrepCount, vibrations } from '#src/chem/symmetry/index.ts';
import type { View } from './band-matching.ts';

/** What the vibrations of a centre hang on. */
export interface SkeletonFacts {
  geometry: string | null;
  sites: readonly string[] | null;
  chelates: readonly (readonly [number, number])[] | null;
}

/** Vibrations of metal and donors as one view labels them, with how often each irrep occurs; null without a skeleton. */
export function viewVibrations(
  { kind, group }: Pick<View, 'kind' | 'group'>,
  { geometry, sites, chelates }: SkeletonFacts,
): IrrepCount[] | null {
  const shape = geometry === null ? null : findGeometry(geometry);
  if (!shape) return null;
  const alike = shape.vertices.map(() => 'A');
  const placed = sites?.length === shape.vertices.length ? sites : alike;
  const plain = (terms: readonly IrrepCount[]) => terms.map(({ irrep, count }) => ({ irrep, count }));
  if (kind === 'framework')
    return plain(vibrations({ geometry: shape.symbol, sites: placed, links: chelates ?? [] }).vibrations);
  if (kind === 'donorSet') return plain(vibrations({ geometry: shape.symbol, sites: placed }).vibrations);
  const ideal = vibrations({ geometry: shape.symbol, sites: alike });
  if (kind === 'polyhedron') return plain(ideal.vibrations);
  const counts = new Map<string, number>();
  const { maps } = descend(
    ideal.group,
    group,
    ideal.vibrations.map(({ irrep }) => irrep),
  );
  maps.forEach(({ terms }, i) => {
    for (const { irrep, count } of terms)
      counts.set(irrep, (counts.get(irrep) ?? 0) + count * ideal.vibrations[i]!.count);
  });
  return [...counts].map(([irrep, count]) => ({ irrep, count }));
}
