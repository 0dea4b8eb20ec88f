import { useEffect, useRef, useState } from 'react';
import { BandWindow } from '#src/components/marks/BandWindow.tsx';
import { Unit } from '#src/components/notation/index.tsx';
import { TextInput } from '#src/components/ui/controls.tsx';
import type { FacetCount } from '#src/contracts/common.ts';
import { bandBins, type ComplexView, changeView, isFilterNumber } from './view.ts';

type Name = 'bandFrom' | 'bandTo' | 'minEpsilon';

interface BandFilterProps {
  view: ComplexView;
  facet: readonly FacetCount[];
  onChange: (view: ComplexView) => void;
}

/** A band in a window of wavelengths, of at least some ε: how many bands lie where, and the numbers. */
export function BandFilter({ view, facet, onChange }: BandFilterProps) {
  const from = view.bandFrom ? Number(view.bandFrom) : null;
  const to = view.bandTo ? Number(view.bandTo) : null;
  const set = (name: Name) => (text: string) => onChange(changeView(view, { [name]: text }));
  const reversed = from !== null && to !== null && from > to ? 'The window ends before it begins' : undefined;
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1.5 text-xs text-ink-soft">Has a band in this window</legend>
      <BandWindow
        counts={bandBins(facet)}
        window={from === null && to === null ? null : [Math.max(200, from ?? 200), Math.min(1100, to ?? 1100)]}
      />
      <div className="mt-2 grid max-w-[330px] grid-cols-3 gap-2">
        <NumberField label="from / nm" name="bandFrom" value={view.bandFrom} onSet={set('bandFrom')} error={reversed} />
        <NumberField label="to / nm" name="bandTo" value={view.bandTo} onSet={set('bandTo')} />
        <NumberField
          label={
            <span title="dm³ mol⁻¹ cm⁻¹">
              least <i>ε</i>
              <span className="sr-only">
                {' '}
                / <Unit unit="dm3 mol-1 cm-1" />
              </span>
            </span>
          }
          name="minEpsilon"
          value={view.minEpsilon}
          onSet={set('minEpsilon')}
        />
      </div>
    </fieldset>
  );
}

interface NumberFieldProps {
  label: React.ReactNode;
  name: Name;
  value: string;
  onSet: (text: string) => void;
  error?: string | undefined;
}

/** Waits until the typing rests; what is no number is told and not asked for. */
function NumberField({ label, name, value, onSet, error }: NumberFieldProps) {
  const [text, setText] = useState(value);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  useEffect(() => setText(value), [value]);
  useEffect(() => () => clearTimeout(timer.current), []);
  const fits = text.trim() === '' || isFilterNumber(name, text);
  return (
    <TextInput
      label={label}
      figures
      inputMode="decimal"
      name={name}
      value={text}
      error={fits ? error : 'A number above zero'}
      onChange={(event) => {
        const next = event.currentTarget.value;
        setText(next);
        clearTimeout(timer.current);
        if (next.trim() === '' || isFilterNumber(name, next)) timer.current = setTimeout(onSet, 400, next.trim());
      }}
    />
  );
}
