import { type ReactNode, useId } from 'react';

/** What ties a control to its label, hint and error. Spread it on the control. */
export interface ControlProps {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
}

export interface FieldTexts {
  label: ReactNode;
  /** Stands under the label: unit, format, example. */
  hint?: ReactNode;
  /** What is wrong and how to mend it. */
  error?: ReactNode;
}

/** A control with its label, hint and error; `children` draws the control with the props it is given. */
export function Field({
  label,
  hint,
  error,
  className = '',
  children,
}: FieldTexts & { className?: string; children: (control: ControlProps) => ReactNode }) {
  const id = useId();
  const hintId = hint ? `${id}-hint` : undefined;
  const errorId = error ? `${id}-error` : undefined;
  const describedBy = [errorId, hintId].filter(Boolean).join(' ') || undefined;
  return (
    <div className={`flex flex-col gap-1 ${className}`}>
      <label htmlFor={id} className="text-xs text-ink-soft">
        {label}
      </label>
      {children({ id, 'aria-describedby': describedBy, 'aria-invalid': error ? true : undefined })}
      {hint && (
        <p id={hintId} className="text-xs text-ink-soft">
          {hint}
        </p>
      )}
      {error && (
        <p id={errorId} className="flex gap-1.5 text-xs font-medium text-alert">
          <span aria-hidden="true">▲</span>
          {error}
        </p>
      )}
    </div>
  );
}

/** The looks of a box one types in. */
export const CONTROL =
  'w-full min-h-9 rounded border border-edge bg-glaze px-3 py-1.5 text-ink placeholder:text-ink-soft ' +
  'focus-visible:border-zaffre focus-visible:outline-3 focus-visible:outline-offset-0 focus-visible:outline-zaffre/25 ' +
  'aria-invalid:border-alert disabled:border-hairline disabled:text-ink-soft';
