import { useEffect, useMemo, useRef, useState } from 'react';
import { Term } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { Button } from '#src/components/ui/Button.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import { saveText } from '#src/components/ui/save-text.ts';
import { type DataColumn, tableCsv } from '#src/components/ui/table-csv.ts';
import { LevelDiagram } from '../drawing/LevelDiagram.tsx';
import { svgFile } from '../drawing/svg-file.ts';
import { useWidth } from '../drawing/useWidth.ts';
import { LevelsControls } from './LevelsControls.tsx';
import { addressOf, type LevelsState, type LevelsView, stateOf } from './levels-address.ts';
import { readOut } from './read-out.ts';
import { TrendPanel } from './TrendPanel.tsx';
import { type Drawing, useDrawing } from './useDrawing.ts';

const VIEWS: { value: LevelsView; label: string }[] = [
  { value: 'ground', label: 'Above the ground level' },
  { value: 'absolute', label: 'Absolute' },
  { value: 'orgel', label: 'Orgel' },
  { value: 'path', label: 'Along a path' },
  { value: 'trend', label: 'Charge-transfer trend' },
];

/** Energy-level diagrams of dⁿ, with a read-out, correlations along a path, and the trend of charge transfer. */
export function LevelsPage({ search }: { search: string }) {
  const [state, setState] = useState(() => stateOf(search));
  const change = (part: Partial<LevelsState>) => setState((old) => ({ ...old, ...part }));
  useEffect(() => {
    // Sliders and the pointer move the state many times a second, and browsers bear few changes of the address.
    const later = setTimeout(
      () => history.replaceState(history.state, '', `${location.pathname}${addressOf(state)}${location.hash}`),
      250, // ms
    );
    return () => clearTimeout(later);
  }, [state]);
  const view = (next: LevelsView) => change({ view: next, at: next === 'path' ? 0.5 : Math.min(20, state.max / 2) });
  return (
    <div className="flex flex-col gap-5">
      <Segmented label="View" options={VIEWS} value={state.view} onChange={view} />
      {state.view === 'trend' ? (
        <TrendPanel state={state} change={change} />
      ) : (
        <Diagrams state={state} change={change} />
      )}
    </div>
  );
}

interface StateProps {
  state: LevelsState;
  change: (part: Partial<LevelsState>) => void;
}

function Diagrams({ state, change }: StateProps) {
  const drawing = useDrawing(state);
  const holder = useRef<HTMLDivElement>(null);
  const name = `levels-d${state.n}-${state.view === 'path' ? state.path : state.view === 'orgel' ? 'orgel' : state.geometry}`;
  const width = useWidth(holder, 880);
  const saveSvg = () => {
    const svg = holder.current?.querySelector('svg');
    if (svg) saveText(`${name}.svg`, svgFile(new XMLSerializer().serializeToString(svg)), 'image/svg+xml');
  };
  const [from, to] = drawing.window.x;
  const at = Math.min(Math.max(state.at, from), to);
  return (
    <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,1fr)_300px]">
      <Panel
        title={<DiagramTitle state={state} />}
        aside={
          <span className="flex gap-2">
            <Button size="small" onClick={saveSvg}>
              Download SVG
            </Button>
            <Button size="small" onClick={() => saveText(`${name}.csv`, curvesCsv(drawing), 'text/csv')}>
              Download CSV
            </Button>
          </span>
        }
      >
        {drawing.refusal && <p className="text-alert">{drawing.refusal}</p>}
        <div ref={holder}>
          <LevelDiagram
            title={drawing.title}
            width={width}
            height={Math.min(600, Math.max(420, Math.round(width * 0.68)))}
            window={drawing.window}
            curves={drawing.curves}
            crossings={drawing.crossings}
            at={at}
            xLabel={drawing.xLabel}
            yLabel={drawing.yLabel}
            {...(drawing.xNames ? { xNames: drawing.xNames } : {})}
            onPoint={(x) => change({ at: Number(x.toPrecision(4)) })}
          />
        </div>
        {drawing.crossings.length > 0 && (
          <ul className="mt-1 text-xs text-ink-soft">
            {drawing.crossings.map(({ x, from, to }) => (
              <li key={x}>
                At <i>Δ</i>/<i>B</i> = <span className="num">{x.toFixed(2)}</span> the ground level changes from{' '}
                <Term term={from} /> to <Term term={to} />.
              </li>
            ))}
          </ul>
        )}
      </Panel>
      <aside className="flex min-w-0 flex-col gap-5">
        <Panel title="Diagram">
          <LevelsControls state={state} change={change} />
        </Panel>
        <ReadOut {...{ drawing, at, change }} view={state.view} />
      </aside>
    </div>
  );
}

function DiagramTitle({ state: { n, view, geometry, ratio } }: { state: LevelsState }) {
  return (
    <>
      d<sup>{n}</sup>
      {view === 'ground' || view === 'absolute' ? `, ${geometry}` : ''}
      <span className="ml-3 text-xs font-normal text-ink-soft">
        <i>C</i>/<i>B</i> = {ratio}
      </span>
    </>
  );
}

interface ReadOutProps {
  drawing: Drawing;
  at: number;
  view: LevelsView;
  change: StateProps['change'];
}

/** Levels at the line: by pointer over the diagram, or by the slider and its keys. */
function ReadOut({ drawing: { curves, window, unit }, at, view, change }: ReadOutProps) {
  const levels = useMemo(() => readOut(curves, at), [curves, at]);
  const [from, to] = window.x;
  const name = view === 'path' ? 'Place along the path' : 'Δ/B';
  return (
    <Panel title="Read-out">
      <label className="flex items-center gap-2.5">
        <span className="text-xs text-ink-soft">
          {view === 'path' ? (
            'Place'
          ) : (
            <>
              <i>Δ</i>/<i>B</i>
            </>
          )}
        </span>
        <input
          type="range"
          aria-label={name}
          min={from}
          max={to}
          step={(to - from) / 400}
          value={at}
          onChange={(event) => change({ at: event.currentTarget.valueAsNumber })}
          className="h-7 min-w-0 flex-1 accent-zaffre"
        />
        <output className="num w-12 text-right">{formatNumber(at, 3)}</output>
      </label>
      <section
        className="-mx-[18px] mt-2 -mb-4 max-h-[330px] overflow-auto"
        // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached with the keyboard
        tabIndex={0}
        aria-label="Levels at the line"
      >
        <table className="table table-compact">
          <thead className="sticky top-0 bg-glaze">
            <tr>
              <th scope="col" className="!pl-[18px]">
                Level
              </th>
              <th scope="col" className="!pr-[18px] !text-right">
                {unit === 'B' ? (
                  <>
                    <i>E</i>/<i>B</i>
                  </>
                ) : (
                  <>
                    cm<sup>−1</sup>
                  </>
                )}
              </th>
            </tr>
          </thead>
          <tbody>
            {levels.map(({ label, energy, strong }, i) => (
              <tr key={i} className={strong ? '' : 'text-ink-soft'}>
                <td className="!pl-[18px] text-ink">
                  <Term term={label} />
                </td>
                <td className="num !pr-[18px] text-right">
                  {unit === 'B' ? energy.toFixed(2).replace('-', '−') : formatNumber(Math.round(energy), 7)}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </section>
    </Panel>
  );
}

/** All curves as a table: a row a place, a column a curve. */
function curvesCsv({ curves, unit }: Drawing): string {
  const head = unit === 'B' ? 'Delta/B' : 'place';
  const columns: DataColumn<number>[] = [
    { id: 'x', header: head, value: (i) => curves[0]!.x[i]! },
    ...curves.map(({ label, y }, k) => ({
      id: `${label} ${k}`,
      header: `${label} ${unit === 'B' ? 'E/B' : 'cm-1'}`,
      value: (i: number) => Number(y[i]!.toPrecision(7)),
    })),
  ];
  return tableCsv(
    columns,
    (curves[0]?.x ?? []).map((_, i) => i),
  );
}
