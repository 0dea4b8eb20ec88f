import type { Caution } from '#src/chem/cautions/index.ts';
import { Panel } from '#src/components/ui/Panel.tsx';

interface CautionsPanelProps {
  /** Null while the formula cannot be read. */
  cautions: readonly Caution[] | null;
  sentences: { NO_CAUTION_COMPUTED: string; NO_RULE_MATCHED: string; STANDING_SENTENCE: string };
}

/** The usual cautions for what was typed. That no rule matched is never said to mean anything. */
export function CautionsPanel({ cautions, sentences }: CautionsPanelProps) {
  return (
    <Panel title="Cautions">
      {cautions === null && <p>{sentences.NO_CAUTION_COMPUTED}</p>}
      {cautions?.length === 0 && <p>{sentences.NO_RULE_MATCHED}</p>}
      {cautions && cautions.length > 0 && (
        <ul className="flex flex-col gap-2.5">
          {cautions.map(({ id, detail, codes, source }) => (
            <li key={id}>
              <p className="text-alert">{detail}</p>
              <p className="text-xs text-ink-soft">
                {codes.length > 0 && <span className="num mr-2">{codes.join(' ')}</span>}
                {source}
              </p>
            </li>
          ))}
        </ul>
      )}
      <p className="mt-3 text-xs text-ink-soft">{sentences.STANDING_SENTENCE}</p>
    </Panel>
  );
}
