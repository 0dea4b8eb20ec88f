import { Check, Copy } from 'lucide-react';
import { useState } from 'react';

interface CopyButtonProps {
  text: string;
  /** What is copied: "accession", "band list". */
  what: string;
  /** Words beside the sign; without them the sign stands alone. */
  label?: string;
}

/** Takes a text to the clipboard, and says whether that went well. */
export function CopyButton({ text, what, label }: CopyButtonProps) {
  const [state, setState] = useState<'idle' | 'done' | 'refused'>('idle');
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(text);
      setState('done');
    } catch {
      setState('refused'); // browsers may forbid it; the text stands in the page to be marked by hand
    }
    setTimeout(() => setState('idle'), 2500);
  };
  const said = { idle: '', done: 'copied', refused: 'not allowed by the browser' }[state];
  return (
    <span className="inline-flex items-center gap-1.5">
      <button
        type="button"
        onClick={copy}
        aria-label={label ? undefined : `Copy ${what}`}
        title={`Copy ${what}`}
        className="inline-flex min-h-6 min-w-6 items-center justify-center gap-1.5 rounded text-xs text-ink-soft hover:text-zaffre"
      >
        {state === 'done' ? <Check aria-hidden="true" size={14} /> : <Copy aria-hidden="true" size={14} />}
        {label}
      </button>
      <span role="status" className="text-xs text-ink-soft">
        {said}
      </span>
    </span>
  );
}
