import { useState } from 'react';
import { getVersioned, ProblemError, sendJson, type Versioned } from './http.ts';

/**
 * Sends changes of a record under the version they were made on. When somebody changed it meanwhile, nothing is lost:
 * the present record can be fetched, and the same change be sent over it or given up.
 */
export function useConditionalSave<T>(url: string, etag: string, onSaved: (saved: T) => void) {
  const [problem, setProblem] = useState<unknown>(null);
  const [isSending, setIsSending] = useState(false);
  const [isStale, setIsStale] = useState(false);
  const [present, setPresent] = useState<Versioned<T> | null>(null);

  const attempt = async (work: () => Promise<void>) => {
    setIsSending(true);
    setProblem(null);
    try {
      await work();
    } catch (error) {
      if (error instanceof ProblemError && error.status === 412) {
        setPresent(null);
        setIsStale(true);
      } else setProblem(error);
    } finally {
      setIsSending(false);
    }
  };
  const ifMatch = present?.etag ?? etag;

  return {
    problem,
    isSending,
    isStale,
    present: present?.data ?? null,
    save: (patch: object) =>
      attempt(async () => {
        const saved = await sendJson<T>('PATCH', url, patch, { ifMatch });
        setIsStale(false);
        setPresent(null);
        onSaved(saved);
      }),
    remove: (onRemoved: () => void) =>
      attempt(async () => {
        await sendJson('DELETE', url, undefined, { ifMatch });
        onRemoved();
      }),
    loadPresent: () => attempt(async () => setPresent(await getVersioned<T>(url))),
    forget: () => {
      setProblem(null);
      setIsStale(false);
      setPresent(null);
    },
  };
}

export type ConditionalSave<T> = ReturnType<typeof useConditionalSave<T>>;
