import { Lock, LockOpen, Trash2 } from 'lucide-react';
import { componentArea } from '#src/chem/spectra/fit/components.ts';
import { combinedPositionError } from '#src/chem/spectra/fit/fit-bands.ts';
import { COMPONENT_PARTS, type ComponentPart, type FitComponent } from '#src/chem/spectra/fit/fit-steps.ts';
import { oscillatorStrength } from '#src/chem/spectra/oscillator-strength.ts';
import { transitionDipole } from '#src/chem/spectra/transition-dipole.ts';
import { Quantity, Unit } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { Button } from '#src/components/ui/Button.tsx';
import { NumberInput } from '../bands/NumberInput.tsx';
import type { Fitting } from './useFit.ts';

interface ComponentTableProps {
  fitting: Fitting;
  /** Symbol of the height. */
  symbol: string;
  /** Whether heights are ε, from which intensities follow. */
  isEpsilon: boolean;
  /** nm */
  bandwidth: number | null;
}

const NAMES: Record<ComponentPart, string> = { wavenumber: 'position', height: 'height', fwhm: 'width' };

/** Components by their numbers, to be typed and locked, with what follows from each. */
export function ComponentTable({ fitting, symbol, isEpsilon, bandwidth }: ComponentTableProps) {
  const { state, make, wavelengthCheck, refractiveIndex } = fitting;
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
    <section aria-label="Components of the fit" tabIndex={0} className="relative overflow-x-auto">
      <table className="table table-compact">
        <thead>
          <tr>
            <th scope="col">
              <span className="sr-only">Component</span>
            </th>
            <th scope="col">
              position / <Unit unit="cm-1" />
            </th>
            <th scope="col">{symbol}</th>
            <th scope="col">
              FWHM / <Unit unit="cm-1" />
            </th>
            <th scope="col" className="text-right!">
              area
            </th>
            {isEpsilon && (
              <>
                <th scope="col" className="text-right!">
                  <i>f</i>
                </th>
                <th scope="col" className="text-right!">
                  |<i>μ</i>| / D
                </th>
              </>
            )}
            <th scope="col">
              <span className="sr-only">Remove</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {state.components.map((component, i) => {
            const area = componentArea(state.settings.shape, component);
            const { errors, wavenumber } = component;
            const position =
              errors &&
              combinedPositionError(wavenumber, errors.wavenumber, {
                wavelengthCheck: wavelengthCheck ?? undefined,
                bandwidth: bandwidth ?? undefined,
              });
            return (
              <tr key={i}>
                <td className="num align-top! pt-4!">{i + 1}</td>
                {COMPONENT_PARTS.map((part) => (
                  <td key={part} className="align-top!">
                    <PartField
                      {...{ component, part, fitting }}
                      index={i}
                      error={part === 'wavenumber' ? position : (errors?.[part] ?? null)}
                    />
                  </td>
                ))}
                <Derived value={area} share={errors && shareOf(errors.area, area)} />
                {isEpsilon && (
                  <>
                    <Derived value={oscillatorStrength(area)} share={errors && shareOf(errors.area, area)} />
                    <Derived
                      value={transitionDipole(area / wavenumber, refractiveIndex)}
                      share={errors && shareOf(errors.area, 2 * area)}
                    />
                  </>
                )}
                <td className="text-right! align-top! pt-3!">
                  <Button
                    size="small"
                    aria-label={`Remove component ${i + 1}`}
                    onClick={() => make({ operation: 'remove', parameters: { component: i } })}
                  >
                    <Trash2 aria-hidden="true" size={14} />
                  </Button>
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </section>
  );
}

const shareOf = (error: number | null, value: number) => (error === null ? null : Math.abs(error / value));

/** What follows from a component, and the part of it that its standard error is. */
function Derived({ value, share }: { value: number; share: number | null }) {
  return (
    <td className="num text-right! align-top! pt-4!">
      <Quantity value={value} figures={3} />
      <p className="mt-1 text-xs text-ink-soft">{share !== null && `± ${formatNumber(100 * share, 2)} %`}</p>
    </td>
  );
}

interface PartFieldProps {
  component: FitComponent;
  part: ComponentPart;
  index: number;
  error: number | null;
  fitting: Fitting;
}

function PartField({ component, part, index, error, fitting: { make } }: PartFieldProps) {
  const isLocked = component.locked[part];
  const name = `${NAMES[part]} of component ${index + 1}`;
  const value = part === 'height' ? Number(component.height.toPrecision(5)) : Number(component[part].toFixed(1));
  return (
    <div className="flex items-start gap-1">
      <div className="w-24">
        <NumberInput
          label={<span className="sr-only">{name}</span>}
          value={value}
          {...(part === 'height' ? {} : { check: (typed: number) => (typed > 0 ? null : 'More than nought') })}
          onCommit={(typed) =>
            typed !== null && make({ operation: 'set', parameters: { component: index, [part]: typed } })
          }
        />
        <p className="num mt-0.5 min-h-4 text-xs text-ink-soft">
          {isLocked ? 'locked' : error !== null && `± ${formatNumber(error, 2)}`}
        </p>
      </div>
      <button
        type="button"
        aria-pressed={isLocked}
        aria-label={`Lock ${name}`}
        title={isLocked ? `Unlock ${name}` : `Lock ${name}`}
        onClick={() => make({ operation: 'lock', parameters: { component: index, part, locked: !isLocked } })}
        className="mt-2.5 grid size-7 place-items-center rounded text-ink-soft hover:text-zaffre aria-pressed:bg-zaffre-wash aria-pressed:text-zaffre"
      >
        {isLocked ? <Lock aria-hidden="true" size={14} /> : <LockOpen aria-hidden="true" size={14} />}
      </button>
    </div>
  );
}
