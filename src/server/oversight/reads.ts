import type { Route } from '#src/contracts/route.ts';
import type { PointsQuery, PointsRecord } from '#src/contracts/spectra.ts';
import type { Asker } from '../access/asker.ts';
import type { ComplexAccess, SpectrumAccess } from '../access/records.ts';
import type { BundleAccess, FolioAccess } from '../access/sharing.ts';
import { type AccessNote, noteAccess } from '../access-log.ts';

/** Points of one spectrum that a screen draws at most; who asks for more takes the curve away. */
const DRAWN_POINTS = 8000;

const look = (subjectType: AccessNote['subjectType'], subjectId: string): AccessNote => ({
  kind: 'look',
  subjectType,
  subjectId,
});
const download = (subjectType: AccessNote['subjectType'], subjectId: string): AccessNote => ({
  kind: 'download',
  subjectType,
  subjectId,
});

const spectrumId = (access: unknown) => (access as SpectrumAccess).spectrum.id;

/**
 * Reads that are told of in the access log, by the path of their route: single records, and files. Lists are not: what
 * a row of one shows is not the record.
 */
const TOLD: Record<string, (access: unknown, result: unknown, query: unknown) => AccessNote | null> = {
  '/api/complexes/{accession}': (access) => look('complex', (access as ComplexAccess).complex.id),
  '/api/spectra/{id}': (access) => look('spectrum', spectrumId(access)),
  '/api/spectra/{id}/points': (access, result, query) =>
    (isWhole(result as PointsRecord, query as PointsQuery) ? download : look)('spectrum', spectrumId(access)),
  '/api/spectra/{id}/file': (access) => download('spectrum', spectrumId(access)),
  '/api/spectra/{id}/jcamp': (access) => download('spectrum', spectrumId(access)),
  '/api/folios/{id}': (access) => look('folio', (access as FolioAccess).folio.id),
  '/api/bundles/{id}/file': (access, result) =>
    isFirstPart(result as Response) ? download('bundle', (access as BundleAccess).bundle.id) : null,
};

/** What the table of a curve is made from. Whoever may only look asks in vain: what they get is thinned. */
const isWhole = ({ x, decimated }: PointsRecord, { max }: PointsQuery): boolean =>
  x.length > DRAWN_POINTS || (max > DRAWN_POINTS && !decimated);

/** A download that is fetched in ranges is one: the range with the first byte counts. */
function isFirstPart({ status, headers }: Response): boolean {
  return status === 200 || (status === 206 && (headers.get('content-range') ?? '').startsWith('bytes 0-'));
}

/** Note a read that was answered, where it is one that is told of. */
export function noteRead(
  route: Route,
  { asker, access, query }: { asker: Asker | null; access: unknown; query: unknown },
  result: unknown,
): void {
  if (!asker || route.method !== 'GET') return;
  const note = TOLD[route.path]?.(access, result, query);
  if (note) noteAccess(asker, note);
}
