import type { Answered } from './reading.ts';
import type { Choices } from './settle.ts';

/** Everything a person typed or chose on the way to a registration; it outlives a reload. */
export interface RegisterDraft {
  formula: string;
  answered: Answered[];
  choices: Choices;
  lab: string;
  visibility: 'programme' | 'lab';
  notes: string;
  /** Whether a preparation is made along with the complex. */
  preparation: 'ask' | 'now' | 'later';
  label: string;
}

export const emptyDraft = (lab: string): RegisterDraft => ({
  formula: '',
  answered: [],
  choices: { of: '' },
  lab,
  visibility: 'programme',
  notes: '',
  preparation: 'ask',
  label: '',
});
