import { Select } from '#src/components/ui/controls.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import { SliderField } from '../panel/SliderField.tsx';
import { type LevelsState, LIMITS } from './levels-address.ts';

interface LevelsControlsProps {
  state: LevelsState;
  change: (part: Partial<LevelsState>) => void;
}

const PATHS = [
  { value: 'tetragonal', label: 'Octahedron to square plane, by way of trans-tetragonal' },
  { value: 'twist', label: 'Octahedron to trigonal prism, by a twist' },
  { value: 'flattening', label: 'Tetrahedron to square plane, by flattening' },
];

/** What a diagram is of. */
export function LevelsControls({ state, change }: LevelsControlsProps) {
  const { view, n, geometry, path } = state;
  const isField = view === 'ground' || view === 'absolute';
  const slider = (
    name: 'ratio' | 'max' | 'top' | 'B' | 'sigma' | 'pi',
    label: string,
    symbol: React.ReactNode,
    step: number,
  ) => (
    <SliderField
      name={label}
      symbol={symbol}
      value={state[name]}
      least={LIMITS[name][0]}
      most={LIMITS[name][1]}
      step={step}
      onChange={(value) => change({ [name]: Math.min(Math.max(value, LIMITS[name][0]), LIMITS[name][1]) })}
    />
  );
  return (
    <div className="flex flex-col gap-3">
      <Segmented
        label="d electrons"
        showLabel
        options={[1, 2, 3, 4, 5, 6, 7, 8, 9].map((count) => ({ value: String(count), label: String(count) }))}
        value={String(n)}
        onChange={(next) => change({ n: Number(next) })}
      />
      {isField && (
        <Segmented
          label="Field"
          showLabel
          options={[
            { value: 'OC-6', label: 'Octahedral' },
            { value: 'T-4', label: 'Tetrahedral' },
            { value: 'CU-8', label: 'Cubic' },
          ]}
          value={geometry}
          onChange={(next) => change({ geometry: next })}
        />
      )}
      {view === 'path' && (
        <Select
          label="Path"
          value={path}
          onChange={(event) => change({ path: event.currentTarget.value as LevelsState['path'] })}
          options={PATHS}
        />
      )}
      <div className="flex flex-col gap-0.5">
        {slider(
          'ratio',
          'C/B',
          <span className="text-xs whitespace-nowrap">
            <i>C</i>/<i>B</i>
          </span>,
          0.05,
        )}
        {view !== 'path' && slider('max', 'Largest Δ/B', <i>Δ</i>, 1)}
        {view !== 'orgel' && slider('top', 'Largest energy in B', <i>E</i>, 1)}
        {view === 'path' && (
          <>
            {slider('B', 'Racah parameter B in cm⁻¹', <i>B</i>, 5)}
            {slider(
              'sigma',
              'σ parameter of a ligand in cm⁻¹',
              <span>
                <i>e</i>
                <sub>σ</sub>
              </span>,
              50,
            )}
            {slider(
              'pi',
              'π parameter of a ligand in cm⁻¹',
              <span>
                <i>e</i>
                <sub>π</sub>
              </span>,
              50,
            )}
          </>
        )}
      </div>
      <p className="text-xs text-ink-soft">
        {view === 'path'
          ? 'Overlap model. Full lines are of a spin that is the ground level’s somewhere on the way; energies count from the ground level, the axis ends at E times B.'
          : view === 'orgel'
            ? 'Levels of highest spin only, from the ground term of the free ion.'
            : 'Full lines are of a spin that is the ground level’s somewhere in this range. A dotted upright marks where the ground level changes.'}
      </p>
    </div>
  );
}
