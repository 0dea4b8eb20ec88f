import {
  type InputHTMLAttributes,
  type ReactNode,
  type SelectHTMLAttributes,
  type TextareaHTMLAttributes,
  useId,
} from 'react';
import { CONTROL, Field, type FieldTexts } from './Field.tsx';

type WithField<T> = FieldTexts & Omit<T, 'className'> & { className?: string; figures?: boolean };

/** A line of text with its label. `figures` sets it in the mono font, for numbers, formulas and accessions. */
export function TextInput({
  label,
  hint,
  error,
  className = '',
  figures,
  ...input
}: WithField<InputHTMLAttributes<HTMLInputElement>>) {
  return (
    <Field label={label} hint={hint} error={error} className={className}>
      {(control) => <input type="text" {...input} {...control} className={`${CONTROL} ${figures ? 'num' : ''}`} />}
    </Field>
  );
}

/** Several lines of text with their label. */
export function TextArea({
  label,
  hint,
  error,
  className = '',
  figures,
  ...area
}: WithField<TextareaHTMLAttributes<HTMLTextAreaElement>>) {
  return (
    <Field label={label} hint={hint} error={error} className={className}>
      {(control) => <textarea rows={3} {...area} {...control} className={`${CONTROL} ${figures ? 'num' : ''}`} />}
    </Field>
  );
}

export interface Option<V extends string = string> {
  value: V;
  label: string;
  disabled?: boolean;
}

/** A choice from a list, with its label. Options as data, or as children for groups. */
export function Select({
  label,
  hint,
  error,
  className = '',
  figures: _,
  options,
  children,
  ...select
}: WithField<SelectHTMLAttributes<HTMLSelectElement>> & { options?: readonly Option[] }) {
  return (
    <Field label={label} hint={hint} error={error} className={className}>
      {(control) => (
        <select {...select} {...control} className={`${CONTROL} pr-8`}>
          {options?.map(({ value, label: text, disabled }) => (
            <option key={value} value={value} disabled={disabled}>
              {text}
            </option>
          ))}
          {children}
        </select>
      )}
    </Field>
  );
}

/** A box to tick, its label at its right. */
export function Checkbox({
  label,
  hint,
  className = '',
  ...input
}: { label: ReactNode; hint?: ReactNode } & Omit<InputHTMLAttributes<HTMLInputElement>, 'type'>) {
  const id = useId();
  return (
    <div className={`grid grid-cols-[auto_1fr] items-start gap-x-2 ${className}`}>
      <input
        {...input}
        id={id}
        type="checkbox"
        aria-describedby={hint ? `${id}-hint` : undefined}
        className="m-1 size-4 accent-zaffre"
      />
      <label htmlFor={id} className="py-0.5">
        {label}
      </label>
      {hint && (
        <p id={`${id}-hint`} className="col-start-2 text-xs text-ink-soft">
          {hint}
        </p>
      )}
    </div>
  );
}
