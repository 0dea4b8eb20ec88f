import { TextInput } from '#src/components/ui/controls.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import type { RegisterDraft } from './draft.ts';

interface PreparationStripProps {
  /** What of the typed text is not of the complex: "the counter-ion and water of crystallisation". */
  beside: string;
  draft: RegisterDraft;
  onChange: (part: Partial<RegisterDraft>) => void;
}

/** Asked once, when more than the entity was typed: whether the material is put on record along with it. */
export function PreparationStrip({ beside, draft, onChange }: PreparationStripProps) {
  const verb = beside.includes(' and ') || beside.endsWith('s') ? 'are' : 'is';
  const subject = beside.charAt(0).toUpperCase() + beside.slice(1);
  return (
    <section
      aria-label="Preparation"
      className="flex flex-wrap items-center gap-x-4 gap-y-2.5 border border-alert-line bg-alert-wash px-4 py-3"
    >
      <p className="min-w-60 flex-1">
        <b className="font-semibold text-alert">Asked once:</b> {subject} {verb} kept with the preparation, not with the
        complex. Make a preparation now?
      </p>
      <Segmented
        label="Make a preparation now?"
        look="cards"
        options={[
          { value: 'now', label: 'Yes, label it' },
          { value: 'later', label: 'Later' },
        ]}
        value={draft.preparation === 'ask' ? null : draft.preparation}
        onChange={(preparation) => onChange({ preparation })}
      />
      {draft.preparation === 'now' && (
        <TextInput
          label="Label of the preparation"
          hint="As on the vial, such as QN-114"
          className="w-full"
          maxLength={100}
          value={draft.label}
          onChange={(event) => onChange({ label: event.currentTarget.value })}
        />
      )}
    </section>
  );
}
