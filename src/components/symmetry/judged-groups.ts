import type { TransitionTable } from '#src/chem/symmetry/index.ts';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import type { View } from './band-matching.ts';
import { distinctViews, KIND_WORDS } from './transition-rows.ts';

/** A group that transitions can be judged in. */
export interface Judged {
  kind: View['kind'];
  group: string;
  /** What the group is of: `framework, donor set`. */
  words: string;
  /** Null where there are no d–d transitions to tell, but other bands may be judged. */
  view: View | null;
}

/** Groups of a centre: those of its transitions, else those of the record, each once. */
export function judgedGroups(
  table: TransitionTable,
  complex: Pick<ComplexRecord, 'pointGroup' | 'donorSetGroup' | 'effectiveGroup'>,
): Judged[] {
  if (table.views.length > 0) {
    return distinctViews(table).map(({ view, words }) => ({ kind: view.kind, group: view.group, words, view }));
  }
  const own = [
    { kind: 'framework' as const, group: complex.pointGroup },
    { kind: 'donorSet' as const, group: complex.donorSetGroup },
    { kind: 'effective' as const, group: complex.effectiveGroup },
  ].flatMap(({ kind, group }) => (group === null ? [] : [{ kind, group }]));
  return own
    .filter(({ group }, i) => own.findIndex((other) => other.group === group) === i)
    .map(({ kind, group }) => ({
      kind,
      group,
      words: own
        .filter((other) => other.group === group)
        .map((other) => KIND_WORDS[other.kind])
        .join(', '),
      view: null,
    }));
}
