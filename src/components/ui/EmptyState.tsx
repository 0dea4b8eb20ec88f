import type { ReactNode } from 'react';

/** Says that there is nothing, why, and what one can do about it. */
export function EmptyState({ title, children, action }: { title: string; children?: ReactNode; action?: ReactNode }) {
  return (
    <div className="flex flex-col items-start gap-2 border border-dashed border-hairline px-6 py-8">
      <p className="text-base font-semibold">{title}</p>
      {children && <div className="max-w-prose text-ink-soft">{children}</div>}
      {action && <div className="mt-2 flex gap-2">{action}</div>}
    </div>
  );
}
