import { Formula } from '../notation/index.tsx';

/** The name of a record; of a complex its accession in figures, its formula set as one. */
export function SubjectName({ type, name }: { type: string; name: string }) {
  const [, accession, formula] = (type === 'complex' && /^([A-Z]{1,4}\d{6}-\S) (\[.+)$/.exec(name)) || [];
  if (!accession || !formula) return name;
  return (
    <>
      <span className="num">{accession}</span> <Formula formula={formula} />
    </>
  );
}
