import { linearLabel } from './linear-groups.ts';
import type { SkeletonVibrations } from './vibrations.ts';

/**
 * Normal modes of atoms on one line, each bound to the next.
 *
 * Each pair that the centre carries into each other gives Σg+ + Σu+ + Πg + Πu, an atom at the centre Σu+ + Πu; in C∞v
 * every atom gives Σ+ + Π. Translations take one Σu+ + Πu, rotations one Πg.
 *
 * @param atoms - number of atoms, at least two; in D∞h an odd one stands at the centre
 */
export function linearVibrations(group: string, atoms: number): SkeletonVibrations {
  const central = group === 'Dinfh';
  const pairs = Math.floor(atoms / 2);
  const odd = atoms % 2;
  const label = (lambda: 0 | 1, parity: 'g' | 'u'): string =>
    linearLabel({ lambda, sign: lambda === 0 ? 1 : 0, parity: central ? parity : '' });
  const rows = central
    ? [
        {
          irrep: label(0, 'g'),
          atoms: pairs + odd,
          total: pairs,
          moved: 0,
          stretches: pairs,
          infrared: false,
          raman: true,
        },
        { irrep: label(1, 'g'), atoms: 0, total: pairs, moved: 1, stretches: 0, infrared: false, raman: true },
        {
          irrep: label(0, 'u'),
          atoms: pairs,
          total: pairs + odd,
          moved: 1,
          stretches: pairs - 1 + odd,
          infrared: true,
          raman: false,
        },
        { irrep: label(1, 'u'), atoms: 0, total: pairs + odd, moved: 1, stretches: 0, infrared: true, raman: false },
      ]
    : [
        {
          irrep: label(0, 'g'),
          atoms: atoms,
          total: atoms,
          moved: 1,
          stretches: atoms - 1,
          infrared: true,
          raman: true,
        },
        { irrep: label(1, 'g'), atoms: 0, total: atoms, moved: 2, stretches: 0, infrared: true, raman: true },
      ];
  const counted = (of: (row: (typeof rows)[number]) => number) =>
    rows.map((row) => ({ irrep: row.irrep, count: of(row) })).filter(({ count }) => count > 0);
  return {
    group,
    total: counted(({ total }) => total),
    vibrations: rows
      .map(({ irrep, total, moved, infrared, raman }) => ({ irrep, count: total - moved, infrared, raman }))
      .filter(({ count }) => count > 0),
    stretches: counted(({ stretches }) => stretches),
    bends: counted(({ total, moved, stretches }) => total - moved - stretches),
    permutation: counted(({ atoms: own }) => own),
    axes: 'All atoms lie on z.',
  };
}
