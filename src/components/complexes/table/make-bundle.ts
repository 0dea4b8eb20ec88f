import { getJson, sendJson } from '#src/components/ui/http.ts';
import { ProblemError } from '#src/components/ui/problem-error.ts';
import type { BundleRecord } from '#src/contracts/sharing.ts';
import { allPages } from './pages.ts';
import { fetchComplexes } from './useComplexes.ts';
import { type ComplexView, filterSearch } from './view.ts';

/** Complexes that one bundle takes. */
export const MAX_IN_BUNDLE = 5000;
/** How often the server is asked how far it is, ms. */
const POLL = 1000;

const pause = (ms: number, signal: AbortSignal) =>
  new Promise<void>((resolve, reject) => {
    const timer = setTimeout(resolve, ms);
    signal.addEventListener('abort', () => {
      clearTimeout(timer);
      reject(signal.reason);
    });
  });

/**
 * Has a bundle made of every complex that matches a view, and waits for it. Calling off cancels it on the server too.
 *
 * @throws {ProblemError} also when the bundle fails
 */
export async function makeBundle(
  view: ComplexView,
  signal: AbortSignal,
  onProgress: (share: number | null) => void,
): Promise<BundleRecord> {
  const search = filterSearch(view);
  search.set('sort', 'accession');
  const all = await allPages(fetchComplexes(search, signal), () => onProgress(null));
  const complexes = all.map(({ accession }) => accession);
  let bundle = await sendJson<BundleRecord>('POST', '/api/bundles', { complexes }, { signal });
  try {
    while (bundle.state === 'queued' || bundle.state === 'running') {
      onProgress(bundle.state === 'queued' ? null : bundle.progress);
      await pause(POLL, signal);
      bundle = await getJson<BundleRecord>(`/api/bundles/${bundle.id}`, signal);
    }
  } catch (error) {
    // Nobody waits for it any more. That it cannot be called off, since it is ready, is no trouble.
    if (signal.aborted) sendJson('DELETE', `/api/bundles/${bundle.id}`).catch(() => undefined);
    throw error;
  }
  if (bundle.state !== 'ready') throw new ProblemError(500, 'The bundle could not be made', bundle.error ?? undefined);
  return bundle;
}
