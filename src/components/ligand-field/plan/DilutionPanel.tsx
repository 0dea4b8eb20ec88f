import { Unit } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { TextInput } from '#src/components/ui/controls.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { rough } from './PlannedBands.tsx';
import type { TypedLimits } from './plan-limits.ts';
import type { usePlan } from './usePlan.ts';

const FIELDS: { name: keyof TypedLimits; label: string }[] = [
  { name: 'low', label: 'Lowest absorbance' },
  { name: 'high', label: 'Highest absorbance' },
  { name: 'lowest', label: 'Lowest conc., mmol dm⁻³' },
  { name: 'highest', label: 'Highest conc., mmol dm⁻³' },
];

/** Solutions and cells that put each band where the instrument measures best. */
export function DilutionPanel({ page: { draft, change, limits, dilution } }: { page: ReturnType<typeof usePlan> }) {
  const edit = (name: keyof TypedLimits, value: string) => change({ limits: { ...draft.limits, [name]: value } });
  return (
    <Panel
      flush
      title="Dilution plan"
      aside={limits.limits && `absorbance ${draft.limits.low} to ${draft.limits.high}`}
    >
      <div className="no-print grid grid-cols-2 gap-3 px-[18px] pb-3 md:grid-cols-4">
        {FIELDS.map(({ name, label }) => (
          <TextInput
            key={name}
            label={label}
            figures
            inputMode="decimal"
            value={draft.limits[name]}
            error={limits.errors?.[name]}
            onChange={(event) => edit(name, event.currentTarget.value)}
          />
        ))}
        <TextInput
          label="Cells at hand: path lengths in cm"
          figures
          value={draft.limits.paths}
          error={limits.errors?.paths}
          onChange={(event) => edit('paths', event.currentTarget.value)}
          className="col-span-2 md:col-span-4"
        />
      </div>
      {dilution && dilution.dilutions.length > 0 && (
        <div className="overflow-x-auto border-t border-hairline">
          <table className="table table-compact">
            <thead>
              <tr>
                <th scope="col" className="!pl-[18px]">
                  Solution
                </th>
                <th scope="col" className="!text-right">
                  <Unit unit="mmol dm-3" />
                </th>
                <th scope="col" className="!text-right">
                  Path, cm
                </th>
                <th scope="col">
                  Bands at <Unit unit="cm-1" />, with their absorbance and its limits
                </th>
              </tr>
            </thead>
            <tbody>
              {dilution.dilutions.map(({ concentration, path, bands }, i) => (
                <tr key={`${concentration} ${path}`}>
                  <td className="!pl-[18px] text-ink">{i + 1}</td>
                  <td className="num text-right">{formatNumber(concentration * 1000, 2)}</td>
                  <td className="num text-right">{path}</td>
                  <td className="whitespace-normal">
                    {bands.map(({ wavenumber, absorbance, least, most }) => (
                      <span key={wavenumber} className="mr-4 inline-block whitespace-nowrap">
                        <span className="num">{formatNumber(wavenumber, 6)}</span>{' '}
                        <b className="num ml-1 font-medium">{absorbance.toFixed(2)}</b>{' '}
                        <span className="num text-xs text-ink-soft">
                          ({rough(least)} – {rough(most)})
                        </span>
                      </span>
                    ))}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
      {dilution && dilution.outOfReach.length > 0 && (
        <ul className="border-t border-faint px-[18px] py-3 text-xs text-ink-soft">
          {dilution.outOfReach.map(({ wavenumber, reason }) => (
            <li key={wavenumber}>
              <span className="num">{formatNumber(wavenumber, 6)}</span> <Unit unit="cm-1" />: {reason}.
            </li>
          ))}
        </ul>
      )}
      <p className="max-w-[95ch] border-t border-faint px-[18px] py-3 text-xs text-ink-soft">
        For the typical ε of a band of its kind. The limits of ε span a factor of a hundred: measure the first solution,
        then correct the others by what it showed. Ions that take up solvent or lose ligands on dilution do not follow
        the plan.
      </p>
    </Panel>
  );
}
