import type { XUnit, YUnit } from '#src/chem/spectra/types.ts';
import { writeCsv } from '#src/chem/spectra/write-csv.ts';
import { getJson } from '#src/components/ui/http.ts';
import type { Points, SpectrumRecord } from '#src/contracts/spectra.ts';

/** Most points that one request gives. */
const ALL = 200_000;

/**
 * The points of a spectrum as CSV, in the units of its file.
 *
 * @throws {ProblemError} as `getJson`
 */
export async function csvOf({ id, xUnit }: SpectrumRecord): Promise<{ text: string; isThinned: boolean }> {
  const points = await getJson<Points>(`/api/spectra/${id}/points?xUnit=${xUnit}&yUnit=file&max=${ALL}`);
  const y = points.y.map((value) => value ?? Number.NaN);
  const text = writeCsv({ x: points.x, y, xUnit: points.xUnit as XUnit, yUnit: points.yUnit as YUnit });
  return { text, isThinned: points.decimated };
}
