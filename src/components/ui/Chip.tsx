import { X } from 'lucide-react';
import type { ReactNode } from 'react';

/** A chosen filter or a tag; with `onRemove`, the whole chip takes it away. */
export function Chip({ children, onRemove, name }: { children: ReactNode; onRemove?: () => void; name?: string }) {
  const looks = 'inline-flex min-h-6 items-center gap-1 rounded bg-zaffre-wash px-2.5 py-0.5 text-zaffre';
  if (!onRemove) return <span className={looks}>{children}</span>;
  return (
    <button
      type="button"
      onClick={onRemove}
      className={`${looks} hover:text-ink`}
      aria-label={name && `Remove ${name}`}
    >
      {children}
      <X aria-hidden="true" size={13} strokeWidth={2.2} />
    </button>
  );
}
