import { Plus, X } from 'lucide-react';
import { useId } from 'react';
import { solvents } from '#src/chem/spectra/solvents.ts';
import { Button } from '#src/components/ui/Button.tsx';
import { Select, TextArea, TextInput } from '#src/components/ui/controls.tsx';
import { CONTROL } from '#src/components/ui/Field.tsx';
import { PHASES, TECHNIQUES } from '../words.ts';
import {
  type ConditionErrors,
  type ConditionsDraft,
  epsilonNeeds,
  givesEpsilon,
  UNIT_TEXT,
} from './conditions-draft.ts';

export interface ConditionFieldsProps {
  draft: ConditionsDraft;
  change: (part: Partial<ConditionsDraft>) => void;
  /** What cannot be sent as it is typed, and what the server refused. */
  errors: ConditionErrors;
  /** The quantity of the file, for what ε still needs. */
  yUnit: string | null;
  /** The lab the visibility speaks of. */
  labName: string;
}

type TextName = {
  [K in keyof ConditionsDraft]: ConditionsDraft[K] extends string ? K : never;
}[keyof ConditionsDraft];

const options = (words: Record<string, string>) => Object.entries(words).map(([value, label]) => ({ value, label }));

/** How a spectrum was measured. */
export function ConditionFields({ draft, change, errors, yUnit, labName }: ConditionFieldsProps) {
  const needs = epsilonNeeds(draft, yUnit);
  const text = (name: TextName) => ({
    value: draft[name],
    error: errors[name],
    onChange: (event: { currentTarget: { value: string } }) =>
      change({ [name]: event.currentTarget.value } as Partial<ConditionsDraft>),
  });
  const figures = { figures: true, inputMode: 'decimal' as const, autoComplete: 'off' };
  return (
    <div className="flex flex-col gap-4">
      <div className="grid grid-cols-[repeat(auto-fit,minmax(180px,1fr))] gap-3">
        <Select label="Technique" options={options(TECHNIQUES)} {...text('technique')} />
        <Select label="Phase" options={[{ value: '', label: 'not stated' }, ...options(PHASES)]} {...text('phase')} />
        <TextInput label="Temperature / K" {...figures} {...text('temperature')} />
      </div>
      <Solvents parts={draft.solvents} error={errors.solvents} onChange={(parts) => change({ solvents: parts })} />
      <div className="grid grid-cols-[repeat(auto-fit,minmax(150px,1fr))] items-start gap-3">
        <TextInput label="Entity concentration" {...figures} {...text('concentration')} />
        <TextInput label="Its uncertainty ±" {...figures} {...text('concentrationUncertainty')} />
        <Select label="Unit of both" options={options(UNIT_TEXT)} {...text('concentrationUnit')} />
        <TextInput label="Path length / cm" {...figures} {...text('pathLength')} />
        <TextInput label="Its uncertainty ± / cm" {...figures} {...text('pathLengthUncertainty')} />
        <Select
          label="Coverage factor k"
          options={[
            { value: '1', label: '1, standard' },
            { value: '2', label: '2, about 95 %' },
            { value: '3', label: '3' },
          ]}
          {...text('k')}
        />
      </div>
      <p role="status" className={`min-h-5 ${needs ? 'text-alert' : 'text-attest'}`}>
        {needs ?? (yUnit !== null && givesEpsilon(draft.technique) ? 'ε is given, per mole of the entity.' : '')}
      </p>
      <details>
        <summary className="min-h-6 w-fit text-zaffre">Medium, instrument settings and notes</summary>
        <div className="mt-3 grid grid-cols-[repeat(auto-fit,minmax(180px,1fr))] items-start gap-3">
          <TextInput label="pH" {...figures} {...text('pH')} />
          <TextInput label="Ionic strength / mol dm⁻³" {...figures} {...text('ionicStrength')} />
          <TextInput label="Electrolyte" hint="Such as 0.1 M HClO4" maxLength={200} {...text('electrolyte')} />
          <TextInput label="Atmosphere" maxLength={200} {...text('atmosphere')} />
          <TextInput label="Time since dissolution" maxLength={100} {...text('age')} />
          <TextInput label="Spectral bandwidth / nm" {...figures} {...text('bandwidth')} />
          <TextInput label="Cell" maxLength={200} {...text('cell')} />
          <TextInput label="Polarisation" maxLength={200} {...text('polarisation')} />
          <TextInput label="Operator" maxLength={200} {...text('operator')} />
          <TextInput label="Measured on" type="date" {...text('measuredAt')} />
          <Select
            label="Seen by"
            options={[
              { value: 'programme', label: 'every lab of the programme' },
              { value: 'lab', label: `${labName} only` },
            ]}
            {...text('visibility')}
          />
          <TextArea label="Notes" className="col-span-full" maxLength={10_000} {...text('notes')} />
        </div>
      </details>
    </div>
  );
}

interface SolventsProps {
  parts: ConditionsDraft['solvents'];
  error: string | undefined;
  onChange: (parts: ConditionsDraft['solvents']) => void;
}

/** The solvent, or the parts of a mixture. Names with a known cut-off are suggested; any other may be typed. */
function Solvents({ parts, error, onChange }: SolventsProps) {
  const id = useId();
  const isMixture = parts.length > 1;
  const set = (at: number, part: Partial<(typeof parts)[number]>) =>
    onChange(parts.map((one, i) => (i === at ? { ...one, ...part } : one)));
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-xs text-ink-soft">
        {isMixture ? 'Solvents, with their parts of the volume' : 'Solvent'}
      </legend>
      <datalist id={`${id}-names`}>
        {solvents.map(({ name, cutoffNm }) => (
          <option key={name} value={name}>
            {`transparent from ${cutoffNm} nm`}
          </option>
        ))}
      </datalist>
      <div className="flex flex-col gap-2">
        {parts.map(({ name, percent }, i) => (
          <div key={i} className="flex items-center gap-2">
            <input
              type="text"
              list={`${id}-names`}
              aria-label={isMixture ? `Solvent ${i + 1}` : 'Solvent'}
              aria-invalid={error ? true : undefined}
              aria-describedby={error ? `${id}-error` : undefined}
              autoComplete="off"
              maxLength={100}
              value={name}
              onChange={(event) => set(i, { name: event.currentTarget.value })}
              className={`${CONTROL} max-w-72`}
            />
            {isMixture && (
              <>
                <input
                  type="text"
                  inputMode="decimal"
                  aria-label={`Share of solvent ${i + 1} in per cent`}
                  value={percent}
                  onChange={(event) => set(i, { percent: event.currentTarget.value })}
                  className={`${CONTROL} num max-w-20`}
                />
                <span aria-hidden="true">%</span>
                <button
                  type="button"
                  aria-label={`Remove solvent ${i + 1}`}
                  onClick={() => onChange(parts.filter((_, at) => at !== i))}
                  className="grid size-7 place-items-center rounded text-ink-soft hover:bg-zaffre-wash"
                >
                  <X aria-hidden="true" size={15} />
                </button>
              </>
            )}
          </div>
        ))}
      </div>
      {error && (
        <p id={`${id}-error`} className="mt-1 text-xs font-medium text-alert">
          {error}
        </p>
      )}
      {parts.length < 6 && (
        <Button
          size="small"
          kind="quiet"
          className="mt-1"
          onClick={() => onChange([...parts, { name: '', percent: '' }])}
        >
          <Plus aria-hidden="true" size={13} />
          {isMixture ? 'Another part' : 'It is a mixture'}
        </Button>
      )}
    </fieldset>
  );
}
