import { quietPlaces } from '#src/chem/spectra/baseline.ts';
import type { FitState } from '#src/chem/spectra/fit/fit-steps.ts';
import { Unit } from '#src/components/notation/index.tsx';
import { Checkbox, Select } from '#src/components/ui/controls.tsx';
import { NumberInput } from '../bands/NumberInput.tsx';
import type { Fitting } from './useFit.ts';

interface FitTreatmentProps {
  fitting: Fitting;
  /** Ends of the curve, cm⁻¹. */
  whole: { from: number; to: number };
}

const COUNTS = Array.from({ length: 10 }, (_, i) => ({ value: String(i + 1), label: String(i + 1) }));
const EDGES = { auto: null, yes: true, no: false } as const;
const perCm = (words: string) => (
  <>
    {words} / <Unit unit="cm-1" />
  </>
);

/** What is done to the curve before it is fitted, and what is fitted to it. */
export function FitTreatment({ fitting: { state, treated, make }, whole }: FitTreatmentProps) {
  const { range, smoothing, baseline, settings } = state;
  const set = (part: Partial<FitState['settings']>) =>
    make({ operation: 'settings', parameters: { ...settings, ...part } });
  const setRange = (part: Partial<FitState['range']>) =>
    make({ operation: 'range', parameters: { ...range, ...part } });
  const setBaseline = (part: Partial<NonNullable<FitState['baseline']>>) =>
    make({
      operation: 'baseline',
      parameters: { baseline: { kind: 'line', ...(baseline ?? places()), ...part } },
    });
  const places = () => {
    const { from, to } = quietPlaces(treated.x, treated.y) ?? whole;
    return { from: Math.round(from), to: Math.round(to) };
  };
  const edge = settings.edge === null ? 'auto' : settings.edge ? 'yes' : 'no';
  return (
    <div className="grid grid-cols-2 items-start gap-3 md:grid-cols-4">
      <NumberInput
        label={perCm('Fit from')}
        value={Math.round(range.from ?? whole.from)}
        onCommit={(from) => setRange({ from: from !== null && from > whole.from ? from : null })}
      />
      <NumberInput
        label={perCm('Fit to')}
        value={Math.round(range.to ?? whole.to)}
        onCommit={(to) => setRange({ to: to !== null && to < whole.to ? to : null })}
      />
      <NumberInput
        label={perCm('Smooth over ±')}
        value={smoothing || null}
        isOptional
        check={(value) => (value >= 0 && value <= 5000 ? null : 'From 0 to 5000')}
        onCommit={(halfWidth) => make({ operation: 'smooth', parameters: { halfWidth: halfWidth ?? 0 } })}
      />
      <Select
        label="Base line"
        value={baseline?.kind ?? 'none'}
        options={[
          { value: 'none', label: 'none' },
          { value: 'line', label: 'straight' },
          { value: 'scattering', label: 'scattering, ν̄⁴' },
        ]}
        onChange={({ currentTarget: { value } }) =>
          value === 'none'
            ? make({ operation: 'baseline', parameters: { baseline: null } })
            : setBaseline({ kind: value as 'line' | 'scattering' })
        }
      />
      {baseline && (
        <>
          <NumberInput
            label={perCm('Base line through')}
            value={Math.round(baseline.from)}
            onCommit={(from) => from !== null && setBaseline({ from })}
          />
          <NumberInput
            label={perCm('and through')}
            value={Math.round(baseline.to)}
            onCommit={(to) => to !== null && setBaseline({ to })}
          />
        </>
      )}
      <Select
        label="Shape of the bands"
        value={settings.shape}
        options={[
          { value: 'gaussian', label: 'Gaussian' },
          { value: 'lorentzian', label: 'Lorentzian' },
          { value: 'voigt', label: 'Voigt' },
        ]}
        onChange={({ currentTarget }) => set({ shape: currentTarget.value as FitState['settings']['shape'] })}
      />
      <Select
        label="Number of bands"
        value={settings.count === null ? 'auto' : String(settings.count)}
        options={[{ value: 'auto', label: 'by AICc' }, ...COUNTS]}
        onChange={({ currentTarget: { value } }) => set({ count: value === 'auto' ? null : Number(value) })}
      />
      <Select
        label="Charge-transfer edge"
        value={edge}
        options={[
          { value: 'auto', label: 'by AICc' },
          { value: 'yes', label: 'yes' },
          { value: 'no', label: 'none' },
        ]}
        onChange={({ currentTarget }) => set({ edge: EDGES[currentTarget.value as keyof typeof EDGES] })}
      />
      <Checkbox
        label="Constant under all bands"
        className="self-end pb-1"
        checked={settings.constant}
        onChange={({ currentTarget }) => set({ constant: currentTarget.checked })}
      />
    </div>
  );
}
