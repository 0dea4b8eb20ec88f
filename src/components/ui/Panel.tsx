import { type ReactNode, useId } from 'react';

interface PanelProps {
  title?: ReactNode;
  /** Controls next to the title. */
  controls?: ReactNode;
  /** Small text or buttons at the right. */
  aside?: ReactNode;
  /** The double cobalt rule, for what says who something is. */
  specimen?: boolean;
  /** No inner space at the sides, for tables. */
  flush?: boolean;
  className?: string;
  children: ReactNode;
}

/** A part of a screen on glaze, with a heading and something beside it. */
export function Panel({
  title,
  controls,
  aside,
  specimen = false,
  flush = false,
  className = '',
  children,
}: PanelProps) {
  const id = useId();
  const ground = specimen ? 'specimen' : 'panel border border-hairline bg-glaze';
  return (
    <section
      className={`${ground} ${flush ? 'pt-4' : 'px-[18px] py-4'} ${className}`}
      aria-labelledby={title ? id : undefined}
    >
      {(title || controls || aside) && (
        <div className={`mb-2.5 flex flex-wrap items-center gap-x-3 gap-y-1.5 ${flush ? 'px-[18px]' : ''}`}>
          {title && (
            <h2 id={id} className="text-base font-semibold">
              {title}
            </h2>
          )}
          {controls}
          {aside && <div className="ml-auto text-xs text-ink-soft">{aside}</div>}
        </div>
      )}
      {children}
    </section>
  );
}

/** Names and values in two columns, as on a specimen label. An entry whose value is null is left out. */
export function Facts({ facts }: { facts: readonly (readonly [name: ReactNode, value: ReactNode] | null)[] }) {
  return (
    <dl className="grid grid-cols-[auto_1fr] gap-x-3.5 gap-y-[5px]">
      {facts.map((fact, i) =>
        fact && fact[1] !== null && fact[1] !== undefined ? (
          <div key={i} className="contents">
            <dt className="text-ink-soft">{fact[0]}</dt>
            <dd className="min-w-0 break-words">{fact[1]}</dd>
          </div>
        ) : null,
      )}
    </dl>
  );
}
