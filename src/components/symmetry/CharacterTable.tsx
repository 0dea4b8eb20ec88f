import { Fragment, useMemo } from 'react';
import { doubleGroup, findGroup } from '#src/chem/symmetry/index.ts';
import { Character, CoordinateFunction, Irrep, Operation, PointGroup } from '#src/components/notation/index.tsx';
import { CopyButton } from '#src/components/spectra/bands/CopyButton.tsx';
import { Checkbox } from '#src/components/ui/controls.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { characterRows, charactersText } from './character-rows.ts';
import { Prose } from './Prose.tsx';

interface Props {
  group: string;
  double: boolean;
  onDouble: (double: boolean) => void;
}

/** The character table of a group, with the rows of its double group where they are asked for. */
export function CharacterTable({ group: symbol, double, onDouble }: Props) {
  const group = useMemo(() => findGroup(symbol)!, [symbol]);
  const isLinear = group.order === null;
  const table = useMemo(
    () => characterRows(group, double && !isLinear ? doubleGroup(symbol) : null),
    [group, symbol, double, isLinear],
  );
  const facts = [
    isLinear ? 'Operations without end' : `Order ${table.order}`,
    group.centrosymmetric ? 'with a centre of inversion' : 'without a centre of inversion',
    group.setting,
  ];
  return (
    <Panel
      title={
        <>
          Character table of <PointGroup group={symbol} />
        </>
      }
      aside={<CopyButton text={charactersText(symbol, table)} what="the character table" label="Copy" />}
    >
      <div className="mb-2 flex flex-wrap items-center gap-x-6 gap-y-1">
        <p className="text-ink-soft">
          <Prose text={`${facts.join('; ')}.`} />
        </p>
        {!isLinear && (
          <Checkbox
            label="Double group"
            checked={double}
            onChange={(event) => onDouble(event.target.checked)}
            className="ml-auto"
          />
        )}
      </div>
      <section
        aria-label={`Character table of ${symbol}`}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
        tabIndex={0}
        className="overflow-x-auto border border-hairline"
      >
        <table className="table table-compact">
          <thead>
            <tr>
              <th scope="col" className="text-sm! text-ink!">
                <PointGroup group={symbol} />
              </th>
              {table.bethe && <th scope="col">Bethe</th>}
              {table.classes.map(({ label, size }) => (
                <th key={label} scope="col" className="text-right! text-sm! text-ink!">
                  {size === null ? '∞ ' : size > 1 && `${size} `}
                  <Operation label={label} />
                </th>
              ))}
              <th scope="col" className="border-l border-hairline">
                Linear, rotations
              </th>
              <th scope="col">Quadratic</th>
            </tr>
          </thead>
          <tbody>
            {table.rows.map((row, i) => (
              <tr
                key={row.label}
                className={row.spinor && !table.rows[i - 1]?.spinor ? '[&>*]:border-t-2! [&>*]:border-t-hairline!' : ''}
              >
                <th scope="row" className="border-faint! align-middle! text-sm! font-medium! text-ink!">
                  <Irrep irrep={row.label} />
                </th>
                {table.bethe && (
                  <td className="text-ink-soft">
                    <Irrep irrep={row.bethe ?? ''} />
                  </td>
                )}
                {row.characters.map((value, c) => (
                  <td key={table.classes[c]!.label} className="num text-right!">
                    <Character value={value} />
                  </td>
                ))}
                <td className="border-l border-l-hairline">
                  <Functions names={row.linear} />
                </td>
                <td>
                  <Functions names={row.quadratic} />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </section>
      {isLinear && (
        <p className="mt-2 text-xs text-ink-soft">The table goes on without end, with irreps of higher Λ.</p>
      )}
      {table.rows.some(({ pair }) => pair) && (
        <p className="mt-2 text-xs text-ink-soft">
          Two irreps whose characters are complex conjugates of each other stand in one row, added up.
        </p>
      )}
    </Panel>
  );
}

function Functions({ names }: { names: readonly string[] }) {
  return names.map((name, i) => (
    <Fragment key={name}>
      {i > 0 && ', '}
      <CoordinateFunction name={name} />
    </Fragment>
  ));
}
