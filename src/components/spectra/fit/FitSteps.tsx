import type { FitStep } from '#src/chem/spectra/fit/fit-steps.ts';
import { formatNumber } from '#src/components/notation/quantity.ts';
import type { Fitting } from './useFit.ts';

const whole = (value: number) => formatNumber(Math.round(value), 6);

/** A step in words. */
export function stepText(step: FitStep): string {
  switch (step.operation) {
    case 'range': {
      const { from, to } = step.parameters;
      if (from === null && to === null) return 'Fit the whole curve';
      return `Fit from ${from === null ? 'the lower end' : `${whole(from)} cm⁻¹`} to ${to === null ? 'the upper end' : `${whole(to)} cm⁻¹`}`;
    }
    case 'smooth': {
      const { halfWidth } = step.parameters;
      return halfWidth > 0 ? `Smooth by parabolas over ± ${whole(halfWidth)} cm⁻¹` : 'Do not smooth';
    }
    case 'baseline': {
      const { baseline } = step.parameters;
      if (!baseline) return 'Take no base line off';
      const kind = baseline.kind === 'line' ? 'a straight base line' : 'a base line of scattering, ν̄⁴,';
      return `Take off ${kind} through ${whole(baseline.from)} and ${whole(baseline.to)} cm⁻¹`;
    }
    case 'settings': {
      const { shape, count, edge, constant } = step.parameters;
      const bands = count === null ? 'bands by AICc' : `${count} ${count === 1 ? 'band' : 'bands'}`;
      const edges = edge === null ? 'edge by AICc' : edge ? 'with an edge' : 'no edge';
      return `${shape[0]!.toUpperCase()}${shape.slice(1)}, ${bands}, ${edges}${constant ? ', with a constant' : ''}`;
    }
    case 'pick':
      return 'Pick maxima and shoulders by the derivatives';
    case 'find':
      return 'Fit from nothing';
    case 'refine':
      return 'Fit from these components';
    case 'add':
      return `Add a component at ${whole(step.parameters.wavenumber)} cm⁻¹`;
    case 'remove':
      return `Remove component ${step.parameters.component + 1}`;
    case 'set': {
      const { component, wavenumber, height, fwhm } = step.parameters;
      const parts = [
        wavenumber === undefined ? null : `position ${whole(wavenumber)} cm⁻¹`,
        height === undefined ? null : `height ${formatNumber(height, 4)}`,
        fwhm === undefined ? null : `width ${whole(fwhm)} cm⁻¹`,
      ];
      return `Set component ${component + 1}: ${parts.filter(Boolean).join(', ')}`;
    }
    case 'lock': {
      const { component, part, locked } = step.parameters;
      const name = { wavenumber: 'position', height: 'height', fwhm: 'width' }[part];
      return `${locked ? 'Lock' : 'Unlock'} the ${name} of component ${component + 1}`;
    }
  }
}

/** Every step that led here; those taken back stand struck through until another step is made. */
export function FitSteps({ work }: { work: Fitting['work'] }) {
  const { entries, done } = work;
  if (entries.length === 0) return null;
  return (
    <details>
      <summary className="cursor-pointer text-xs text-ink-soft hover:text-zaffre">
        {done} {done === 1 ? 'step' : 'steps'}, stored with the bands so that others get the same numbers
      </summary>
      <ol className="mt-2 list-decimal pl-6 text-xs">
        {entries.map(({ step }, i) => (
          <li key={i} className={i < done ? '' : 'text-ink-soft line-through'}>
            {stepText(step)}
          </li>
        ))}
      </ol>
    </details>
  );
}
