import type { TypePart } from './schema-rows.ts';

/** A type in words; what is described elsewhere on the page is a link to it. */
export function TypeText({ type }: { type: readonly TypePart[] }) {
  return type.map((part, i) =>
    typeof part === 'string' ? (
      part
    ) : (
      <a key={i} href={`#schema-${part.schema}`} className="link">
        {part.schema}
      </a>
    ),
  );
}
