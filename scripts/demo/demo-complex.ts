import type { BandClass } from '#src/chem/assignment/band-classes.ts';
import type { ComplexInput } from '#src/contracts/complexes.ts';
import type { SpectrumMetadata } from '#src/contracts/spectra.ts';
import type { LabKey } from './people.ts';

/** λ/nm, ε/dm³ mol⁻¹ cm⁻¹, full width at half maximum/cm⁻¹, class, and the transition where it is assigned. */
export type DemoBand = [
  nm: number,
  epsilon: number,
  fwhm: number,
  kind: BandClass,
  from?: string,
  to?: string,
  shoulder?: boolean,
];

export interface DemoComplex {
  formula: string;
  /** The material it is kept as. */
  salt?: string;
  geometry?: string;
  descriptor?: string;
  racemate?: boolean;
  spin?: NonNullable<ComplexInput['spinState']>;
  lab: LabKey;
  /** Labs that measured it. */
  measured: readonly LabKey[];
  solvent?: string;
  medium?: SpectrumMetadata['medium'];
  visibility?: 'lab';
  notes?: string;
  bands: readonly DemoBand[];
}
