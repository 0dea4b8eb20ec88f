import { Check, TriangleAlert } from 'lucide-react';
import type { ReactNode } from 'react';

/** What just happened, told to the eye and to a screen reader. It stays in the page while empty, or nobody hears it. */
export function StatusLine({ children, kind = 'done' }: { children?: ReactNode; kind?: 'done' | 'busy' | 'trouble' }) {
  const colour = { done: 'text-attest', busy: 'text-ink-soft', trouble: 'text-alert' }[kind];
  return (
    <div role="status" aria-live="polite" className={`flex min-h-6 items-center gap-1.5 text-xs ${colour}`}>
      {children && kind === 'done' && <Check aria-hidden="true" size={14} />}
      {children && kind === 'trouble' && <TriangleAlert aria-hidden="true" size={14} />}
      {children}
    </div>
  );
}

/** A caution or a doubt, in the words of the rule that raised it. */
export function Notice({
  title,
  children,
  tone = 'alert',
}: {
  title?: ReactNode;
  children: ReactNode;
  tone?: 'alert' | 'plain';
}) {
  const looks = tone === 'alert' ? 'border-alert-line bg-alert-wash' : 'border-hairline bg-zaffre-wash';
  return (
    <div className={`border px-4 py-3 ${looks}`}>
      {title && <b className={`mr-1.5 font-semibold ${tone === 'alert' ? 'text-alert' : 'text-zaffre'}`}>{title}</b>}
      {children}
    </div>
  );
}
