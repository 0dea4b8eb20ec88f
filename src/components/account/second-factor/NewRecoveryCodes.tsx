import { useEffect, useRef } from 'react';
import { Button } from '../../ui/Button.tsx';
import { CopyText } from '../../ui/CopyText.tsx';
import { saveText } from '../../ui/save-text.ts';
import { recoveryCodesFile } from './recovery-codes-file.ts';

/** Recovery codes, shown this once. */
export function NewRecoveryCodes({ codes, onKept }: { codes: readonly string[]; onKept: () => void }) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => heading.current?.focus(), []);
  const save = () =>
    saveText('zaffre-recovery-codes.txt', recoveryCodesFile(codes, location.origin, new Date()), 'text/plain');
  return (
    <section className="specimen mb-5 px-5 py-4" aria-labelledby="new-recovery-codes">
      <h3 id="new-recovery-codes" ref={heading} tabIndex={-1} className="text-base font-semibold outline-none">
        Your recovery codes
      </h3>
      <p className="mt-0.5 mb-3 max-w-prose text-ink-soft">
        Shown this once. Each signs you in one time in place of a second factor, should you lose yours. Keep them apart
        from your password, printed or in a password manager.
      </p>
      <div className="max-w-lg">
        <CopyText label="Ten codes, one a line" text={codes.join('\n')} />
      </div>
      <div className="mt-2 flex flex-wrap gap-2">
        <Button onClick={save}>Download as text</Button>
        <Button kind="primary" onClick={onKept}>
          I have kept them
        </Button>
      </div>
    </section>
  );
}
