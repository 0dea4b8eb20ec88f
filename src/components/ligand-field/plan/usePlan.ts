import { useEffect, useMemo, useState } from 'react';
import { emptyDraft } from '#src/components/complexes/register/draft.ts';
import { type Answered, soleEntity } from '#src/components/complexes/register/reading.ts';
import { useReading } from '#src/components/complexes/register/useReading.ts';
import { useDraft } from '#src/components/ui/useDraft.ts';
import { readLimits, type TypedLimits, USUAL_TYPED } from './plan-limits.ts';
import { plannedEntity } from './planned-entity.ts';
import { syntheticSpectrum } from './synthetic.ts';

type Chemistry = typeof import('./plan-chemistry.ts');

export interface PlanDraft {
  formula: string;
  answered: Answered[];
  /** cm⁻¹; empty: as estimated. */
  delta: string;
  B: string;
  solvent: string;
  limits: TypedLimits;
}

const EMPTY: PlanDraft = { formula: '', answered: [], delta: '', B: '', solvent: 'water', limits: USUAL_TYPED };
const REGISTER = emptyDraft('');

/** A number that was typed; undefined where nothing was, or nothing that can be used. */
const wished = (text: string, most: number): number | undefined => {
  const value = Number(text);
  return text.trim() !== '' && value > 0 && value <= most ? value : undefined;
};

/** Everything of the page before measuring: what was typed, its reading, bands, dilutions and cautions. */
export function usePlan() {
  const { draft, change } = useDraft('plan', EMPTY);
  const [chemistry, setChemistry] = useState<Chemistry | null>(null);
  useEffect(() => {
    void import('./plan-chemistry.ts').then(setChemistry);
  }, []);
  const { formula, answered, delta, B, solvent } = draft;
  const reading = useReading(useMemo(() => ({ ...REGISTER, formula, answered }), [formula, answered]));
  const read = reading.attempt?.kind === 'read' ? reading.attempt.reading : null;
  const open = read?.questions ?? [];

  const plan = useMemo(() => {
    if (!chemistry || !read || open.length > 0) return null;
    const entity = soleEntity(read);
    if (!entity) return { refusal: 'Several complexes are in this formula: plan for each of them alone.' };
    const planned = plannedEntity(entity, null);
    if (planned.kind === 'none') return { refusal: planned.sentence };
    try {
      const complex = { ...planned.complex, delta: wished(delta, 100_000), B: wished(B, 2000) };
      const told = chemistry.planBands(complex);
      const ligands = complex.donors.map(({ abbreviation }) => abbreviation);
      const charge = chemistry.chargeTransfer({
        element: complex.element,
        oxidationState: complex.oxidationState,
        geometry: complex.geometry,
        ligands,
        spin: told.spin,
        delta: told.delta ?? undefined,
        B: told.B ?? undefined,
      });
      const colour = told.bands.length > 0 ? chemistry.colourOfSolution(syntheticSpectrum(told.bands)) : null;
      return { refusal: null, complex, told, charge, colour };
    } catch (error) {
      if (!(error instanceof chemistry.DomainError)) throw error;
      return { refusal: `${error.message}.` };
    }
  }, [chemistry, read, open.length, delta, B]);

  const limits = useMemo(() => readLimits(draft.limits), [draft.limits]);
  const dilution = useMemo(
    () => (chemistry && plan?.told && limits.limits ? chemistry.dilutionPlan(plan.told.bands, limits.limits) : null),
    [chemistry, plan, limits],
  );
  const cautions = useMemo(() => {
    if (!chemistry || !read || read.entities.length === 0) return null;
    return chemistry.cautionsFor({
      composition: read.composition,
      ligands: read.ligands.map(({ abbreviation, count }) => ({ abbreviation, count })),
      counterIons: read.counterIons.map((ion) => ion.formula),
      metals: read.centres.map(({ element, oxidationState }) => ({ element, oxidationState })),
      solvent: [...(solvent ? [solvent] : []), ...read.solvates.map((one) => one.formula)],
      technique: 'solution absorption',
    });
  }, [chemistry, read, solvent]);
  return { draft, change, reading, read, open, plan, limits, dilution, cautions, solvents: chemistry?.solvents ?? [] };
}
