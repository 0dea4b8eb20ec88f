import type { ReactNode } from 'react';
import { DCount, Formula, PointGroup } from '#src/components/notation/index.tsx';
import { Button } from '#src/components/ui/Button.tsx';
import { Chip } from '#src/components/ui/Chip.tsx';
import { type Chosen, type ComplexView, chosenOf, withoutFilters } from './view.ts';
import { bandClassWords, type GeometryNames, oxidationWords, spinWords, stateWords } from './words.ts';

interface ChosenFiltersProps {
  view: ComplexView;
  names: GeometryNames;
  labNames: Readonly<Record<string, string>>;
  onChange: (view: ComplexView) => void;
}

/** What is chosen, each to be taken away with a click. */
export function ChosenFilters({ view, names, labNames, onChange }: ChosenFiltersProps) {
  const chosen = chosenOf(view);
  if (chosen.length === 0) return null;
  return (
    <ul aria-label="Chosen filters" className="flex flex-wrap items-center gap-2">
      {chosen.map((one) => (
        <li key={one.key}>
          <Chip onRemove={() => onChange(one.without)} name={`the filter ${one.value}`}>
            {setChosen(one, names, labNames)}
          </Chip>
        </li>
      ))}
      {chosen.length > 1 && (
        <li>
          <Button kind="quiet" size="small" onClick={() => onChange(withoutFilters(view))}>
            Clear all
          </Button>
        </li>
      )}
    </ul>
  );
}

function setChosen(
  { filter, value }: Chosen,
  names: GeometryNames,
  labNames: Readonly<Record<string, string>>,
): ReactNode {
  switch (filter) {
    case 'geometry':
      return names[value] ?? value;
    case 'dCount':
      return <DCount count={Number(value)} />;
    case 'pointGroup':
      return <PointGroup group={value} />;
    case 'oxidationState':
      return `oxidation state ${oxidationWords(value)}`;
    case 'spinState':
      return spinWords(value);
    case 'ligand':
      return <Formula formula={value} />;
    case 'lab':
      return labNames[value] ?? 'a lab';
    case 'bandClass':
      return `a ${bandClassWords(value)} band`;
    case 'state':
      return stateWords(value);
    case 'folio':
      return 'one folio';
    case 'q':
      return `“${value}”`;
    case 'substructure':
      return (
        <>
          fragment <span className="num">{value}</span>
        </>
      );
    default:
      return value;
  }
}
