import type { AnchorHTMLAttributes, ButtonHTMLAttributes } from 'react';

export type ButtonKind = 'primary' | 'plain' | 'quiet' | 'danger';

const KIND: Record<ButtonKind, string> = {
  primary: 'border-zaffre bg-zaffre text-on-zaffre hover:bg-zaffre-deep hover:border-zaffre-deep',
  plain: 'border-hairline bg-glaze text-ink hover:border-zaffre hover:text-zaffre',
  quiet: 'border-transparent text-zaffre hover:bg-zaffre-wash',
  danger: 'border-alert-line bg-glaze text-alert hover:bg-alert-wash hover:border-alert',
};

/** The classes of a button, for elements that are buttons by looks only (links in .astro files, menu triggers). */
export function buttonClass(kind: ButtonKind = 'plain', size: 'normal' | 'small' = 'normal'): string {
  const space = size === 'small' ? 'min-h-7 px-2.5 py-0.5 text-xs' : 'min-h-9 px-3.5 py-1.5';
  return `inline-flex items-center justify-center gap-2 whitespace-nowrap rounded border no-underline ${space} ${KIND[kind]}
    disabled:pointer-events-none disabled:border-hairline disabled:bg-transparent disabled:text-ink-soft`.replace(
    /\s+/g,
    ' ',
  );
}

interface Looks {
  kind?: ButtonKind;
  size?: 'normal' | 'small';
}

/** A button; of type `button` unless it says `submit`. */
export function Button({
  kind,
  size,
  className = '',
  type = 'button',
  ...rest
}: Looks & ButtonHTMLAttributes<HTMLButtonElement>) {
  return <button {...rest} type={type} className={`${buttonClass(kind, size)} ${className}`} />;
}

/** A link that looks like a button: it goes somewhere. */
export function ButtonLink({
  kind,
  size,
  className = '',
  children,
  ...rest
}: Looks & AnchorHTMLAttributes<HTMLAnchorElement>) {
  return (
    <a {...rest} className={`${buttonClass(kind, size)} ${className}`}>
      {children}
    </a>
  );
}
