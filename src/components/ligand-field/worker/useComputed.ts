import { useEffect, useRef, useState } from 'react';
import { LatestWins } from './latest-wins.ts';
import type { WorkerAnswer } from './ligand-field.worker.ts';
import type { Answered, Asked, TaskName } from './tasks.ts';

export interface Computed<N extends TaskName> {
  /** The latest answer; it stays while a newer one is being computed. */
  answer: Answered<N> | null;
  /** Why the question has no answer. */
  refusal: string | null;
  /** Of the latest answer in the worker, ms. */
  milliseconds: number | null;
}

const NOTHING = { answer: null, refusal: null, milliseconds: null };
const STOPPED = 'The computation stopped. Load the page again.';

/** Computes off the main thread; the latest question wins. Null asks nothing and forgets the answer. */
export function useComputed<N extends TaskName>(name: N, asked: Asked<N> | null): Computed<N> {
  const [state, setState] = useState<Computed<N>>(NOTHING);
  const line = useRef<LatestWins<Asked<N>> | null>(null);
  const hasQuestion = asked !== null;
  useEffect(() => {
    if (!hasQuestion) {
      setState(NOTHING);
      return;
    }
    const worker = new Worker(new URL('./ligand-field.worker.ts', import.meta.url), { type: 'module' });
    const own = new LatestWins<Asked<N>>(
      (id, question) => worker.postMessage({ id, name, asked: question }),
      (run) => requestAnimationFrame(run),
    );
    worker.onmessage = ({ data }: MessageEvent<WorkerAnswer>) => {
      if (!own.answered(data.id)) return;
      setState(
        'refusal' in data
          ? { ...NOTHING, refusal: data.refusal }
          : { answer: data.answer as Answered<N>, refusal: null, milliseconds: data.milliseconds },
      );
    };
    worker.onerror = () => setState({ ...NOTHING, refusal: STOPPED });
    line.current = own;
    return () => {
      own.forget();
      worker.terminate();
      line.current = null;
    };
  }, [name, hasQuestion]);
  // Equal questions are asked once: a key of their content, as requests are small and made anew while drawing.
  const key = JSON.stringify(asked);
  useEffect(() => {
    const question = JSON.parse(key) as Asked<N> | null;
    if (question !== null) line.current?.ask(question);
  }, [key]);
  return state;
}
