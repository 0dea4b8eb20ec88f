import { type ReactNode, useId } from 'react';
import { CONTROL } from '#src/components/ui/Field.tsx';

interface SliderFieldProps {
  /** Read aloud, with the unit. */
  name: string;
  symbol: ReactNode;
  value: number;
  least: number;
  most: number;
  step: number;
  onChange: (value: number) => void;
}

/** A slider with its number beside it, which can be typed. */
export function SliderField({ name, symbol, value, least, most, step, onChange }: SliderFieldProps) {
  const id = useId();
  return (
    <div className="grid grid-cols-[22px_minmax(0,1fr)_92px] items-center gap-x-2.5">
      <label htmlFor={id} className="text-center" title={name}>
        {symbol}
      </label>
      <input
        id={id}
        type="range"
        aria-label={name}
        min={least}
        max={most}
        step={step}
        value={value}
        onChange={(event) => onChange(event.currentTarget.valueAsNumber)}
        className="h-7 w-full min-w-0 accent-zaffre"
      />
      <input
        type="number"
        aria-label={`${name}, as a number`}
        min={least}
        max={most}
        step="any"
        value={step >= 1 ? Math.round(value) : Math.round(value * 100) / 100}
        onChange={(event) =>
          Number.isFinite(event.currentTarget.valueAsNumber) && onChange(event.currentTarget.valueAsNumber)
        }
        className={`${CONTROL} num !min-h-8 !px-2 !py-0.5 text-right`}
      />
    </div>
  );
}
