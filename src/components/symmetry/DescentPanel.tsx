import { useMemo } from 'react';
import { descend } from '#src/chem/symmetry/index.ts';
import { Irrep, IrrepSum, Operation, PointGroup } from '#src/components/notation/index.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import { subgroupsOf } from './subgroups.ts';
import type { SymmetryState } from './symmetry-address.ts';

interface Props {
  state: SymmetryState;
  change: (part: Partial<SymmetryState>) => void;
  choose: (symbol: string) => void;
}

/** What every irrep becomes in a subgroup, by the way in which the subgroup lies in the group. */
export function DescentPanel({ state: { group, into, along }, change, choose }: Props) {
  const subgroups = useMemo(() => subgroupsOf(group), [group]);
  const lower = into !== null && subgroups.includes(into) ? into : (subgroups[0] ?? null);
  const result = useMemo(() => {
    if (lower === null) return null;
    const { choices } = descend(group, lower, []);
    return descend(group, lower, undefined, along !== null && choices.includes(along) ? along : undefined);
  }, [group, lower, along]);
  return (
    <Panel
      title={
        <>
          Descent from <PointGroup group={group} />
        </>
      }
      aside={
        lower && (
          <button type="button" className="link min-h-6" onClick={() => choose(lower)}>
            Go to <PointGroup group={lower} />
          </button>
        )
      }
    >
      {result === null || lower === null ? (
        <p className="text-ink-soft">
          <PointGroup group={group} /> has no subgroup but itself.
        </p>
      ) : (
        <div className="flex flex-col gap-3">
          <Segmented
            label="Subgroup"
            look="cards"
            options={subgroups.map((symbol) => ({ value: symbol, label: <PointGroup group={symbol} /> }))}
            value={lower}
            onChange={(next) => change({ into: next, along: null })}
          />
          {result.choices.length > 1 && (
            <Segmented
              label="Which axes and planes are kept"
              showLabel
              options={result.choices.map((choice) => ({
                value: choice,
                label: (
                  <span>
                    {choice.split(', ').map((label, i) => (
                      <span key={label}>
                        {i > 0 && ', '}
                        <Operation label={label} />
                      </span>
                    ))}
                  </span>
                ),
              }))}
              value={result.along}
              onChange={(next) => change({ into: lower, along: next })}
            />
          )}
          <section
            aria-label="Correlation table"
            // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
            tabIndex={0}
            className="max-w-xl overflow-x-auto border border-hairline"
          >
            <table className="table table-compact">
              <thead>
                <tr>
                  <th scope="col" className="w-28 text-sm! text-ink!">
                    <PointGroup group={group} />
                  </th>
                  <th scope="col" className="text-sm! text-ink!">
                    <PointGroup group={lower} />
                  </th>
                </tr>
              </thead>
              <tbody>
                {result.maps.map(({ irrep, terms }) => (
                  <tr key={irrep}>
                    <th scope="row" className="border-faint! align-middle! text-sm! font-normal! text-ink!">
                      <Irrep irrep={irrep} />
                    </th>
                    <td>
                      <IrrepSum terms={terms} />
                    </td>
                  </tr>
                ))}
              </tbody>
            </table>
          </section>
        </div>
      )}
    </Panel>
  );
}
