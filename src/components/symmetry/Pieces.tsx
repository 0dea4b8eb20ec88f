import { Irrep, IrrepSum, Operation, PointGroup, Term, Unit } from '#src/components/notation/index.tsx';
import type { Piece } from './pieces.ts';

/** A sentence with its chemistry set as chemistry. */
export function Pieces({ pieces }: { pieces: readonly Piece[] }) {
  return pieces.map((piece, i) => <One key={i} piece={piece} />);
}

function One({ piece }: { piece: Piece }) {
  if (typeof piece === 'string') return piece;
  if ('term' in piece) return <Term term={piece.term} />;
  if ('irrep' in piece) return <Irrep irrep={piece.irrep} />;
  if ('group' in piece) return <PointGroup group={piece.group} />;
  if ('operation' in piece) return <Operation label={piece.operation} />;
  if ('sum' in piece) return <IrrepSum terms={piece.sum} className="whitespace-normal!" />;
  if ('unit' in piece) return <Unit unit={piece.unit} />;
  return <i>{piece.direction}</i>;
}
