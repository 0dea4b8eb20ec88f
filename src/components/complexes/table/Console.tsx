import { type ReactNode, useEffect, useId, useRef, useState } from 'react';
import { DBlock } from '#src/components/marks/DBlock.tsx';
import { DCount, Formula, PointGroup } from '#src/components/notation/index.tsx';
import { buttonClass } from '#src/components/ui/Button.tsx';
import { CONTROL } from '#src/components/ui/Field.tsx';
import type { FacetCount } from '#src/contracts/common.ts';
import { BandFilter } from './BandFilter.tsx';
import { FacetList } from './FacetList.tsx';
import { type ComplexView, changeView, type ListFilter, toggleValue } from './view.ts';
import { bandClassWords, type GeometryNames, oxidationWords, spinWords, stateWords } from './words.ts';

interface ConsoleProps {
  view: ComplexView;
  facets: Record<string, FacetCount[]>;
  names: GeometryNames;
  onChange: (view: ComplexView) => void;
  /** Stands at the right of the last row. */
  aside?: ReactNode;
}

const rising = (facet: readonly FacetCount[]) => [...facet].sort((a, b) => Number(a.value) - Number(b.value));

const MORE: readonly ListFilter[] = ['oxidationState', 'spinState', 'ligand', 'lab', 'bandClass', 'state'];
const CLASSES = ['d-d', 'LMCT', 'MLCT', 'intraligand', 'interligand', 'intervalence', 'metal-metal', 'unassigned'];

/** Everything one can filter by; what is asked most is always in sight. */
export function Console({ view, facets, names, onChange, aside }: ConsoleProps) {
  const hidden = MORE.filter((name) => view.lists[name].length > 0).length + (view.substructure ? 1 : 0);
  const [showsMore, setShowsMore] = useState(hidden > 0);
  const moreId = useId();
  const facet = (name: ListFilter) => ({
    facet: name === 'dCount' || name === 'oxidationState' ? rising(facets[name] ?? []) : (facets[name] ?? []),
    chosen: view.lists[name],
    onToggle: (value: string) => onChange(toggleValue(view, name, value)),
  });
  const nameOf = (symbol: string) => names[symbol] ?? symbol;
  return (
    <section aria-label="Filters" className="specimen px-[18px] pt-4 pb-3">
      <div className="grid grid-cols-[repeat(auto-fit,minmax(150px,1fr))] gap-x-7 gap-y-4 xl:grid-cols-[318px_1fr_1fr_1fr_330px]">
        <div className="col-span-2 xl:col-span-1">
          <DBlock
            counts={Object.fromEntries((facets.metal ?? []).map(({ value, count }) => [value, count]))}
            chosen={view.lists.metal}
            onToggle={(symbol) => onChange(toggleValue(view, 'metal', symbol))}
          />
        </div>
        <FacetList title="Geometry" {...facet('geometry')} show={nameOf} nameOf={nameOf} />
        <FacetList title="d-count" {...facet('dCount')} show={(n) => <DCount count={Number(n)} />} />
        <FacetList title="Point group" {...facet('pointGroup')} show={(group) => <PointGroup group={group} />} />
        <div className="col-span-2 xl:col-span-1">
          <BandFilter view={view} facet={facets.band ?? []} onChange={onChange} />
        </div>
      </div>
      {showsMore && (
        <div
          id={moreId}
          className="mt-3 grid grid-cols-[repeat(auto-fill,minmax(180px,1fr))] gap-x-7 gap-y-4 border-t border-faint pt-3"
        >
          <FacetList title="Oxidation state" {...facet('oxidationState')} show={oxidationWords} />
          <FacetList title="Spin state" {...facet('spinState')} show={spinWords} nameOf={spinWords} />
          <FacetList title="Ligand" {...facet('ligand')} show={(ligand) => <Formula formula={ligand} />} isSearchable />
          <FacetList title="Lab, home or measuring" {...facet('lab')} isSearchable />
          <div className="min-w-0">
            <p className="mb-1 text-xs text-ink-soft">Ligand holds the fragment</p>
            <SearchField
              label="Fragment of a ligand as SMILES"
              placeholder="SMILES, such as c1ccncc1"
              longest={500}
              value={view.substructure}
              onSet={(substructure) => onChange(changeView(view, { substructure }))}
            />
          </div>
          <Choices title="Has a band of class" values={CLASSES} {...facet('bandClass')} show={bandClassWords} />
          <Choices title="State" values={['draft', 'registered', 'withdrawn']} {...facet('state')} show={stateWords} />
        </div>
      )}
      <div className="mt-3 flex flex-wrap items-center gap-2 border-t border-faint pt-3">
        <SearchField
          label="Search by formula, accession, ligand or element"
          placeholder="formula, accession, ligand, element"
          longest={200}
          value={view.q}
          onSet={(q) => onChange(changeView(view, { q }))}
        />
        <button
          type="button"
          aria-expanded={showsMore}
          aria-controls={showsMore ? moreId : undefined}
          onClick={() => setShowsMore(!showsMore)}
          className={buttonClass('quiet', 'small')}
        >
          {showsMore ? 'Fewer filters' : 'More filters'}
          {!showsMore && hidden > 0 && ` (${hidden} in use)`}
        </button>
        <div className="ml-auto">{aside}</div>
      </div>
    </section>
  );
}

/** Values of which no counts are kept. */
function Choices({
  title,
  values,
  chosen,
  onToggle,
  show,
}: {
  title: string;
  values: readonly string[];
  chosen: readonly string[];
  onToggle: (value: string) => void;
  show: (value: string) => string;
}) {
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-xs text-ink-soft">{title}</legend>
      <div className="flex flex-wrap gap-1">
        {values.map((value) => (
          <label
            key={value}
            className={`flex min-h-6 cursor-pointer items-center rounded-sm px-1.5 text-xs hover:text-zaffre has-focus-visible:outline-2 has-focus-visible:outline-zaffre ${chosen.includes(value) ? 'bg-zaffre-wash font-semibold text-zaffre' : 'border border-hairline'}`}
          >
            <input
              type="checkbox"
              className="sr-only"
              checked={chosen.includes(value)}
              onChange={() => onToggle(value)}
            />
            {show(value)}
          </label>
        ))}
      </div>
    </fieldset>
  );
}

interface SearchFieldProps {
  label: string;
  placeholder: string;
  longest: number;
  value: string;
  onSet: (text: string) => void;
}

/** Text to look for, asked once the typing rests. */
function SearchField({ label, placeholder, longest, value, onSet }: SearchFieldProps) {
  const [text, setText] = useState(value);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const asked = useRef(value);
  useEffect(() => {
    // The field follows the address, but not the echo of its own typing.
    if (value !== asked.current) setText(value);
    asked.current = value;
  }, [value]);
  useEffect(() => () => clearTimeout(timer.current), []);
  return (
    <input
      type="search"
      aria-label={label}
      placeholder={placeholder}
      value={text}
      maxLength={longest}
      onChange={(event) => {
        const next = event.currentTarget.value;
        setText(next);
        clearTimeout(timer.current);
        timer.current = setTimeout(() => {
          asked.current = next;
          onSet(next);
        }, 300);
      }}
      className={`${CONTROL} max-w-[318px]`}
    />
  );
}
