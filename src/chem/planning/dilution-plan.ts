/** A band to be measured, by the usual limits of its ε. */
export interface BandToMeasure {
  wavenumber: number;
  epsilon: { from: number; to: number; typical: number };
}

export interface DilutionLimits {
  /** Path lengths at hand, in cm. */
  paths: readonly number[];
  /** Highest concentration that dissolves, and lowest that can be made well, in mol dm⁻³. */
  highest: number;
  lowest: number;
  /** Absorbance in which the instrument measures best. */
  absorbance: readonly [low: number, high: number];
}

export const USUAL_LIMITS: DilutionLimits = {
  paths: [0.1, 0.2, 0.5, 1, 2, 4, 5, 10],
  highest: 0.1,
  lowest: 1e-6,
  absorbance: [0.2, 1],
};

/** A solution in a cell, and what of the bands it shows well. */
export interface Dilution {
  /** mol dm⁻³, two figures. */
  concentration: number;
  /** cm */
  path: number;
  bands: { wavenumber: number; absorbance: number; least: number; most: number }[];
}

export interface DilutionPlan {
  dilutions: Dilution[];
  /** Bands that no concentration and path within the limits brings into range, with the reason. */
  outOfReach: { wavenumber: number; reason: string }[];
}

/**
 * As few solutions as will show every band between the two absorbances, at its typical ε: the products of concentration
 * and path that serve a band are an interval, and the fewest points that meet all intervals are found from their upper
 * ends. The path nearest to 1 cm is taken for which the concentration is within the limits.
 *
 * @see common practice: absorbances of 0.2 to 1.0; interval stabbing by right end points
 */
export function dilutionPlan(bands: readonly BandToMeasure[], limits: DilutionLimits = USUAL_LIMITS): DilutionPlan {
  const [low, high] = limits.absorbance;
  const wanted = bands
    .map((band) => ({ band, from: low / band.epsilon.typical, to: high / band.epsilon.typical }))
    .sort((a, b) => a.to - b.to);
  const dilutions: Dilution[] = [];
  const outOfReach: DilutionPlan['outOfReach'] = [];
  let rest = wanted;
  while (rest.length > 0) {
    const point = rest[0]!.to;
    const served = rest.filter(({ from }) => from <= point);
    rest = rest.filter(({ from }) => from > point);
    // Nearer the middle of what serves them all than at its end.
    const middle = Math.sqrt(point * Math.max(...served.map(({ from }) => from)));
    const cell = cellFor(middle, limits);
    if (cell)
      dilutions.push(
        dilution(
          cell,
          served.map(({ band }) => band),
        ),
      );
    else
      outOfReach.push(
        ...served.map(({ band }) => ({
          wavenumber: band.wavenumber,
          reason:
            middle / Math.max(...limits.paths) > limits.highest
              ? 'Too weak for the highest concentration in the longest cell'
              : 'Too strong for the lowest concentration in the shortest cell',
        })),
      );
  }
  return { dilutions, outOfReach };
}

function cellFor(product: number, { paths, highest, lowest }: DilutionLimits) {
  const nearest = [...paths].sort((a, b) => Math.abs(Math.log(a)) - Math.abs(Math.log(b)));
  const path = nearest.find((l) => product / l <= highest && product / l >= lowest);
  return path === undefined ? null : { path, concentration: Number((product / path).toPrecision(2)) };
}

function dilution({ path, concentration }: { path: number; concentration: number }, bands: BandToMeasure[]): Dilution {
  const product = path * concentration;
  return {
    concentration,
    path,
    bands: bands
      .map(({ wavenumber, epsilon }) => ({
        wavenumber,
        absorbance: epsilon.typical * product,
        least: epsilon.from * product,
        most: epsilon.to * product,
      }))
      .sort((a, b) => a.wavenumber - b.wavenumber),
  };
}
