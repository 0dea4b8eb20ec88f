import type { FacetCount } from '../../contracts/common.ts';
import { CONTROL } from '../ui/Field.tsx';

interface ChooseProps {
  label: string;
  choices: readonly Pick<FacetCount, 'value' | 'count'>[];
  nameOf: (value: string) => string;
  onPick: (value: string) => void;
}

/** Choices with how many rows each would leave; a chosen one is taken away at its chip. */
export function Choose({ label, choices, nameOf, onPick }: ChooseProps) {
  return (
    <select
      aria-label={`Filter by ${label.toLowerCase()}`}
      value=""
      disabled={choices.length === 0}
      onChange={(event) => event.currentTarget.value && onPick(event.currentTarget.value)}
      className={`${CONTROL} w-auto! max-w-52 pr-8`}
    >
      <option value="">{label}</option>
      {choices.map(({ value, count }) => (
        <option key={value} value={String(value)}>
          {nameOf(String(value))}, {count}
        </option>
      ))}
    </select>
  );
}

interface DaysProps {
  from: string;
  to: string;
  onChange: (part: { from?: string; to?: string }) => void;
}

/** The days between which rows are shown, both included, in UTC. */
export function Days({ from, to, onChange }: DaysProps) {
  return (
    <fieldset className="flex items-center gap-2">
      <legend className="sr-only">Days, UTC</legend>
      <span aria-hidden="true" className="text-xs text-ink-soft">
        from
      </span>
      <input
        type="date"
        aria-label="From the day, UTC"
        value={from.slice(0, 10)}
        max={to.slice(0, 10) || undefined}
        onChange={(event) => onChange({ from: event.currentTarget.value })}
        className={`${CONTROL} w-auto!`}
      />
      <span aria-hidden="true" className="text-xs text-ink-soft">
        to
      </span>
      <input
        type="date"
        aria-label="To the day, UTC"
        value={to.slice(0, 10)}
        min={from.slice(0, 10) || undefined}
        onChange={(event) => onChange({ to: event.currentTarget.value })}
        className={`${CONTROL} w-auto!`}
      />
    </fieldset>
  );
}
