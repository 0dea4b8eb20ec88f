import { type ReactNode, useId } from 'react';

interface SegmentedProps<V extends string> {
  /** Says what is chosen; read aloud, and shown only with `showLabel`. */
  label: string;
  showLabel?: boolean;
  options: readonly { value: V; label: ReactNode; disabled?: boolean }[];
  value: V | null;
  onChange: (value: V) => void;
  /** `cards`: choices apart from each other, for geometry, spin state and the like. */
  look?: 'joined' | 'cards';
}

const JOINED = {
  group: 'inline-flex overflow-hidden rounded border border-hairline bg-glaze text-xs',
  choice:
    'flex min-h-7 cursor-pointer items-center px-2.5 text-ink-soft hover:text-zaffre has-checked:bg-zaffre-wash has-checked:font-medium has-checked:text-zaffre has-focus-visible:outline-2 has-focus-visible:-outline-offset-2 has-focus-visible:outline-zaffre has-disabled:cursor-not-allowed has-disabled:opacity-50',
};
const CARDS = {
  group: 'flex flex-wrap gap-2.5',
  choice:
    'flex min-h-9 cursor-pointer items-center rounded border border-hairline bg-glaze px-3.5 py-1.5 hover:border-zaffre has-checked:border-zaffre has-checked:bg-zaffre-wash has-checked:font-semibold has-checked:text-zaffre has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-zaffre has-disabled:cursor-not-allowed has-disabled:opacity-50',
};

/** One of a few, all in sight. Native radio buttons underneath, so arrows and forms work as everywhere. */
export function Segmented<V extends string>({
  label,
  showLabel = false,
  options,
  value,
  onChange,
  look = 'joined',
}: SegmentedProps<V>) {
  const name = useId();
  const style = look === 'joined' ? JOINED : CARDS;
  return (
    <fieldset className="min-w-0">
      <legend className={showLabel ? 'mb-1 text-xs text-ink-soft' : 'sr-only'}>{label}</legend>
      <div className={style.group}>
        {options.map((option) => (
          <label key={option.value} className={style.choice}>
            <input
              type="radio"
              name={name}
              className="sr-only"
              value={option.value}
              checked={option.value === value}
              disabled={option.disabled}
              onChange={() => onChange(option.value)}
            />
            {option.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
