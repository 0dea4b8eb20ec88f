import { useEffect, useState } from 'react';
import { TextInput } from '#src/components/ui/controls.tsx';
import { numberText, readNumber } from '../upload/read-number.ts';

interface NumberInputProps {
  label: React.ReactNode;
  value: number | null;
  /** Whether the field may be emptied. */
  isOptional?: boolean;
  /** What is wrong with a number that can be read; null for nothing. */
  check?: (value: number) => string | null;
  onCommit: (value: number | null) => void;
}

/** A number that counts once it is whole: on leaving the field, or on Enter. */
export function NumberInput({ label, value, isOptional = false, check, onCommit }: NumberInputProps) {
  const [text, setText] = useState(numberText(value));
  const [error, setError] = useState<string | undefined>();
  useEffect(() => {
    setText(numberText(value));
    setError(undefined);
  }, [value]);

  const commit = () => {
    const read = readNumber(text);
    if (read === null && isOptional) {
      if (value !== null) onCommit(null);
      return setError(undefined);
    }
    if (read === null || Number.isNaN(read)) return setError('Write a number');
    const fault = check?.(read) ?? null;
    if (fault) return setError(fault);
    setError(undefined);
    if (numberText(read) !== numberText(value)) onCommit(read);
  };
  return (
    <TextInput
      label={label}
      figures
      inputMode="decimal"
      autoComplete="off"
      value={text}
      error={error}
      onChange={(event) => setText(event.currentTarget.value)}
      onBlur={commit}
      onKeyDown={(event) => event.key === 'Enter' && commit()}
    />
  );
}
