import type { Question } from '#src/chem/formula/index.ts';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import { Notice } from '#src/components/ui/StatusLine.tsx';
import type { Answered } from './reading.ts';

interface QuestionsProps {
  open: readonly Question[];
  answered: readonly Answered[];
  onAnswer: (answer: Answered) => void;
}

/** What the formula leaves open, as choices. Answered ones stay in sight, so that an answer can be changed. */
export function Questions({ open, answered, onAnswer }: QuestionsProps) {
  const unanswered = open.filter(({ code }) => !answered.some(({ question }) => question.code === code));
  const all = [
    ...answered.map(({ question, value }) => ({ question, value: value as string | null })),
    ...unanswered.map((question) => ({ question, value: null })),
  ];
  return all.map(({ question, value }) => (
    <Notice
      key={question.code}
      title={value === null ? 'Question:' : 'Answered:'}
      tone={value === null ? 'alert' : 'plain'}
    >
      {question.detail}
      <div className="mt-2.5">
        <Segmented
          label={question.detail}
          look="cards"
          options={question.choices.map((choice) => ({ value: choice.value, label: choice.label }))}
          value={value}
          onChange={(chosen) => onAnswer({ question, value: chosen })}
        />
      </div>
    </Notice>
  ));
}
