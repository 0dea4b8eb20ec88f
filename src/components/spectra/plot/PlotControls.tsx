import { Unit } from '../../notation/index.tsx';
import { Segmented } from '../../ui/Segmented.tsx';
import { type XUnit, Y_TITLES, type YUnit } from './units.ts';

const X_CHOICES = (['nm', 'cm-1', 'eV'] as const).map((value) => ({ value, label: <Unit unit={value} /> }));
const Y_LABELS: Partial<Record<YUnit, string>> = { epsilon: 'ε', 'log-epsilon': 'log ε', absorbance: 'A' };

interface PlotControlsProps {
  xUnit: XUnit;
  yUnit: YUnit;
  onXUnit: (unit: XUnit) => void;
  onYUnit: (unit: YUnit) => void;
  /** Quantities that can be shown; absorbance only where the concentration is not known. */
  yUnits?: readonly YUnit[];
}

/** Units of the two axes, to stand in the head of the panel that holds the plot. */
export function PlotControls({
  xUnit,
  yUnit,
  onXUnit,
  onYUnit,
  yUnits = ['epsilon', 'log-epsilon'],
}: PlotControlsProps) {
  return (
    <div className="flex flex-wrap items-center gap-2">
      <Segmented label="Horizontal axis" options={X_CHOICES} value={xUnit} onChange={onXUnit} />
      {yUnits.length > 1 && (
        <Segmented
          label="Vertical axis"
          options={yUnits.map((value) => ({ value, label: Y_LABELS[value] ?? Y_TITLES[value].name }))}
          value={yUnit}
          onChange={onYUnit}
        />
      )}
    </div>
  );
}
