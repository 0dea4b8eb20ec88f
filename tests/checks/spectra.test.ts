import { describe, expect, test } from 'vitest';
import {
  amountConcentration,
  checkWavelengths,
  convertEnergy,
  type EnergyUnit,
  epsilonFromSpecificAbsorbance,
  findSolvent,
  holmiumOxideBands,
  isWithin,
  molarAbsorptionCoefficient,
  specificAbsorbance,
  toAbsorbance,
  wavenumberInterval,
} from '../../src/chem/spectra/index.ts';
import file from './spectra.json';

// Not tested here: kind "bands" gives maxima of single complexes, which no program computes from a spectrum it has not
// got; they serve as literature values elsewhere. Of the kind "absorbanceStandard", the certified values themselves are
// data; what can be reckoned from them is.

// biome-ignore lint/suspicious/noExplicitAny: the records of a kind share fields that the file as a whole does not
type Loose = any;

function records(kind: string): Loose[] {
  const found = (file.records as Loose[]).filter((record) => record.kind === kind);
  if (found.length === 0) throw new Error(`no record of kind ${kind}`);
  return found;
}

function near(value: number, expected: number, tolerance: number, source: string): void {
  expect(Math.abs(value - expected), `${value} should be ${expected} ± ${tolerance}: ${source}`).toBeLessThanOrEqual(
    tolerance,
  );
}

test.each(records('unit'))('$id: $value $from in $to', ({ value, from, to, expect: published, tolerance, source }) => {
  const result = Array.isArray(value)
    ? wavenumberInterval(value[0], value[1])
    : convertEnergy(value, from as EnergyUnit, to as EnergyUnit);
  near(result, published, tolerance.relative * published, source);
});

test.each(records('conversion'))('$id: $from to $to of $material', (record) => {
  const specific = records('absorbanceStandard').find(({ id }) => id === 'sk-003').expect;
  for (const [nm, epsilon] of Object.entries<number>(record.expect)) {
    // 257 nm is ungraded: editions of the monograph differ in the centre.
    near(
      epsilonFromSpecificAbsorbance(specific[nm].centre, record.molarMass),
      epsilon,
      record.tolerance.relative * epsilon,
      record.source,
    );
  }
});

test.each(records('beerLambert'))('$id: absorbance to ε', (record) => {
  const { absorbance, path_cm: pathLength, expect: published, tolerance, source } = record;
  const concentration =
    record.concentration_mol_per_L ?? amountConcentration(record.massPerVolume_mg_per_L / 1000, record.molarMass);
  if (published.concentration_mol_per_L) {
    const expected = published.concentration_mol_per_L;
    near(concentration, expected, tolerance.relative * expected, source);
  }
  const [epsilon] = molarAbsorptionCoefficient([absorbance], { concentration, pathLength });
  near(epsilon!, published.epsilon, tolerance.relative * published.epsilon, source);
});

test.each(records('solventCutoff'))('$id: cut-off of $solvent', ({ solvent, expect: published, tolerance, source }) => {
  const found = findSolvent(solvent);
  expect(found, `${solvent} must be listed`).not.toBeNull();
  near(found!.cutoffNm, published.cutoff_nm, tolerance.cutoff_nm, source);
});

test.each(records('wavelengthStandard'))('$id: $material', ({ expect: published, tolerance, source }) => {
  expect(holmiumOxideBands).toHaveLength(published.bands_nm.length);
  for (const [i, nm] of (published.bands_nm as number[]).entries()) {
    near(holmiumOxideBands[i]!, nm, tolerance.bands_nm, source);
  }
});

test.each(records('wavelengthCheck'))('$id: errors of an instrument', (record) => {
  const readings = Object.entries<number>(record.observed_nm).map(([nm, found]) => ({ certified: Number(nm), found }));
  const check = checkWavelengths(readings);
  near(check.largestError, record.expect.largestError_nm, record.tolerance.largestError_nm, record.source);
  for (const [key, expected] of Object.entries(record.expect)) {
    const limit = key.match(/^within_([\d.]+)_nm$/)?.[1];
    if (limit) expect(isWithin(check, Number(limit)), `${key}: ${record.source}`).toBe(expected);
  }
});

describe('absorbance standards, where arithmetic leads from one to another', () => {
  const [certificate, cells, monograph, chromate] = ['sk-001', 'sk-002', 'sk-003', 'sk-005'].map((id) =>
    records('absorbanceStandard').find((record) => record.id === id),
  );

  test.each([
    ['20 mg/L', 0],
    ['60 mg/L', 2],
    ['100 mg/L', 4],
  ])('specific absorbances of the certificate give the nominal ones of a cell at %s', (label, i) => {
    const grams = certificate.concentrations_g_per_kg[i]; // per kg; 1 kg of so dilute a solution is 1.00 L
    for (const [nm, absorbance] of Object.entries<number>(cells.expect[label])) {
      // A(1 %, 1 cm) = 10 × the absorbance per g/kg and cm.
      const specific = specificAbsorbance(absorbance, grams, 1) / 10;
      near(specific * grams, certificate.expect[nm][i] * grams, cells.tolerance.absolute, cells.source);
    }
  });

  test('the certificate at 60 mg/kg, in perchloric acid, lies within the monograph limits for sulfuric acid', () => {
    for (const [nm, { low, high }] of Object.entries<Loose>(monograph.expect)) {
      if (monograph.ungraded.includes(nm)) continue;
      const reading = certificate.expect[nm][2] * 0.06;
      const found = specificAbsorbance(reading, 0.06, 1);
      expect(found, monograph.source).toBeGreaterThan(low);
      expect(found, monograph.source).toBeLessThan(high);
    }
  });

  test('ε of chromate at 370 nm from its tabulated absorbance', () => {
    const concentration = amountConcentration(0.04, 194.19); // K2CrO4
    const [epsilon] = molarAbsorptionCoefficient([chromate.expect['370']], { concentration, pathLength: 1 });
    near(epsilon!, chromate.derived.molarAbsorptivity_at_370, 5, chromate.source);
  });

  test('the same from transmittance', () => {
    const absorbances = Object.values<number>(chromate.expect);
    const back = toAbsorbance(
      absorbances.map((a) => 100 * 10 ** -a),
      'percent-transmittance',
    );
    for (const [i, a] of absorbances.entries()) near(back[i]!, a, 1e-12, 'A = -log10 T');
  });
});
