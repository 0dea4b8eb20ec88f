import { CSPProvider } from '@base-ui/react/csp-provider';
import { Menu as Base } from '@base-ui/react/menu';
import { ChevronDown } from 'lucide-react';
import type { ReactNode } from 'react';
import { type ButtonKind, buttonClass } from './Button.tsx';

export interface MenuItem {
  label: ReactNode;
  /** An address to go to, or something to do. */
  href?: string;
  onSelect?: () => void;
  disabled?: boolean;
  danger?: boolean;
}

const ITEM =
  'flex min-h-8 cursor-pointer items-center px-3.5 py-1 no-underline outline-none data-highlighted:bg-zaffre-wash data-highlighted:text-zaffre data-disabled:text-ink-soft data-disabled:opacity-60';

/** A button that opens a list of things to do. */
export function Menu({ label, items, kind }: { label: ReactNode; items: readonly MenuItem[]; kind?: ButtonKind }) {
  return (
    <CSPProvider disableStyleElements>
      <Base.Root>
        <Base.Trigger className={buttonClass(kind)}>
          {label}
          <ChevronDown aria-hidden="true" size={14} />
        </Base.Trigger>
        <Base.Portal>
          <Base.Positioner sideOffset={4} align="end" className="z-40">
            <Base.Popup className="min-w-44 rounded border border-hairline bg-glaze py-1 shadow-float outline-none">
              {items.map(({ label: text, href, onSelect, disabled = false, danger }, i) => {
                const looks = `${ITEM} ${danger ? 'text-alert' : ''}`;
                return href ? (
                  <Base.LinkItem key={i} href={href} className={looks}>
                    {text}
                  </Base.LinkItem>
                ) : (
                  <Base.Item key={i} disabled={disabled} onClick={() => onSelect?.()} className={looks}>
                    {text}
                  </Base.Item>
                );
              })}
            </Base.Popup>
          </Base.Positioner>
        </Base.Portal>
      </Base.Root>
    </CSPProvider>
  );
}
