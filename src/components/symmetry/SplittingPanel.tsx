import { DomainError } from '#src/chem/errors.ts';
import { dOrbitals, splitTerm } from '#src/chem/symmetry/index.ts';
import { CoordinateFunction, Irrep, PointGroup, Term } from '#src/components/notation/index.tsx';
import { TextInput } from '#src/components/ui/controls.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import type { SymmetryState } from './symmetry-address.ts';

interface Props {
  state: SymmetryState;
  change: (part: Partial<SymmetryState>) => void;
}

/** What free-ion terms and the d orbitals become in a group. */
export function SplittingPanel({ state: { group, term }, change }: Props) {
  const { terms, error } = split(group, term);
  return (
    <Panel title="Splitting">
      <TextInput
        label="Free-ion term of d electrons"
        figures
        value={term}
        onChange={(event) => change({ term: event.target.value })}
        error={error ?? undefined}
        hint="Multiplicity and letter: 3F, 2D, 4P"
        className="max-w-56"
      />
      <p role="status" className="mt-3 text-base">
        {terms && (
          <>
            <Term term={term.trim()} /> in <PointGroup group={group} />:{' '}
            {terms.map((label, i) => (
              <span key={i}>
                {i > 0 && ' + '}
                <Term term={label} />
              </span>
            ))}
          </>
        )}
      </p>
      <h3 className="mt-4 mb-1 text-sm">
        The d orbitals in <PointGroup group={group} />
      </h3>
      <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1">
        {levelsOf(group).map(({ irrep, orbitals }) => (
          <div key={irrep ?? 'none'} className="contents">
            <dt>
              {irrep === null ? <span className="text-ink-soft">spread over several</span> : <Irrep irrep={irrep} />}
            </dt>
            <dd>
              {orbitals.map((name, i) => (
                <span key={name}>
                  {i > 0 && ', '}
                  <i>d</i>
                  {'\u2009'}(<CoordinateFunction name={name} />)
                </span>
              ))}
            </dd>
          </div>
        ))}
      </dl>
    </Panel>
  );
}

function split(group: string, term: string) {
  try {
    return { terms: splitTerm(group, term), error: null };
  } catch (error) {
    if (error instanceof DomainError) return { terms: null, error: error.message };
    throw error;
  }
}

/** Orbitals of one irrep together. */
function levelsOf(group: string): { irrep: string | null; orbitals: string[] }[] {
  const all = dOrbitals(group);
  return [...new Set(all.map(({ irrep }) => irrep))].map((irrep) => ({
    irrep,
    orbitals: all.filter((each) => each.irrep === irrep).map(({ orbital }) => orbital),
  }));
}
