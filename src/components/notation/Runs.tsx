import { Fragment } from 'react';
import type { Run } from './runs.ts';

const ELEMENT = { sub: 'sub', sup: 'sup', italic: 'i' } as const;

interface RunsProps {
  runs: readonly Run[];
  /** How it is read aloud; without it the text itself is read. */
  label?: string | undefined;
  className?: string | undefined;
}

/** Runs as HTML with true sub and sup elements round plain characters, so that a copy reads back as it was typed. */
export function Runs({ runs, label, className = '' }: RunsProps) {
  const spoken = label === undefined ? {} : { role: 'math', 'aria-label': label };
  return (
    <span className={`whitespace-nowrap ${className}`} {...spoken}>
      {runs.map(({ text, style }, i) => {
        const Element = style === 'normal' ? Fragment : ELEMENT[style];
        return <Element key={i}>{text}</Element>;
      })}
    </span>
  );
}
