import { CSPProvider } from '@base-ui/react/csp-provider';
import { Dialog as Base } from '@base-ui/react/dialog';
import { X } from 'lucide-react';
import type { ReactNode } from 'react';

interface DialogProps {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: ReactNode;
  /** What this is about, read aloud with the title. */
  description?: ReactNode;
  children?: ReactNode;
  /** The buttons, primary one last. */
  actions?: ReactNode;
  width?: 'narrow' | 'wide';
}

/** Something that must be settled before one goes on. Focus stays inside, Escape leaves. */
export function Dialog({ open, onOpenChange, title, description, children, actions, width = 'narrow' }: DialogProps) {
  return (
    <CSPProvider disableStyleElements>
      <Base.Root open={open} onOpenChange={(next) => onOpenChange(next)}>
        <Base.Portal>
          <Base.Backdrop className="fixed inset-0 z-40 bg-[#11131a]/40" />
          <Base.Popup
            className={`specimen fixed top-1/2 left-1/2 z-50 flex max-h-[calc(100dvh-2rem)] w-[calc(100vw-2rem)] -translate-x-1/2 -translate-y-1/2 flex-col shadow-float ${width === 'wide' ? 'max-w-3xl' : 'max-w-lg'}`}
          >
            <div className="flex items-start gap-4 px-5 pt-4">
              <Base.Title className="text-lg font-semibold">{title}</Base.Title>
              <Base.Close
                aria-label="Close"
                className="ml-auto grid size-7 place-items-center rounded text-ink-soft hover:bg-zaffre-wash"
              >
                <X aria-hidden="true" size={16} />
              </Base.Close>
            </div>
            <div className="overflow-y-auto px-5 pt-1 pb-5">
              {description && <Base.Description className="text-ink-soft">{description}</Base.Description>}
              {children && <div className="mt-3">{children}</div>}
            </div>
            {actions && <div className="flex justify-end gap-2 border-t border-hairline px-5 py-3">{actions}</div>}
          </Base.Popup>
        </Base.Portal>
      </Base.Root>
    </CSPProvider>
  );
}
