import { linearLabel } from './linear-groups.ts';
import type { SkeletonVibrations } from './vibrations.ts';

/**
 * Normal modes of atoms on one line, one of them at the centre in D∞h.
 *
 * Each pair that the centre carries into each other gives Σg+ + Σu+ + Πg + Πu, an atom at the centre Σu+ + Πu; in C∞v
 * every atom gives Σ+ + Π. Translations take one Σu+ + Πu, rotations one Πg.
 *
 * @param atoms - number of atoms, odd in D∞h
 */
export function linearVibrations(group: string, atoms: number): SkeletonVibrations {
  const central = group === 'Dinfh';
  const pairs = central ? (atoms - 1) / 2 : 0;
  const label = (lambda: 0 | 1, parity: 'g' | 'u'): string =>
    linearLabel({ lambda, sign: lambda === 0 ? 1 : 0, parity: central ? parity : '' });
  const rows = central
    ? [
        { irrep: label(0, 'g'), total: pairs, moved: 0, stretches: pairs, infrared: false, raman: true },
        { irrep: label(1, 'g'), total: pairs, moved: 1, stretches: 0, infrared: false, raman: true },
        { irrep: label(0, 'u'), total: pairs + 1, moved: 1, stretches: pairs, infrared: true, raman: false },
        { irrep: label(1, 'u'), total: pairs + 1, moved: 1, stretches: 0, infrared: true, raman: false },
      ]
    : [
        { irrep: label(0, 'g'), total: atoms, moved: 1, stretches: atoms - 1, infrared: true, raman: true },
        { irrep: label(1, 'g'), total: atoms, moved: 2, stretches: 0, infrared: true, raman: true },
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
    axes: 'All atoms lie on z.',
  };
}
