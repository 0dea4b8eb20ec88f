import type { PreparationInput } from '#src/contracts/complexes.ts';

/** What is typed of a new preparation; empty where nothing is. */
export interface PreparationDraft {
  label: string;
  lab: string;
  formula: string;
  form: '' | NonNullable<PreparationInput['form']>;
  preparedOn: string;
  storage: string;
  atmosphere: string;
  notes: string;
  visibility: 'programme' | 'lab';
}

export const emptyPreparation = (lab: string): PreparationDraft => ({
  label: '',
  lab,
  formula: '',
  form: '',
  preparedOn: '',
  storage: '',
  atmosphere: '',
  notes: '',
  visibility: 'programme',
});

/** What is sent: only what was typed. */
export function preparationInput(draft: PreparationDraft, answers: Record<string, string>): PreparationInput {
  const { label, lab, visibility, form, ...texts } = draft;
  const told = Object.fromEntries(
    Object.entries(texts)
      .map(([name, text]) => [name, text.trim()])
      .filter(([, text]) => text !== ''),
  );
  return {
    label: label.trim(),
    lab,
    visibility,
    ...told,
    ...(form ? { form } : {}),
    ...(Object.keys(answers).length > 0 ? { answers } : {}),
  };
}
