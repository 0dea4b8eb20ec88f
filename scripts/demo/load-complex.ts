import { readFormula } from '#src/chem/formula/index.ts';
import { isomersOf } from '#src/chem/geometry/index.ts';
import type { ComplexInput } from '#src/contracts/complexes.ts';
import type { BandList } from '#src/contracts/spectra.ts';
import type { Asker } from '#src/server/access/asker.ts';
import { mayJudgeBand, mayProposeBands, seeComplex } from '#src/server/access/records.ts';
import { registerComplex } from '#src/server/complexes/register.ts';
import { sha256 } from '#src/server/ids.ts';
import { createPreparation } from '#src/server/preparations/write.ts';
import { describeBands } from '#src/server/spectra/band-record.ts';
import { replaceBands } from '#src/server/spectra/bands.ts';
import { judgeBand } from '#src/server/spectra/judge.ts';
import { resolveTarget } from '#src/server/spectra/target.ts';
import { createSpectrum } from '#src/server/spectra/upload.ts';
import type { DemoBand, DemoComplex } from './demo-complex.ts';
import type { DemoPeople } from './load-people.ts';
import { type LabKey, labs, staff } from './people.ts';
import { asFile, type FileForm, hash, syntheticCurve, usefulConcentration } from './synthetic-spectrum.ts';

/** The first choice of every question that a formula leaves, as a person in a hurry would answer. */
function firstAnswers(formula: string): Record<string, string> {
  const answers: Record<string, string> = {};
  for (let round = 0; round < 4; round++) {
    const [question] = readFormula(formula, answers).questions;
    if (!question) return answers;
    answers[question.code] = question.choices[0]?.value ?? '';
  }
  return answers;
}

/** Where the wanted isomer stands in the list, in the way the register screen would send it. */
function isomerChoice(demo: DemoComplex, answers: Record<string, string>): Pick<ComplexInput, 'isomer' | 'chirality'> {
  const rac = demo.racemate ? { chirality: 'rac' as const } : {};
  if (!demo.descriptor) return rac;
  const [entity] = readFormula(demo.formula, answers).entities;
  const index =
    isomersOf(entity!, demo.geometry ?? null)?.list.isomers.findIndex(
      (isomer) => isomer.descriptor === demo.descriptor,
    ) ?? -1;
  if (index < 0) throw new Error(`${demo.formula} has no isomer ${demo.descriptor}`);
  return { isomer: index, ...rac };
}

const bandList = (bands: readonly DemoBand[], from: number, to: number): BandList =>
  bands
    .filter(([nm]) => nm >= from && nm <= to)
    .map(([nm, epsilon, fwhm, bandClass, lower, upper, shoulder]) => ({
      wavenumber: Math.round(1e7 / nm / 10) * 10,
      height: epsilon,
      quantity: 'epsilon' as const,
      fwhm,
      shoulder: shoulder ?? false,
      found: 'typed' as const,
      assignment: { class: bandClass, ...(lower && upper ? { from: lower, to: upper } : {}) },
    }));

/** What each lab's instrument covers, and the file it writes. */
const INSTRUMENTS: Record<LabKey, { from: number; to: number; step: number; form: FileForm }> = {
  quay: { from: 220, to: 1100, step: 1, form: 'csv' },
  marsh: { from: 200, to: 1700, step: 1, form: 'jcamp' },
  hill: { from: 210, to: 1650, step: 1, form: 'jcamp' },
  mint: { from: 230, to: 1100, step: 2, form: 'decimal-comma' },
};

async function measure(
  demo: DemoComplex,
  lab: LabKey,
  accession: string,
  preparation: string | null,
  people: DemoPeople,
): Promise<void> {
  const maker = await people.asker(staff[lab].maker);
  const { form, ...grid } = INSTRUMENTS[lab];
  const seed = hash(`${demo.formula} ${lab}`);
  const spread = ((seed % 1000) / 1000 - 0.5) * 2; // −1 … 1
  const first = lab === demo.lab;
  const curve = syntheticCurve(demo.bands, {
    ...grid,
    seed,
    scale: first ? 1 : 1 + 0.035 * spread,
    shift: first ? 0 : 0.6 * spread,
  });
  const labName = labs.find(({ key }) => key === lab)!.name;
  const solvent = demo.solvent ?? 'water';
  const file = asFile(curve, form, { title: `${demo.formula} ${lab}`, lab: labName, solvent, temperature: 298 });
  const metadata = {
    ...(preparation ? { preparation } : {}),
    complex: accession,
    lab: people.labId[lab],
    technique: 'solution' as const,
    phase: 'solution' as const,
    solvent,
    ...(demo.medium ? { medium: demo.medium } : {}),
    concentration: usefulConcentration(demo.bands),
    concentrationUncertainty: usefulConcentration(demo.bands) * 0.01,
    pathLength: 1,
    pathLengthUncertainty: 0.005,
    temperature: 298,
    bandwidth: lab === 'mint' ? 2 : 1,
    cell: 'quartz, 10 mm',
    operator: maker.name,
    measuredAt: `2026-0${1 + (seed % 9)}-${String(1 + (seed % 28)).padStart(2, '0')}`,
    title: `${lab.toUpperCase()} run ${100 + (seed % 900)}, synthetic`,
    notes: 'Synthetic: computed from band parameters for the demo, not measured.',
    synthetic: true,
  };
  const target = await resolveTarget(maker, metadata);
  const spectrum = await createSpectrum(
    target,
    { bytes: file.bytes, sha256: sha256(file.bytes), fileName: file.name, told: metadata },
    metadata,
  );
  await assign(demo, spectrum.id, maker, grid, lab, seed, people);
}

/** Bands proposed by who measured; most of the home lab's own are attested by a lead elsewhere, one is disputed. */
async function assign(
  demo: DemoComplex,
  spectrumId: string,
  maker: Asker,
  grid: { from: number; to: number },
  lab: LabKey,
  seed: number,
  people: DemoPeople,
): Promise<void> {
  const access = await mayProposeBands(maker, spectrumId);
  await replaceBands(access, bandList(demo.bands, grid.from, grid.to));
  if (lab !== demo.lab || demo.visibility === 'lab' || seed % 4 === 0) return;
  const judge = await people.asker(staff[lab === 'marsh' ? 'quay' : 'marsh'].lead);
  for (const [index, band] of (await describeBands(access)).entries()) {
    if (band.assignment.class === 'unassigned' || (seed + index) % 5 === 0) continue;
    const disputed = demo.formula === '[Fe(CN)6]3-' && index === 2;
    await judgeBand(
      await mayJudgeBand(judge, band.id),
      disputed ? 'disputed' : 'attested',
      disputed ? { reason: 'May be a second component of the band at 303 nm: measure at lower temperature' } : {},
    );
  }
}

/** Register a complex, keep its material, and measure it in every lab named. @returns its accession */
export async function loadComplex(demo: DemoComplex, people: DemoPeople): Promise<string> {
  const maker = await people.asker(staff[demo.lab].maker);
  const answers = firstAnswers(demo.formula);
  const accession = await registerComplex(maker, {
    formula: demo.formula,
    ...(Object.keys(answers).length ? { answers } : {}),
    ...(demo.geometry ? { geometry: demo.geometry } : {}),
    ...isomerChoice(demo, answers),
    ...(demo.spin ? { spinState: demo.spin } : {}),
    lab: people.labId[demo.lab],
    ...(demo.visibility ? { visibility: demo.visibility } : {}),
    ...(demo.notes ? { notes: demo.notes } : {}),
  });
  const preparation = demo.salt
    ? await createPreparation(await seeComplex(maker, accession), {
        label: `${demo.lab.toUpperCase()}-${String((hash(demo.formula) % 900) + 100)}`,
        lab: people.labId[demo.lab],
        formula: demo.salt,
        answers: firstAnswers(demo.salt),
        form: 'crystal',
        storage: 'desiccator, room temperature',
        preparedOn: '2025-11-12',
        notes: 'Invented for the demo.',
        ...(demo.visibility ? { visibility: demo.visibility } : {}),
      })
    : null;
  for (const lab of demo.measured) await measure(demo, lab, accession, preparation, people);
  return accession;
}
