import { useCallback, useRef, useState } from 'react';

/** How far something is that a person waits for. */
export interface TaskState<T> {
  state: 'idle' | 'running' | 'done' | 'failed';
  /** 0 to 1; null while nobody can tell. */
  progress: number | null;
  result: T | null;
  problem: unknown;
}

const IDLE = { state: 'idle', progress: null, result: null, problem: null } as const;

/** Something that takes a while, tells how far it is, and can be called off. */
export function useTask<T>(work: (signal: AbortSignal, onProgress: (share: number | null) => void) => Promise<T>) {
  const [task, setTask] = useState<TaskState<T>>(IDLE);
  const controller = useRef<AbortController>(null);
  const start = useCallback(async () => {
    controller.current?.abort();
    const own = new AbortController();
    controller.current = own;
    setTask({ ...IDLE, state: 'running' });
    try {
      const result = await work(own.signal, (progress) => !own.signal.aborted && setTask((t) => ({ ...t, progress })));
      if (!own.signal.aborted) setTask({ state: 'done', progress: 1, result, problem: null });
    } catch (problem) {
      if (!own.signal.aborted) setTask({ state: 'failed', progress: null, result: null, problem });
    }
  }, [work]);
  const cancel = useCallback(() => {
    controller.current?.abort();
    setTask(IDLE);
  }, []);
  return { ...task, start, cancel };
}
