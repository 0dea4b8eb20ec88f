import { DomainError } from '../errors.ts';
import { fieldEnergies, type Level } from './field-levels.ts';
import type { Matrix } from './matrix.ts';
import { type OverlapLigand, overlapField } from './overlap.ts';
import { type FieldSetting, overlapGroup } from './overlap-group.ts';

/** Ligands at each place of a way from one geometry (0) to another (1), along which the axes of their group stay put. */
export type GeometryPath = (place: number) => readonly OverlapLigand[];

export interface CorrelationRequest {
  /** d electrons, 1 to 9. */
  n: number;
  path: GeometryPath;
  /** Racah parameters in the unit of the ligands'. */
  B: number;
  C: number;
  /** Places from 0 to 1; 41 unless told. */
  points?: number | undefined;
  /** As in a diagram: from the ground level at each place, or from the centre of gravity of the d orbitals. */
  view?: 'ground' | 'absolute' | undefined;
}

export interface Correlation {
  /** Group that is kept all along the way, in which the curves are labelled. */
  group: string;
  /** 0 to 1. */
  x: number[];
  /** Curves of one label stand in rising order: levels of one spin and irrep do not cross. */
  curves: { label: string; y: number[] }[];
}

const MOST_POINTS = 401;
/** Places by which the common group is found: no special geometry falls on both. */
const ORDINARY: readonly number[] = [0.3719, 0.6427];

/**
 * How the levels of one geometry pass into those of another.
 *
 * @throws DomainError `out-of-range` (fields `n`, `B`, `C`, `points`, `ligands`), `unsupported` (field `path`) where the
 *   way keeps no group that levels could be followed by
 */
export function correlation({ n, path, B, C, points = 41, view = 'ground' }: CorrelationRequest): Correlation {
  if (!Number.isInteger(points) || points < 2 || points > MOST_POINTS) {
    throw new DomainError('out-of-range', `points must be a whole number from 2 to ${MOST_POINTS}.`, 'points');
  }
  const setting = commonGroup(path);
  const x = Array.from({ length: points }, (_, i) => i / (points - 1));
  const tables = x.map((place) => {
    const field = overlapField(path(place));
    const origin = view === 'absolute' ? n * meanOf(field) : null;
    return energiesByLabel(fieldEnergies(n, field, { B, C }, setting), origin);
  });
  const labels = [...tables[0]!.keys()];
  const curves = labels.flatMap((label) =>
    tables[0]!.get(label)!.map((_, root) => ({
      label,
      y: tables.map((table) => {
        const energy = table.get(label)?.[root];
        if (energy === undefined) throw lost();
        return energy;
      }),
    })),
  );
  return { group: setting.group.symbol, x, curves };
}

const lost = (): DomainError =>
  new DomainError('unsupported', 'The levels cannot be followed: the ligands keep no common group on the way.', 'path');

function commonGroup(path: GeometryPath): FieldSetting {
  const settings = ORDINARY.map((place) => overlapGroup(path(place)));
  const least = settings.reduce((a, b) => (a && b && b.group.order < a.group.order ? b : a && b ? a : null));
  if (!least) throw lost();
  return least;
}

const meanOf = ({ data }: Matrix): number => (data[0]! + data[6]! + data[12]! + data[18]! + data[24]!) / 5;

/** @param origin - what energies count from; the lowest where it is null */
function energiesByLabel(levels: readonly Level[], origin: number | null): Map<string, number[]> {
  const zero = origin ?? levels[0]!.energy;
  const table = new Map<string, number[]>();
  for (const { label, energy } of levels) {
    if (label === null) throw lost();
    table.set(label, [...(table.get(label) ?? []), energy - zero]);
  }
  return table;
}
