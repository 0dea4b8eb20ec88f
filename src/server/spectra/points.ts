import { convertX, decimate, type XUnit, type YUnit } from '#src/chem/spectra/index.ts';
import type { PointsQuery, PointsRecord } from '#src/contracts/spectra.ts';
import { canTakeSpectrum, type SpectrumAccess } from '#src/server/access/records.ts';
import { database } from '#src/server/database.ts';
import { bandContext, epsilonOf, storedQuantity } from './quantities.ts';
import { refuse } from './refuse.ts';
import { speciesCount } from './species-count.ts';
import { ascendingOrder, loadCurve, loadFilePoints } from './stored-points.ts';

/** Points that a guest who may only look gets of one spectrum, however often and of whatever window it is asked. */
const VIEW_POINTS = 2000;

/**
 * Points in the units asked for, x rising, gaps null; decimated where there are more than `max`.
 *
 * @throws {HttpError} 422 for a quantity that the conditions of the spectrum do not give
 */
export async function readPoints(access: SpectrumAccess, query: PointsQuery): Promise<PointsRecord> {
  const { asker, spectrum } = access;
  const { db } = await database();
  const stored = await loadCurve(db, spectrum.id);
  const { y, yUnit } = await ordinates(access, stored.value, query.yUnit);
  const x = await abscissae(spectrum, stored.x, query.xUnit);

  const all = Float64Array.from(stored.x.keys());
  // Whoever may only look gets what one thinning of the whole curve leaves: it is done on the curve as stored, before
  // window and units, so that no set of windows, units or sizes adds up to more.
  const open = (await canTakeSpectrum(asker, spectrum.id)) ? all : thin(all, stored.value, VIEW_POINTS);
  const windowed = open.filter((i) => (query.from ?? -Infinity) <= x[i]! && x[i]! <= (query.to ?? Infinity));
  const shown = thin(windowed, stored.value, query.max);
  // Wavelength falls as wavenumber rises.
  const places = query.xUnit === 'nm' || query.xUnit === 'um' ? shown.toReversed() : shown;
  return {
    xUnit: query.xUnit,
    yUnit,
    x: Array.from(places, (i) => x[i]!),
    y: Array.from(places, (i) => finiteOrNull(y[i]!)),
    decimated: shown.length < windowed.length || open.length < all.length,
  };
}

/** Places kept by the decimation of the stored values at those places. */
function thin(places: Float64Array, value: Float64Array, max: number): Float64Array {
  return decimate(
    places,
    places.map((i) => value[i]!),
    max,
  ).x;
}

/** Abscissae in the order of the ascending copy: as the file has them where its unit is asked for, with every digit. */
async function abscissae({ id, xUnit }: SpectrumAccess['spectrum'], wavenumber: Float64Array, wanted: XUnit) {
  if (wanted !== xUnit) return convertX(wavenumber, 'cm-1', wanted);
  const { db } = await database();
  const file = await loadFilePoints(db, id);
  return ascendingOrder(file.x, wanted).order.map((place) => file.x[place]!);
}

const finiteOrNull = (value: number): number | null => (Number.isFinite(value) ? value : null);

/** Ordinates in the order of the ascending copy. */
async function ordinates(
  { spectrum }: SpectrumAccess,
  value: Float64Array,
  wanted: PointsQuery['yUnit'],
): Promise<{ y: Float64Array; yUnit: string }> {
  const { cell } = bandContext(spectrum, await speciesCount(spectrum.id));
  const quantity = storedQuantity(spectrum.technique, spectrum.yUnit as YUnit);
  const epsilon = epsilonOf(value, quantity, cell);
  if (wanted === undefined && epsilon) return { y: epsilon, yUnit: 'epsilon' };
  if (wanted === undefined || wanted === 'file') return { y: await fileOrdinates(spectrum), yUnit: spectrum.yUnit };

  if (wanted === 'epsilon' || wanted === 'log-epsilon') {
    if (!epsilon) throw refuse('#/yUnit', 'The conditions of this spectrum give no molar absorption coefficient');
    // ε of zero or less, noise about the baseline, has no logarithm: a gap.
    return wanted === 'epsilon' ? { y: epsilon, yUnit: wanted } : { y: epsilon.map(Math.log10), yUnit: wanted };
  }
  const scale = cell ? cell.concentration * cell.pathLength : null;
  const absorbance = quantity === 'absorbance' ? value : epsilon && scale ? epsilon.map((e) => e * scale) : null;
  if (!absorbance) throw refuse('#/yUnit', 'The conditions of this spectrum give no absorbance');
  return { y: wanted === 'absorbance' ? absorbance : absorbance.map((a) => 10 ** -a), yUnit: wanted };
}

async function fileOrdinates({ id, xUnit }: SpectrumAccess['spectrum']): Promise<Float64Array> {
  const { db } = await database();
  const file = await loadFilePoints(db, id);
  const { order } = ascendingOrder(file.x, xUnit as XUnit);
  return order.map((place) => file.y[place]!);
}
