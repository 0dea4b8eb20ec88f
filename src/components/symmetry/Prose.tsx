import { DCount, Operation } from '#src/components/notation/index.tsx';
import { prosePieces } from './prose-pieces.ts';

/** A sentence of the core with its d-counts, axes, mirrors and directions set as chemistry. */
export function Prose({ text }: { text: string }) {
  return prosePieces(text).map((piece, i) => {
    if (typeof piece === 'string') return piece;
    if ('direction' in piece) return <i key={i}>{piece.direction}</i>;
    return 'count' in piece ? <DCount key={i} count={piece.count} /> : <Operation key={i} label={piece.operation} />;
  });
}
