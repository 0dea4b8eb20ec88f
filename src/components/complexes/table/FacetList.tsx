import { type ReactNode, useId, useState } from 'react';
import { CONTROL } from '#src/components/ui/Field.tsx';
import type { FacetCount } from '#src/contracts/common.ts';

interface FacetListProps {
  title: string;
  facet: readonly FacetCount[];
  chosen: readonly string[];
  onToggle: (value: string) => void;
  /** How a value is set; its own text unless given. */
  show?: (value: string, label: string | undefined) => ReactNode;
  /** What a value is called when it is searched for and read aloud. */
  nameOf?: (value: string, label: string | undefined) => string;
  /** A field over the list that narrows it. */
  isSearchable?: boolean;
}

/** The values of a filter with how many complexes each would leave; any number may be chosen. */
export function FacetList({
  title,
  facet,
  chosen,
  onToggle,
  show = (value, label) => label ?? value,
  nameOf = (value, label) => label ?? value,
  isSearchable = false,
}: FacetListProps) {
  const id = useId();
  const [text, setText] = useState('');
  const known = facet.map(({ value, count, label }) => ({ value: String(value), count, label }));
  // What is chosen stays in the list although other filters leave nothing of it.
  const lost = chosen
    .filter((value) => !known.some((one) => one.value === value))
    .map((value) => ({ value, count: 0, label: undefined }));
  const wanted = text.trim().toLowerCase();
  const rows = [...known, ...lost].filter(
    ({ value, label }) => chosen.includes(value) || nameOf(value, label).toLowerCase().includes(wanted),
  );
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-xs text-ink-soft">{title}</legend>
      {isSearchable && known.length > 8 && (
        <input
          type="search"
          aria-label={`Narrow the list: ${title.toLowerCase()}`}
          value={text}
          onChange={(event) => setText(event.currentTarget.value)}
          placeholder="narrow the list"
          className={`${CONTROL} mb-1 min-h-7! py-0.5! text-xs`}
        />
      )}
      {rows.length === 0 && <p className="text-xs text-ink-soft">none</p>}
      <ul className="-mx-1.5 max-h-[134px] overflow-y-auto">
        {rows.map(({ value, count, label }) => {
          const isChosen = chosen.includes(value);
          return (
            <li key={value}>
              <label
                className={`flex min-h-[26px] cursor-pointer items-center gap-2 rounded-sm px-1.5 hover:text-zaffre has-focus-visible:outline-2 has-focus-visible:-outline-offset-2 has-focus-visible:outline-zaffre ${isChosen ? 'bg-zaffre-wash font-semibold text-zaffre' : ''}`}
              >
                <input
                  type="checkbox"
                  name={`${id} ${value}`}
                  className="sr-only"
                  checked={isChosen}
                  onChange={() => onToggle(value)}
                />
                <span className="min-w-0 flex-1 truncate">
                  {show(value, label)}
                  {isChosen && <span aria-hidden="true"> ✓</span>}
                </span>
                <span className="num text-xs text-ink-soft">{count === 0 ? '–' : count}</span>
              </label>
            </li>
          );
        })}
      </ul>
    </fieldset>
  );
}
