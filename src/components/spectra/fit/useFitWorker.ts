import { useCallback, useEffect, useRef, useState } from 'react';
import type { FitState } from '#src/chem/spectra/fit/fit-steps.ts';
import type { FitAnswer, FitQuestion } from './fit.worker.ts';

/** ms after which a person is told that something is at work. */
const PATIENCE = 1000;

/**
 * Makes steps of a fit in a worker. A newer question ends an older one, whose answer never comes; so does `cancel`.
 *
 * @returns `isSlow` once an answer lets a second pass
 */
export function useFitWorker() {
  const worker = useRef<Worker | null>(null);
  const [isBusy, setIsBusy] = useState(false);
  const [isSlow, setIsSlow] = useState(false);

  const end = useCallback(() => {
    worker.current?.terminate();
    worker.current = null;
  }, []);
  const cancel = useCallback(() => {
    end();
    setIsBusy(false);
  }, [end]);
  useEffect(() => end, [end]);
  useEffect(() => {
    setIsSlow(false);
    if (!isBusy) return;
    const timer = setTimeout(() => setIsSlow(true), PATIENCE);
    return () => clearTimeout(timer);
  }, [isBusy]);

  const ask = useCallback(
    (question: FitQuestion, onStates: (states: FitState[]) => void, onTrouble: (error: Error) => void) => {
      end();
      const own = new Worker(new URL('./fit.worker.ts', import.meta.url), { type: 'module' });
      worker.current = own;
      setIsBusy(true);
      const finish = (act: () => void) => {
        if (worker.current !== own) return; // a newer question was asked
        cancel();
        act();
      };
      own.onmessage = ({ data }: MessageEvent<FitAnswer>) =>
        finish(() => ('states' in data ? onStates(data.states) : onTrouble(new Error(data.refused))));
      own.onerror = (event) =>
        finish(() => onTrouble(new Error(event.message || 'The fit could not be started. Load the page again.')));
      own.postMessage(question);
    },
    [cancel, end],
  );
  return { ask, cancel, isBusy, isSlow };
}
