import { Quantity } from '#src/components/notation/index.tsx';
import { shortDay } from '#src/components/ui/dates.ts';
import { Facts, Panel } from '#src/components/ui/Panel.tsx';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';
import { PHASES, solventText, TECHNIQUES } from '../words.ts';

interface ConditionsPanelProps {
  spectrum: SpectrumRecord;
  /** Label of the preparation, where it is in sight. */
  preparation: string | null;
}

/** How it was measured, and what that says against the curve. */
export function ConditionsPanel({ spectrum, preparation }: ConditionsPanelProps) {
  const { medium, flags, warnings, species } = spectrum;
  const number = (value: number | null | undefined, unit: string, uncertainty?: number | null) =>
    value === null || value === undefined ? null : (
      <Quantity value={value} uncertainty={uncertainty} unit={unit} className="whitespace-normal!" />
    );
  const checked = [...flags, ...warnings];
  return (
    <Panel title="Conditions">
      <Facts
        facts={[
          ['Lab', spectrum.lab.name],
          ['Technique', TECHNIQUES[spectrum.technique]],
          ['Phase', spectrum.phase && (PHASES[spectrum.phase] ?? spectrum.phase)],
          ['Solvent', solventText(spectrum.solvent) ?? 'not stated'],
          [
            'Concentration',
            number(spectrum.concentration, 'mol dm-3', spectrum.concentrationUncertainty) ?? 'not stated',
          ],
          ['Path length', number(spectrum.pathLength, 'cm', spectrum.pathLengthUncertainty) ?? 'not stated'],
          ['Temperature', number(spectrum.temperature, 'K')],
          ['pH', medium.pH ?? null],
          ['Ionic strength', number(medium.ionicStrength, 'mol dm-3')],
          ['Electrolyte', medium.electrolyte || null],
          ['Atmosphere', medium.atmosphere || null],
          ['Since dissolution', medium.age || null],
          ['Bandwidth', number(spectrum.bandwidth, 'nm')],
          ['Cell', spectrum.cell],
          ['Polarisation', spectrum.polarisation],
          ['Preparation', preparation && <span className="num">{preparation}</span>],
          [
            'Species',
            species.length > 1
              ? `mixture of ${species.map(({ accession }) => accession).join(', ')}; no ε is given`
              : null,
          ],
          ['Instrument', spectrum.instrument?.name ?? null],
          ['Operator', spectrum.operator],
          ['Measured', spectrum.measuredAt && shortDay(spectrum.measuredAt)],
          ['Seen by', spectrum.visibility === 'lab' ? `${spectrum.lab.name} only` : 'every lab of the programme'],
          ['Notes', spectrum.notes && <span className="whitespace-pre-line">{spectrum.notes}</span>],
        ]}
      />
      <h3 className="mt-4 mb-1 text-sm">Checks</h3>
      {checked.length === 0 ? (
        <p className="text-ink-soft">
          {spectrum.technique === 'solution'
            ? 'No check speaks against it: solvent cut-off, absorbance range, flat top, base line, conditions.'
            : 'Only solutions have checks here; none was made.'}
        </p>
      ) : (
        <ul className="flex flex-col gap-1">
          {checked.map(({ code, detail }) => (
            <li key={`${code} ${detail}`} className="flex gap-1.5">
              <span aria-hidden="true" className="text-alert">
                ▲
              </span>
              <span className="min-w-0 first-letter:uppercase">{detail}</span>
            </li>
          ))}
        </ul>
      )}
      {spectrum.concentrationUncertainty !== null && (
        <p className="mt-2 text-xs text-ink-soft">Uncertainties are standard, k = 1.</p>
      )}
    </Panel>
  );
}
