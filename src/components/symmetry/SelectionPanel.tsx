import { useMemo } from 'react';
import { DomainError } from '#src/chem/errors.ts';
import { findGroup, type PointGroup as Group, selectionAnalysis, vibrations } from '#src/chem/symmetry/index.ts';
import { plainSkeleton } from '#src/chem/symmetry/skeletons.ts';
import { Irrep, PointGroup, Transition, Unit } from '#src/components/notation/index.tsx';
import { groupDigits } from '#src/components/notation/quantity.ts';
import { Select } from '#src/components/ui/controls.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { ArgumentList } from './ArgumentList.tsx';
import { argumentLines, multiplicityWord, partsOf } from './argument.ts';
import { ChoiceList } from './ChoiceList.tsx';
import type { SymmetryState } from './symmetry-address.ts';

interface Props {
  state: SymmetryState;
  change: (part: Partial<SymmetryState>) => void;
}

/** A transition to begin with: to the irrep of a rotation, with the spin kept, as the first band of a low-spin d⁶ ion. */
function transitionOf({ irreps }: Group, { from, to }: Pick<SymmetryState, 'from' | 'to'>) {
  const rotation = irreps.find(({ functions }) => functions.includes('Rx')) ?? irreps.at(-1)!;
  const start = from ?? `1${irreps[0]!.label}`;
  return { from: start, to: to ?? `${partsOf(start).multiplicity}${rotation.label}` };
}

/** Why a transition between two terms is strong or weak, in steps. */
export function SelectionPanel({ state: { group: symbol, from, to }, change }: Props) {
  const group = useMemo(() => findGroup(symbol)!, [symbol]);
  const part = transitionOf(group, { from, to });
  const result = useMemo(() => judge(group, part.from, part.to), [group, part.from, part.to]);
  const groups = [{ choices: group.irreps.map(({ label }) => ({ value: label, label: <Irrep irrep={label} /> })) }];
  const field = (which: 'from' | 'to', words: string) => {
    const { multiplicity, irrep } = partsOf(part[which]);
    return (
      <fieldset className="flex gap-2">
        <legend className="sr-only">{words}</legend>
        <Select
          label={`${words}, spin`}
          value={String(multiplicity)}
          onChange={(event) => change({ ...part, [which]: `${event.target.value}${irrep}` })}
          options={[1, 2, 3, 4, 5, 6].map((n) => ({ value: String(n), label: `${n}, ${multiplicityWord(n)}` }))}
          className="w-36"
        />
        <ChoiceList
          label={`${words}, irrep`}
          groups={groups}
          value={irrep}
          onChange={(next) => change({ ...part, [which]: `${multiplicity}${next}` })}
          className="w-28"
        />
      </fieldset>
    );
  };
  return (
    <Panel
      title={
        <>
          Selection in <PointGroup group={symbol} />
        </>
      }
      aside={<Transition {...part} />}
    >
      <div className="mb-3 flex flex-wrap gap-x-6 gap-y-2">
        {field('from', 'Lower term')}
        {field('to', 'Upper term')}
      </div>
      {result.error !== null ? (
        <p className="text-alert">{result.error}</p>
      ) : (
        <>
          <ArgumentList lines={result.lines} />
          <p className="mt-2 text-ink-soft">
            Expected order of ε:{' '}
            {result.epsilon.from === 0 ? 'below ' : `${groupDigits(String(result.epsilon.from))} to `}
            {groupDigits(String(result.epsilon.to))} <Unit unit="dm3 mol-1 cm-1" /> ({result.epsilon.basis}).
            {result.skeleton && ` Vibrations are those of the plain ${result.skeleton} skeleton.`}
          </p>
        </>
      )}
    </Panel>
  );
}

function judge(group: Group, from: string, to: string) {
  try {
    const skeleton = plainSkeleton(group.symbol);
    const analysis = selectionAnalysis({ group: group.symbol, from, to });
    const modes = skeleton && vibrations(skeleton).vibrations.map(({ irrep, count }) => ({ irrep, count }));
    const lines = argumentLines({ analysis, from, to, vibrations: modes, symmetric: group.irreps[0]!.label });
    return { lines, epsilon: analysis.expectedEpsilon, skeleton: skeleton?.geometry ?? null, error: null };
  } catch (error) {
    if (error instanceof DomainError) return { lines: null, epsilon: null, skeleton: null, error: error.message };
    throw error;
  }
}
