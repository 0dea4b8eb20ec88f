import { type RefObject, useId } from 'react';
import { CONTROL } from '#src/components/ui/Field.tsx';
import type { Attempt } from './reading.ts';

interface FormulaFieldProps {
  field: RefObject<HTMLInputElement>;
  onType: (formula: string) => void;
  attempt: Attempt | null;
  /** The text that was read; what is in the field may be a keystroke ahead. */
  formula: string;
}

/** The one field of a registration, and under it where and why the text cannot be read. */
export function FormulaField({ field, onType, attempt, formula }: FormulaFieldProps) {
  const id = useId();
  const refusal = attempt?.kind === 'refused' ? attempt : null;
  return (
    <div className="flex flex-col gap-1">
      <label htmlFor={id} className="text-xs text-ink-soft">
        Formula, as you would write it. Salts and solvates are read too.
      </label>
      <input
        ref={field}
        id={id}
        type="text"
        defaultValue=""
        onInput={(event) => onType(event.currentTarget.value)}
        aria-describedby={refusal ? `${id}-refusal` : undefined}
        aria-invalid={refusal ? true : undefined}
        autoComplete="off"
        autoCapitalize="off"
        autoCorrect="off"
        spellCheck={false}
        maxLength={500}
        className={`${CONTROL} num min-h-14 text-lg`}
      />
      <div id={`${id}-refusal`} role="status" className="text-alert">
        {refusal && (
          <>
            {refusal.position !== null && <Marked text={formula} position={refusal.position} />}
            <p className="flex gap-1.5 font-medium">
              <span aria-hidden="true">▲</span>
              <span>
                {refusal.message}
                {refusal.position !== null && !/at character/.test(refusal.message) && (
                  <span className="font-normal text-ink-soft"> (at character {refusal.position + 1})</span>
                )}
              </span>
            </p>
          </>
        )}
      </div>
    </div>
  );
}

/** The text again with a mark under the place that is meant. */
function Marked({ text, position }: { text: string; position: number }) {
  const at = Math.min(position, text.length);
  return (
    <p aria-hidden="true" className="num overflow-x-auto px-3 pt-1.5 pb-1 text-lg leading-tight whitespace-pre">
      <span className="text-ink-soft">{text.slice(0, at)}</span>
      <span className="border-b-2 border-alert bg-alert-wash font-medium">{text.charAt(at) || '\u00a0'}</span>
      <span className="text-ink-soft">{text.slice(at + 1)}</span>
    </p>
  );
}
