import { Eye, EyeOff } from 'lucide-react';
import { type InputHTMLAttributes, useState } from 'react';
import { CONTROL, Field, type FieldTexts } from '../ui/Field.tsx';

type Props = FieldTexts & Omit<InputHTMLAttributes<HTMLInputElement>, 'type' | 'className'>;

/** A password with its label; it can be shown, and pasting works. */
export function PasswordInput({ label, hint, error, ...input }: Props) {
  const [shown, setShown] = useState(false);
  const Icon = shown ? EyeOff : Eye;
  return (
    <Field label={label} hint={hint} error={error}>
      {(control) => (
        <div className="relative">
          <input
            {...input}
            {...control}
            type={shown ? 'text' : 'password'}
            autoCapitalize="none"
            spellCheck={false}
            className={`${CONTROL} pr-11`}
          />
          <button
            type="button"
            aria-pressed={shown}
            aria-label="Show the password"
            onClick={() => setShown(!shown)}
            className="absolute inset-y-1 right-1 grid w-8 place-items-center rounded text-ink-soft hover:bg-zaffre-wash hover:text-zaffre"
          >
            <Icon aria-hidden="true" size={16} />
          </button>
        </div>
      )}
    </Field>
  );
}
