import { PointGroup, Term } from '#src/components/notation/index.tsx';

/** Address of a group, or of a term in it, on the symmetry page. */
export const groupAddress = (group: string, from?: string): string =>
  `/symmetry?${new URLSearchParams({ group, ...(from ? { from } : {}) })}${from ? '#selection' : ''}`;

/** The symbol of a group that leads to its tables. */
export function GroupLink({ group }: { group: string }) {
  return (
    <a href={groupAddress(group)} className="link" aria-label={`Group ${group} on the symmetry page`}>
      <PointGroup group={group} />
    </a>
  );
}

/** A term that leads to what can be said of it in its group. */
export function TermLink({ term, group }: { term: string; group: string }) {
  return (
    <a href={groupAddress(group, term)} className="link" aria-label={`Term ${term} of ${group} on the symmetry page`}>
      <Term term={term} />
    </a>
  );
}
