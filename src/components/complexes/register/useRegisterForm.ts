import { type RefObject, useCallback, useEffect, useMemo, useRef } from 'react';
import { useDraft } from '#src/components/ui/useDraft.ts';
import { emptyDraft, type RegisterDraft } from './draft.ts';
import { type Answered, answersOf, isSalt } from './reading.ts';
import { type Choices, settledInput, subjectOf } from './settle.ts';
import { useReading } from './useReading.ts';
import { type Registration, useRegistration } from './useRegistration.ts';

/** The formula field keeps its own text, so that what is typed before the page wakes up is not lost. */
function useFormulaField(draft: RegisterDraft, change: (part: Partial<RegisterDraft>) => void) {
  const field = useRef<HTMLInputElement>(null);
  useEffect(() => {
    if (field.current?.value) change({ formula: field.current.value, answered: [] });
  }, []);
  useEffect(() => {
    if (field.current && field.current.value !== draft.formula) field.current.value = draft.formula;
  }, [draft.formula]);
  return field as RefObject<HTMLInputElement>;
}

/** All of the registration: the draft, its reading, and the sending. */
export function useRegisterForm(labs: readonly { id: string; name: string }[]) {
  const initial = useMemo(() => emptyDraft(labs[0]?.id ?? ''), [labs]);
  const { draft, change, clear } = useDraft('register', initial);
  const reading = useReading(draft);
  const field = useFormulaField(draft, change);
  const registration = useRegistration((accession) => {
    clear();
    location.assign(`/complexes/${accession}`);
  });

  const { attempt, entity, settled, isLate } = reading;
  const read = attempt?.kind === 'read' ? attempt.reading : null;
  const open = read?.questions ?? [];
  const salt = read !== null && isSalt(read);
  const lab = labs.some(({ id }) => id === draft.lab) ? draft.lab : initial.lab;

  /** Another text is another question: answers belong to the text they were given for. */
  const type = useCallback(
    (formula: string) => {
      registration.forgetProblem();
      change({ formula, answered: [], preparation: 'ask' });
    },
    [change, registration.forgetProblem],
  );
  const answer = ({ question, value }: Answered) =>
    change({
      answered: [...draft.answered.filter((one) => one.question.code !== question.code), { question, value }],
    });
  const choose = (part: Omit<Choices, 'of'>) => {
    if (!entity) return;
    registration.forgetProblem();
    const of = subjectOf(entity);
    const kept = draft.choices.of === of ? draft.choices : {};
    // Another polyhedron has other isomers and spin states.
    const { isomer: _i, spinState: _s, ...rest } = kept as Choices;
    change({ choices: { ...('geometry' in part ? rest : kept), ...part, of } });
  };

  const obstacle = !attempt
    ? 'The reader is being fetched'
    : attempt.kind === 'empty'
      ? 'Type a formula first'
      : attempt.kind === 'refused'
        ? 'The formula cannot be read yet'
        : open.length > 0
          ? 'Answer the question first'
          : !entity
            ? 'Register each complex on its own'
            : isLate
              ? 'Reading'
              : salt && draft.preparation === 'now' && draft.label.trim() === ''
                ? 'The preparation needs a label'
                : null;

  const send = (state: 'draft' | 'registered') => {
    if (obstacle || !settled || registration.isSending) return;
    const answers = answersOf(draft.answered);
    const told = draft.answered.length > 0 ? { answers } : {};
    const { visibility } = draft;
    const notes = draft.notes.trim();
    const formula = draft.formula.trim();
    const body: Registration = {
      complex: { formula, ...told, ...settledInput(settled), lab, visibility, state, ...(notes ? { notes } : {}) },
      preparation:
        salt && draft.preparation === 'now' ? { label: draft.label.trim(), lab, formula, ...told, visibility } : null,
    };
    registration.register(body);
  };

  return {
    draft,
    change,
    field,
    type,
    answer,
    choose,
    send,
    obstacle,
    lab,
    read,
    open,
    salt,
    ...reading,
    ...registration,
  };
}

export type RegisterForm = ReturnType<typeof useRegisterForm>;
