import { useMemo } from 'react';
import { findGeometry, geometries } from '#src/chem/geometry/index.ts';
import { Irrep, IrrepSum, PointGroup } from '#src/components/notation/index.tsx';
import { Select, TextArea, TextInput } from '#src/components/ui/controls.tsx';
import { CONTROL } from '#src/components/ui/Field.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import { ModePicture } from './ModePicture.tsx';
import { Prose } from './Prose.tsx';
import { modeKey, motionWord, type ShownVibrations, shownVibrations, sitesOf } from './shown-vibrations.ts';
import type { SymmetryState } from './symmetry-address.ts';

interface Props {
  state: SymmetryState;
  change: (part: Partial<SymmetryState>) => void;
  choose: (symbol: string) => void;
}

const EXAMPLE = 'Co 0 0 0\nN 1.96 0 0\nN -1.96 0 0\nN 0 1.96 0\nN 0 -1.96 0\nCl 0 0 2.28\nCl 0 0 -2.28';
const byNumber = (n: number) => `${n} donors`;

/** The vibrations of a skeleton, or of atoms given by their places: listed by irrep, drawn and moved. */
export function VibrationsPanel({ state, change, choose }: Props) {
  const { geometry, donors, atoms, tolerance } = state;
  const { shown, error } = useMemo(
    () => shownVibrations({ geometry, donors, atoms, tolerance }),
    [geometry, donors, atoms, tolerance],
  );
  const source = atoms === '' ? 'polyhedron' : 'coordinates';
  return (
    <Panel
      title="Vibrations"
      controls={
        <Segmented
          label="Atoms"
          options={[
            { value: 'polyhedron', label: 'polyhedron' },
            { value: 'coordinates', label: 'coordinates' },
          ]}
          value={source}
          onChange={(next) => change({ atoms: next === 'polyhedron' ? '' : EXAMPLE, mode: null })}
        />
      }
      aside={
        shown && (
          <button type="button" className="link min-h-6" onClick={() => choose(shown.placed.group)}>
            Go to <PointGroup group={shown.placed.group} />
          </button>
        )
      }
    >
      {source === 'polyhedron' ? <Skeleton {...{ state, change }} /> : <Coordinates {...{ state, change }} />}
      <div role="status" className="mt-3">
        {error && <p className="text-alert">{error}</p>}
        {shown && (
          <p>
            Group <PointGroup group={shown.placed.group} />: Γ<sub>vib</sub> ={' '}
            <IrrepSum terms={shown.vibrations} className="whitespace-normal!" />
            <span className="text-ink-soft">
              . <Prose text={shown.axes} />
            </span>
          </p>
        )}
        {shown?.notes.map((note) => (
          <p key={note} className="text-xs text-ink-soft">
            {note}
          </p>
        ))}
      </div>
      {shown && <Modes {...{ shown, state, change }} />}
    </Panel>
  );
}

function Skeleton({ state: { geometry, donors }, change }: Omit<Props, 'choose'>) {
  const sites = sitesOf(geometry, donors);
  const numbers = [...new Set(geometries.map(({ coordinationNumber }) => coordinationNumber))];
  return (
    <div className="flex flex-wrap items-end gap-x-5 gap-y-2">
      <Select
        label="Polyhedron"
        value={findGeometry(geometry) ? geometry : ''}
        onChange={(event) => change({ geometry: event.target.value, donors: [], mode: null })}
        className="w-72"
      >
        {numbers.map((n) => (
          <optgroup key={n} label={byNumber(n)}>
            {geometries
              .filter(({ coordinationNumber }) => coordinationNumber === n)
              .map(({ symbol, name }) => (
                <option key={symbol} value={symbol}>
                  {symbol}, {name}
                </option>
              ))}
          </optgroup>
        ))}
      </Select>
      <fieldset>
        <legend className="mb-1 text-xs text-ink-soft">Donor at each site; equal letters are alike</legend>
        <div className="flex flex-wrap gap-1">
          {sites.map((letter, i) => (
            <input
              key={i}
              aria-label={`Site ${i + 1}`}
              value={letter}
              maxLength={4}
              onChange={(event) =>
                change({
                  donors: sites.map((own, k) => (k === i ? event.target.value.replaceAll('.', '') : own)),
                  mode: null,
                })
              }
              className={`${CONTROL} num w-12! px-1.5! text-center`}
            />
          ))}
        </div>
      </fieldset>
    </div>
  );
}

function Coordinates({ state: { atoms, tolerance }, change }: Omit<Props, 'choose'>) {
  return (
    <div className="grid gap-x-5 gap-y-2 sm:grid-cols-[minmax(0,28rem)_10rem]">
      <TextArea
        label="Atoms, one a line: element and three numbers in Å"
        figures
        rows={7}
        value={atoms}
        // An empty field would turn back to the polyhedron while one is still typing.
        onChange={(event) => change({ atoms: event.target.value || '\n', mode: null })}
        hint="Lines of an XYZ file may be pasted as they are."
      />
      <TextInput
        label="Tolerance / Å"
        type="number"
        min={0.01}
        max={0.5}
        step={0.01}
        figures
        value={tolerance}
        onChange={(event) => {
          const next = event.target.valueAsNumber;
          if (next > 0 && next <= 0.5) change({ tolerance: next, mode: null });
        }}
        hint="How far atoms may lie from exact symmetry, 0.01 to 0.5"
      />
    </div>
  );
}

function Modes({ shown, state, change }: { shown: ShownVibrations } & Omit<Props, 'choose'>) {
  const mode = shown.modes.find((each) => modeKey(each) === state.mode) ?? shown.modes[0] ?? null;
  return (
    <div className="mt-3 grid items-start gap-5 md:grid-cols-[minmax(0,340px)_minmax(0,1fr)]">
      <ModePicture shown={shown} mode={mode} />
      <div className="min-w-0">
        <section
          aria-label="Vibrations by irrep"
          // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
          tabIndex={0}
          className="max-h-[26rem] overflow-auto border border-hairline"
        >
          <table className="table table-compact">
            <thead className="sticky top-0 bg-glaze">
              <tr>
                <th scope="col">Irrep</th>
                <th scope="col">Infrared</th>
                <th scope="col">Raman</th>
                <th scope="col">Motion</th>
                <th scope="col">Show</th>
              </tr>
            </thead>
            <tbody>
              {shown.vibrations.flatMap(({ irrep, count, infrared, raman }) =>
                Array.from({ length: count }, (_, set) => {
                  const partners = shown.modes.filter((each) => each.irrep === irrep && each.set === set);
                  return (
                    <tr key={`${irrep} ${set}`}>
                      <td>
                        <Irrep irrep={irrep} />
                        {count > 1 && (
                          <span className="text-xs text-ink-soft">
                            {' '}
                            {set + 1} of {count}
                          </span>
                        )}
                      </td>
                      <td>{infrared ? 'active' : <span className="text-ink-soft">silent</span>}</td>
                      <td>{raman ? 'active' : <span className="text-ink-soft">silent</span>}</td>
                      <td>{partners[0] ? motionWord(partners[0]) : '–'}</td>
                      <td>
                        <span className="flex gap-1">
                          {partners.map((each) => (
                            <button
                              key={each.partner}
                              type="button"
                              aria-pressed={each === mode}
                              aria-label={`Show ${irrep}${count > 1 ? `, ${set + 1} of ${count}` : ''}${partners.length > 1 ? `, partner ${each.partner + 1}` : ''}`}
                              onClick={() => change({ mode: modeKey(each) })}
                              className="inline-flex size-7 items-center justify-center rounded border border-hairline text-xs hover:border-zaffre hover:text-zaffre aria-pressed:border-zaffre aria-pressed:bg-zaffre-wash aria-pressed:font-semibold aria-pressed:text-zaffre"
                            >
                              {each.partner + 1}
                            </button>
                          ))}
                        </span>
                      </td>
                    </tr>
                  );
                }),
              )}
            </tbody>
          </table>
        </section>
        <p className="mt-2 max-w-prose text-xs text-ink-soft">
          Arrows come from the projection operator of the irrep, without translations and rotations. Symmetry fixes them
          where an irrep occurs once; where it occurs more often, equal masses and plain springs settle the mixture of
          stretch and bend, so that in a real complex it will differ.
        </p>
      </div>
    </div>
  );
}
