import { useDeferredValue, useEffect, useMemo, useState } from 'react';
import type { RegisterDraft } from './draft.ts';
import { type Attempt, attemptReading, soleEntity } from './reading.ts';
import { settle } from './settle.ts';

type Chemistry = typeof import('./chemistry.ts');

/** The chemistry, fetched once the page is drawn; null until it is there. */
function useChemistry(): { chemistry: Chemistry | null; failure: unknown } {
  const [chemistry, setChemistry] = useState<Chemistry | null>(null);
  const [failure, setFailure] = useState<unknown>(null);
  useEffect(() => {
    import('./chemistry.ts').then(setChemistry, setFailure);
  }, []);
  return { chemistry, failure };
}

/** The reading of a draft, and what follows from it. Typing goes first: the reading comes after the keystrokes. */
export function useReading({ formula, answered, choices }: RegisterDraft) {
  const { chemistry, failure } = useChemistry();
  const typed = useDeferredValue(useMemo(() => ({ formula, answered }), [formula, answered]));
  const chosen = useDeferredValue(choices);

  const attempt = useMemo<Attempt | null>(
    () => (chemistry ? attemptReading(chemistry.readFormula, typed.formula, typed.answered) : null),
    [chemistry, typed],
  );
  const entity = attempt?.kind === 'read' ? soleEntity(attempt.reading) : null;
  const settled = useMemo(
    () => (chemistry && entity ? settle(chemistry, entity, chosen) : null),
    [chemistry, entity, chosen],
  );
  const isLate = typed.formula !== formula || typed.answered !== answered || chosen !== choices;
  return { chemistry, failure, attempt, entity, settled, isLate };
}
