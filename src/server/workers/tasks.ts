import { readFormula } from '#src/chem/formula/index.ts';
import { enumerateIsomers } from '#src/chem/geometry/index.ts';
import { diagram, fit, levels } from '#src/chem/ligand-field/index.ts';
import { type FitOptions, fitBands, type ReadOptions, readSpectrumFile } from '#src/chem/spectra/index.ts';

type Rest = Parameters<typeof readFormula>;
interface FormulaInput {
  text: string;
  answers?: Rest[1];
  ownLigands?: Rest[2];
}

/** The derivations that may take long, by the name under which a worker is asked for them. */
export const tasks = {
  formula: ({ text, answers, ownLigands }: FormulaInput) => readFormula(text, answers, ownLigands),
  isomers: enumerateIsomers,
  levels,
  diagram,
  fit,
  bands: ({ x, y, options }: { x: number[]; y: number[]; options: FitOptions }) => fitBands(x, y, options),
  spectrumFile: ({ bytes, options }: { bytes: Uint8Array; options: ReadOptions }) => readSpectrumFile(bytes, options),
};

export type Tasks = typeof tasks;
