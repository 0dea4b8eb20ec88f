import { useDraft } from './useDraft.ts';

interface Kept {
  /** Version of the record on which the first change was made. */
  base: string;
  touched: object;
}
const NOTHING: Kept = { base: '', touched: {} };

/**
 * What a person changed in a form over a record, and nothing else: fields that were not touched follow the record. The
 * version on which the first change was made is kept along, so that a change by others meanwhile is noticed even when
 * the page was loaded anew in between.
 */
export function useRecordDraft<T extends object>(key: string, etag: string) {
  const { draft, change, clear } = useDraft<Kept>(key, NOTHING);
  return {
    touched: draft.touched as Partial<T>,
    base: draft.base || etag,
    change: (part: Partial<T>) => change({ base: draft.base || etag, touched: { ...draft.touched, ...part } }),
    clear,
  };
}
