import { DomainError } from '../../errors.ts';
import { type FieldStates, fieldStates } from '../field-levels.ts';
import { covariance, leastSquares } from '../least-squares.ts';
import { combine, type Matrix } from '../matrix.ts';
import { overlapField } from '../overlap.ts';
import { type FieldSetting, overlapGroup } from '../overlap-group.ts';

/** A ligand of a fitted complex: where it stands (degrees), and whose parameters it has. */
export interface FittedLigand {
  theta: number;
  phi: number;
  /** Name of the parameters, shared by all ligands and complexes that bear it: `NH3`. */
  type: string;
}

export interface FittedComplex {
  /** d electrons, 1 to 9. */
  n: number;
  /** Name of the repulsion parameters, shared likewise: `Cr3+`. */
  ion: string;
  ligands: readonly FittedLigand[];
  /**
   * Maxima with the level they end on in the group of the ligands, `4Eg`; a repeated term is its n-th level above the
   * ground in rising order.
   */
  bands: readonly { wavenumber: number; to: string; uncertainty?: number | undefined }[];
}

/** Where a parameter starts; `fixed` ones stay there. cm⁻¹. */
export interface StartValue {
  value: number;
  fixed?: boolean | undefined;
}

export interface OverlapFitRequest {
  complexes: readonly FittedComplex[];
  ligands: Record<string, { eSigma: StartValue; ePi: StartValue }>;
  ions: Record<string, { B: StartValue; ratioCB: number }>;
}

export interface OverlapFit {
  /** `NH3 eSigma`, `Cr3+ B`; `error` is the standard error, null for fixed ones and where it cannot be told. */
  parameters: { name: string; value: number; error: number | null; fixed: boolean }[];
  /** By complex, in the order given. */
  complexes: { group: string; bands: { wavenumber: number; to: string; calculated: number; residual: number }[] }[];
  rms: number;
  degreesOfFreedom: number;
  converged: boolean;
}

interface Parameter extends StartValue {
  name: string;
  lower: number;
  upper: number;
}

/** A complex with all that does not change while parameters do. */
interface Prepared {
  complex: FittedComplex;
  setting: FieldSetting;
  /** Field per unit of each ligand parameter that it has, by name of the parameter. */
  fields: { name: string; field: Matrix }[];
  ratioCB: number;
}

/**
 * Fits ligand parameters of the overlap model that several complexes share, and B of their ions, to assigned bands: the
 * complete dⁿ problem without spin–orbit coupling, by damped Gauss–Newton with the derivatives of Hellmann and Feynman.
 *
 * @throws DomainError `out-of-range` or `unknown-symbol` (fields `complexes/…`, `ligands`, `ions`)
 */
export function fitOverlap(request: OverlapFitRequest): OverlapFit {
  const parameters = parametersOf(request);
  const prepared = request.complexes.map((complex, i) => prepare(complex, i, request));
  const free = parameters.filter(({ fixed }) => !fixed);
  const bands = request.complexes.flatMap((complex) => complex.bands);
  if (bands.length === 0) throw new DomainError('out-of-range', 'Give at least one band.', 'complexes');
  const told = bands.map(({ uncertainty }) => uncertainty).filter((u) => u !== undefined);
  const weights = bands.map(({ uncertainty }) => 1 / (uncertainty ?? (told.length > 0 ? Math.max(...told) : 1)) ** 2);
  const valuesAt = (p: readonly number[]) => {
    const values = new Map(parameters.map(({ name, value }) => [name, value]));
    free.forEach(({ name }, i) => {
      values.set(name, p[i]!);
    });
    return values;
  };
  const model = (p: readonly number[]) => {
    const levels = prepared.flatMap((complex, i) => bandLevels(complex, i, valuesAt(p)));
    return {
      values: levels.map(({ energy }) => energy),
      gradients: levels.map(({ slopes }) => free.map(({ name }) => slopes.get(name) ?? 0)),
    };
  };
  const fit = leastSquares({
    model,
    observed: bands.map(({ wavenumber }) => wavenumber),
    weights,
    start: free.map(({ value }) => value),
    lower: free.map(({ lower }) => lower),
    upper: free.map(({ upper }) => upper),
  });
  const degreesOfFreedom = bands.length - free.length;
  const spread = covariance(fit.gradients, weights);
  const scale = degreesOfFreedom > 0 ? fit.sum / degreesOfFreedom : told.length === bands.length ? 1 : null;
  const final = valuesAt(fit.parameters);
  let at = 0;
  return {
    parameters: parameters.map(({ name, fixed = false }) => {
      const place = free.findIndex((other) => other.name === name);
      const error = spread && scale !== null && place >= 0 ? Math.sqrt(spread[place]![place]! * scale) : null;
      return { name, value: final.get(name)!, error, fixed };
    }),
    complexes: prepared.map(({ complex, setting }) => ({
      group: setting.group.symbol,
      bands: complex.bands.map(({ wavenumber, to }) => {
        const residual = fit.residuals[at++]!;
        return { wavenumber, to, calculated: wavenumber - residual, residual };
      }),
    })),
    rms: Math.sqrt(fit.residuals.reduce((sum, r) => sum + r * r, 0) / bands.length),
    degreesOfFreedom,
    converged: fit.converged,
  };
}

function parametersOf({ ligands, ions }: OverlapFitRequest): Parameter[] {
  const all = [
    ...Object.entries(ligands).flatMap(([type, { eSigma, ePi }]): Parameter[] => [
      { ...eSigma, name: `${type} eSigma`, lower: 0, upper: 50_000 },
      { ...ePi, name: `${type} ePi`, lower: -20_000, upper: 20_000 },
    ]),
    ...Object.entries(ions).map(([ion, { B }]): Parameter => ({ ...B, name: `${ion} B`, lower: 1, upper: 5000 })),
  ];
  for (const { name, value } of all) {
    if (!Number.isFinite(value)) {
      const field = name.endsWith(' B') ? 'ions' : 'ligands';
      throw new DomainError('out-of-range', `${name} needs a number to start from, not ${value}.`, field);
    }
  }
  return all;
}

function prepare(complex: FittedComplex, place: number, { ligands, ions }: OverlapFitRequest): Prepared {
  const types = [...new Set(complex.ligands.map(({ type }) => type))];
  const missing = types.find((type) => !Object.hasOwn(ligands, type));
  if (missing !== undefined) {
    throw new DomainError('unknown-symbol', `There are no parameters for ${missing}.`, `complexes/${place}/ligands`);
  }
  const ion = Object.hasOwn(ions, complex.ion) ? ions[complex.ion]! : null;
  if (!ion) {
    throw new DomainError('unknown-symbol', `There are no parameters for ${complex.ion}.`, `complexes/${place}/ion`);
  }
  // Ligands of two kinds never count as alike, whatever the values at hand: labels must not change on the way.
  const marked = complex.ligands.map((ligand) => {
    const mark = 1 + types.indexOf(ligand.type);
    return { ...ligand, eSigma: 1000 * mark, ePi: 170 * mark };
  });
  const setting = overlapGroup(marked);
  if (!setting) {
    throw new DomainError(
      'unsupported',
      'The ligands stand on one line: their levels have no labels to assign bands by.',
      `complexes/${place}/ligands`,
    );
  }
  const only = (type: string, part: { eSigma: number; ePi: number }): Matrix =>
    overlapField(complex.ligands.filter((ligand) => ligand.type === type).map((ligand) => ({ ...ligand, ...part })));
  const fields = types.flatMap((type) => [
    { name: `${type} eSigma`, field: only(type, { eSigma: 1, ePi: 0 }) },
    { name: `${type} ePi`, field: only(type, { eSigma: 0, ePi: 1 }) },
  ]);
  return { complex, setting, fields, ratioCB: ion.ratioCB };
}

interface BandLevel {
  energy: number;
  /** Derivative by parameter. */
  slopes: Map<string, number>;
}

/** Energies above the ground of the levels on which the bands of a complex end. */
function bandLevels(prepared: Prepared, place: number, values: ReadonlyMap<string, number>): BandLevel[] {
  const { complex, setting, fields, ratioCB } = prepared;
  const field = combine(fields.map(({ name, field: unit }) => [values.get(name)!, unit] as const));
  const B = values.get(`${complex.ion} B`)!;
  const states = fieldStates(complex.n, field, { B, C: ratioCB * B }, setting);
  const levels = states
    .flatMap((own) =>
      own.groups.flatMap(({ energy, members, parts }) =>
        (parts ?? []).map(({ irrep }) => ({
          label: `${own.space.multiplicity}${irrep}`,
          energy,
          members,
          states: own,
        })),
      ),
    )
    .sort((a, b) => a.energy - b.energy);
  const ground = levels[0]!;
  const taken = new Map<string, number>();
  const order = [...complex.bands.keys()].sort((a, b) => complex.bands[a]!.wavenumber - complex.bands[b]!.wavenumber);
  const found = new Map<number, BandLevel>();
  for (const band of order) {
    const { to } = complex.bands[band]!;
    const rank = taken.get(to) ?? 0;
    taken.set(to, rank + 1);
    const level = levels.slice(1).filter(({ label }) => label === to)[rank];
    if (!level) {
      throw new DomainError(
        'unknown-symbol',
        `There ${rank === 0 ? 'is no level' : `are not ${rank + 1} levels`} ${to} above ${ground.label} in ${setting.group.symbol}.`,
        `complexes/${place}/bands/${band}/to`,
      );
    }
    const [upper, lower] = [slopesOf(level, prepared), slopesOf(ground, prepared)];
    const slopes = new Map([...upper].map(([name, slope]) => [name, slope - lower.get(name)!]));
    found.set(band, { energy: level.energy - ground.energy, slopes });
  }
  return complex.bands.map((_, band) => found.get(band)!);
}

/** vᵀ (∂H/∂p) v, averaged over the states of a level. */
function slopesOf(
  { states, members }: { states: FieldStates; members: readonly number[] },
  { complex, fields, ratioCB }: Prepared,
): Map<string, number> {
  const { space, vectors } = states;
  const mean = (operator: Matrix): number =>
    members.reduce((sum, k) => sum + expectation(operator, vectors, k), 0) / members.length;
  const densities = [...space.pairs].map(([pq, operator]) => [pq, mean(operator)] as const);
  const slopes = new Map(
    fields.map(({ name, field }) => [name, densities.reduce((sum, [pq, d]) => sum + d * field.data[pq]!, 0)]),
  );
  return slopes.set(`${complex.ion} B`, mean(space.B) + ratioCB * mean(space.C));
}

function expectation({ data, rows }: Matrix, vectors: Matrix, k: number): number {
  let sum = 0;
  for (let i = 0; i < rows; i++) {
    let part = 0;
    for (let j = 0; j < rows; j++) part += data[i * rows + j]! * vectors.data[j * vectors.columns + k]!;
    sum += part * vectors.data[i * vectors.columns + k]!;
  }
  return sum;
}
