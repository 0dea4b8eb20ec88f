import type * as z from 'zod';
import { ascending, type SpectrumBlock, toWavenumber } from '#src/chem/spectra/index.ts';
import type { PreviewOptions, ReadBlock } from '#src/contracts/spectra.ts';
import { flagsOf } from './checks.ts';
import { solventShares } from './conditions.ts';
import { storedValues } from './quantities.ts';
import { readBlocks } from './read-curve.ts';

type Block = z.infer<typeof ReadBlock>;

/** How a file would be read; nothing is stored. @throws {DomainError} where it cannot be read */
export async function previewFile(
  bytes: Uint8Array,
  options: PreviewOptions,
  signal?: AbortSignal,
): Promise<{ blocks: Block[] }> {
  const blocks = await readBlocks(bytes, options, signal);
  return { blocks: blocks.map((block) => describe(block, options)) };
}

function describe(block: SpectrumBlock, options: PreviewOptions): Block {
  const { suggestedXUnit, suggestedYUnit, dialect, title, kind, xUnit, yUnit, points, x, metadata, warnings } = block;
  return {
    title,
    kind,
    xUnit,
    yUnit,
    ...(suggestedXUnit ? { suggestedXUnit } : {}),
    ...(suggestedYUnit ? { suggestedYUnit } : {}),
    points,
    x,
    y: block.y.map((value) => (Number.isNaN(value) ? null : value)),
    metadata,
    warnings,
    format: block.format,
    ...(dialect ? { dialect: { ...dialect } } : {}),
    ...flags(block, options),
  };
}

/** Flags as the upload would get them, once units are settled and any condition was told. */
function flags({ kind, xUnit, yUnit, x, y }: SpectrumBlock, options: PreviewOptions): Pick<Block, 'flags'> {
  const { solvent, concentration = null, pathLength = null } = options;
  const told = solvent !== undefined || concentration !== null || pathLength !== null;
  if (!told || kind !== 'curve' || !xUnit || !yUnit) return {};
  const technique = 'solution';
  const curve = ascending(toWavenumber(x, xUnit), storedValues(y, technique, yUnit));
  const solvents = solventShares(solvent) ?? [];
  return {
    flags: flagsOf({ x: curve.x, value: curve.y }, { technique, yUnit, solvents, concentration, pathLength }),
  };
}
