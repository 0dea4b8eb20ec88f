import { BAND_STYLES } from '#src/components/marks/band-classes.ts';
import { Unit } from '#src/components/notation/index.tsx';
import { Checkbox, Select, TextInput } from '#src/components/ui/controls.tsx';
import { HEIGHTS } from '../words.ts';
import type { BandClass, BandDraft } from './band-list.ts';
import { NumberInput } from './NumberInput.tsx';

/** What the complex offers to an assignment. */
export interface AssignmentChoices {
  ligands: readonly string[];
  /** Element of each centre, by its place. */
  centres: readonly string[];
  /** Ground term of the one centre, in plain text. */
  groundTerm: string | null;
}

interface BandRowFieldsProps {
  band: BandDraft;
  choices: AssignmentChoices;
  onEdit: (part: Partial<BandDraft>) => void;
}

const CLASSES = Object.entries(BAND_STYLES).map(([value, { letter, name }]) => ({
  value,
  label: `${letter}  ${name}`,
}));

/** Bounds of the contract, cm⁻¹. */
const inRange = (wavenumber: number) => (wavenumber >= 1000 && wavenumber <= 120_000 ? null : 'From 1000 to 120 000');
const aboveNought = (width: number) => (width > 0 ? null : 'It must be more than nought');

/** Everything that is told of one band. */
export function BandRowFields({ band, choices, onEdit }: BandRowFieldsProps) {
  const chooseClass = (kind: BandClass) =>
    onEdit({
      class: kind,
      // A d–d band starts from the ground term unless somebody says otherwise.
      ...(kind === 'd-d' && band.from === '' && choices.groundTerm ? { from: choices.groundTerm } : {}),
    });
  return (
    <div className="grid grid-cols-2 items-start gap-3 md:grid-cols-4 bg-porcelain px-3 py-3">
      <NumberInput
        label={
          <>
            wavenumber / <Unit unit="cm-1" />
          </>
        }
        value={band.wavenumber}
        check={inRange}
        onCommit={(wavenumber) => wavenumber !== null && onEdit({ wavenumber, found: 'typed' })}
      />
      <NumberInput
        label={`height, ${HEIGHTS[band.quantity]}`}
        value={band.height}
        onCommit={(height) => height !== null && onEdit({ height })}
      />
      <NumberInput
        label={
          <>
            FWHM / <Unit unit="cm-1" />
          </>
        }
        value={band.fwhm}
        isOptional
        check={aboveNought}
        onCommit={(fwhm) => onEdit({ fwhm })}
      />
      <Select
        label="Class"
        value={band.class}
        options={CLASSES}
        onChange={(event) => chooseClass(event.currentTarget.value as BandClass)}
      />
      <TextInput
        label="From"
        hint="A term or orbital, such as 4A2g"
        figures
        maxLength={100}
        value={band.from}
        onChange={(event) => onEdit({ from: event.currentTarget.value })}
      />
      <TextInput
        label="To"
        figures
        maxLength={100}
        value={band.to}
        onChange={(event) => onEdit({ to: event.currentTarget.value })}
      />
      <Select
        label="Ligand"
        value={band.ligand}
        options={[
          { value: '', label: 'none' },
          ...[...new Set([...choices.ligands, band.ligand])]
            .filter((ligand) => ligand !== '')
            .map((ligand) => ({ value: ligand, label: ligand })),
        ]}
        onChange={(event) => onEdit({ ligand: event.currentTarget.value })}
      />
      {choices.centres.length > 1 && (
        <Select
          label="Centre"
          value={band.centre === undefined ? '' : String(band.centre)}
          options={[
            { value: '', label: 'not stated' },
            ...choices.centres.map((element, i) => ({ value: String(i), label: `${i + 1}: ${element}` })),
          ]}
          onChange={({ currentTarget: { value } }) => onEdit({ centre: value === '' ? undefined : Number(value) })}
        />
      )}
      <Checkbox
        label="shoulder"
        className="md:mt-6"
        checked={band.shoulder}
        onChange={(event) => onEdit({ shoulder: event.currentTarget.checked })}
      />
      <TextInput
        label="Reason"
        className="col-span-full"
        maxLength={2000}
        value={band.reason}
        onChange={(event) => onEdit({ reason: event.currentTarget.value })}
      />
    </div>
  );
}
