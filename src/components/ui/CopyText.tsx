import { Check, Copy } from 'lucide-react';
import { useState } from 'react';

/** A text to be taken elsewhere, in figures, with a button that copies it. */
export function CopyText({ label, text }: { label: string; text: string }) {
  const [copied, setCopied] = useState<boolean | null>(null);
  const copy = () => {
    navigator.clipboard.writeText(text).then(
      () => setCopied(true),
      () => setCopied(false),
    );
  };
  return (
    <div>
      <p className="mb-1 text-ink-soft">{label}</p>
      <div className="flex items-start gap-2">
        <code className="num min-w-0 flex-1 rounded border border-hairline bg-porcelain px-2 py-1 break-all whitespace-pre-wrap select-all">
          {text}
        </code>
        <button
          type="button"
          onClick={copy}
          aria-label={`Copy: ${label}`}
          className="grid size-7 flex-none place-items-center rounded border border-hairline text-ink-soft hover:border-zaffre hover:text-zaffre"
        >
          {copied ? <Check aria-hidden="true" size={14} /> : <Copy aria-hidden="true" size={14} />}
        </button>
      </div>
      <p role="status" className="text-ink-soft">
        {copied === true && 'Copied'}
        {copied === false && 'Copying is not allowed here: select the text instead'}
      </p>
    </div>
  );
}
