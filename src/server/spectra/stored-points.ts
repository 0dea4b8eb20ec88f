import { endianness } from 'node:os';
import { eq } from 'drizzle-orm';
import { ascending, toWavenumber, type XUnit } from '#src/chem/spectra/index.ts';
import type { Db, Tx } from '#src/db/client.ts';
import { spectrumPoints } from '#src/db/schema/index.ts';

/** Numbers as a blob of little-endian float64. */
export function pack(values: ArrayLike<number>): Buffer {
  const buffer = Buffer.from(Float64Array.from(values).buffer);
  return endianness() === 'BE' ? buffer.swap64() : buffer;
}

/** The reverse of `pack`. */
export function unpack(blob: Uint8Array): Float64Array {
  const copy = Buffer.from(blob);
  if (endianness() === 'BE') copy.swap64();
  // A blob of the driver need not begin at a multiple of eight bytes: the numbers get memory of their own.
  return new Float64Array(copy.buffer.slice(copy.byteOffset, copy.byteOffset + copy.byteLength));
}

/** The ascending copy: wavenumbers in cm⁻¹ and the stored quantity. */
export async function loadCurve(db: Db | Tx, spectrumId: string): Promise<{ x: Float64Array; value: Float64Array }> {
  const [row] = await db
    .select({ x: spectrumPoints.wavenumber, value: spectrumPoints.value })
    .from(spectrumPoints)
    .where(eq(spectrumPoints.spectrumId, spectrumId));
  if (!row) throw new Error(`spectrum ${spectrumId} has no points`);
  return { x: unpack(row.x), value: unpack(row.value) };
}

/** Points as they stand in the file, in its units and order. */
export async function loadFilePoints(db: Db | Tx, spectrumId: string): Promise<{ x: Float64Array; y: Float64Array }> {
  const [row] = await db
    .select({ x: spectrumPoints.x, y: spectrumPoints.y })
    .from(spectrumPoints)
    .where(eq(spectrumPoints.spectrumId, spectrumId));
  if (!row) throw new Error(`spectrum ${spectrumId} has no points`);
  return { x: unpack(row.x), y: unpack(row.y) };
}

/** Wavenumbers ascending, and for each the place of its point in the file. */
export function ascendingOrder(x: ArrayLike<number>, unit: XUnit): { wavenumber: Float64Array; order: Float64Array } {
  const sorted = ascending(
    toWavenumber(x, unit),
    Float64Array.from({ length: x.length }, (_, i) => i),
  );
  return { wavenumber: sorted.x, order: sorted.y };
}
