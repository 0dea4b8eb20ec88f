import { DomainError } from '../errors.ts';
import { findGeometry, operationsOf } from './catalogue.ts';

/**
 * One text for a relative configuration: equal for every orientation of an isomer and for both of its mirror images,
 * different for different diastereoisomers. It does not depend on the order in which isomers are listed, so that it
 * may be stored.
 *
 * @param sites - donor label at each vertex of the polyhedron
 * @param chelates - vertex pairs spanned by one ligand
 * @throws {DomainError} `unsupported` for an unknown symbol
 */
export function relativeConfigurationKey(
  symbol: string,
  sites: readonly string[],
  chelates: readonly (readonly [number, number])[],
): string {
  const geometry = findGeometry(symbol);
  if (!geometry) throw new DomainError('unsupported', `no polyhedron has the symbol ${symbol}`, 'geometry');
  const keys = operationsOf(geometry).map(({ permutation }) => {
    const labels: string[] = [];
    permutation.forEach((target, vertex) => {
      labels[target] = sites[vertex] ?? '';
    });
    const links = chelates
      .map(([i, j]) => [permutation[i]!, permutation[j]!].sort((a, b) => a - b).join('-'))
      .sort()
      .join(',');
    return `${labels.join('|')};${links}`;
  });
  return keys.sort()[0] ?? '';
}
