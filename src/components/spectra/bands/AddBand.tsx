import { type FormEvent, useState } from 'react';
import { Button } from '#src/components/ui/Button.tsx';
import { Select, TextInput } from '#src/components/ui/controls.tsx';
import { readNumber } from '../upload/read-number.ts';
import { HEIGHTS } from '../words.ts';
import type { BandDraft } from './band-list.ts';

interface AddBandProps {
  quantity: BandDraft['quantity'];
  heightAt: (wavenumber: number) => number | null;
  onAdd: (band: Pick<BandDraft, 'wavenumber' | 'height' | 'fwhm' | 'shoulder' | 'found'>) => void;
}

/** A band by its numbers, for one that no maximum shows. */
export function AddBand({ quantity, heightAt, onAdd }: AddBandProps) {
  const [position, setPosition] = useState('');
  const [unit, setUnit] = useState<'cm-1' | 'nm'>('cm-1');
  const [height, setHeight] = useState('');
  const [errors, setErrors] = useState<{ position?: string; height?: string }>({});

  const add = (event: FormEvent) => {
    event.preventDefault();
    const place = readNumber(position);
    const wavenumber = unit === 'nm' && place ? 1e7 / place : place;
    if (wavenumber === null || !(wavenumber >= 1000 && wavenumber <= 120_000))
      return setErrors({ position: 'From 1000 to 120 000 cm⁻¹, that is 83 nm to 10 µm' });
    const told = readNumber(height);
    const value = told ?? heightAt(wavenumber);
    if (value === null || Number.isNaN(value))
      return setErrors({ height: told === null ? 'The curve has no point there; write the height' : 'Write a number' });
    onAdd({ wavenumber, height: value, fwhm: null, shoulder: false, found: 'typed' });
    setPosition('');
    setHeight('');
    setErrors({});
  };
  return (
    <form onSubmit={add} className="flex flex-wrap items-start gap-2" aria-label="Add a band by its numbers">
      <TextInput
        label="Position"
        figures
        inputMode="decimal"
        className="w-32"
        value={position}
        error={errors.position}
        onChange={(event) => setPosition(event.currentTarget.value)}
      />
      <Select
        label="Unit"
        className="w-24"
        value={unit}
        options={[
          { value: 'cm-1', label: 'cm⁻¹' },
          { value: 'nm', label: 'nm' },
        ]}
        onChange={(event) => setUnit(event.currentTarget.value as 'cm-1' | 'nm')}
      />
      <TextInput
        label={`${HEIGHTS[quantity]}, empty: of the curve`}
        figures
        inputMode="decimal"
        className="w-44"
        value={height}
        error={errors.height}
        onChange={(event) => setHeight(event.currentTarget.value)}
      />
      <Button type="submit" className="mt-[22px]">
        Add the band
      </Button>
    </form>
  );
}
