import { enumerateIsomers } from '#src/chem/geometry/index.ts';
import { type ReadOptions, readSpectrumFile } from '#src/chem/spectra/index.ts';

/** The derivations that may take long, by the name under which a worker is asked for them. */
export const tasks = {
  isomers: enumerateIsomers,
  spectrumFile: ({ bytes, options }: { bytes: Uint8Array; options: ReadOptions }) => readSpectrumFile(bytes, options),
};

export type Tasks = typeof tasks;
