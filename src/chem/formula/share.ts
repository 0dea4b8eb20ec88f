import { dElectronCount } from '../electrons.ts';
import { findElement, isDBlock } from '../elements.ts';
import { chargeOf } from './charge-text.ts';
import type { Context } from './entity.ts';
import { chooseLigandCharges } from './ligand-charges.ts';
import { chargeOnMetals, dMetals, isDiimine, type LigandCharges, ligandField, usualCharges } from './metal-charge.ts';
import { commonStates, plausibility, stateLabel } from './oxidation-states.ts';
import type { RawEntity, RawMetal } from './raw.ts';
import type { CentreReading } from './types.ts';

export interface Shared {
  centres: CentreReading[];
  ligandCharges: LigandCharges;
  /** False while a question about oxidation states is open. */
  settled: boolean;
}

/**
 * Share the charge of an entity out over its centres: oxidation state = what is left when every ligand has taken its
 * pairs. Equal centres get the average. Different d-block elements cannot be shared out by formula alone.
 *
 * @see P. Karen, P. McArdle, J. Takats, Pure Appl. Chem. 88 (2016) 831
 */
export function shareCharge(entity: RawEntity, charge: number | null, context: Context): Shared {
  const metals = dMetals(entity);
  const [metal, other] = metals;
  const unsettled = (): Shared => ({
    centres: centresOf(entity, () => null),
    ligandCharges: new Map(),
    settled: false,
  });
  if (charge === null || !metal) return unsettled();
  if (other) return shareBetweenElements(entity, charge, metals, context) ?? unsettled();
  const choice = chooseLigandCharges(entity, charge, metal, context);
  if (!choice) return unsettled();
  const { state, charges, alternatives } = choice;
  if (!acceptState(entity, charge, metal, state, context)) return { ...unsettled(), ligandCharges: charges };
  const states = statesOfAtoms(metal, state, context, entity);
  const shared =
    state <= 1 && entity.ligands.some((l) => isDiimine(l.ligand)) && !commonStates(metal.element).includes(state);
  const nominal = isNominal(entity) || shared || !Number.isInteger(state);
  let next = 0;
  const centres = centresOf(entity, () => states[next++] ?? null).map((c) =>
    isDBlock(c.element) ? { ...c, nominal, alternatives } : c,
  );
  return { centres, ligandCharges: charges, settled: true };
}

function centresOf(entity: RawEntity, stateOf: (metal: RawMetal) => number | null): CentreReading[] {
  return entity.metals.flatMap((metal) => {
    const element = findElement(metal.element);
    if (element?.block !== 'd' && element?.block !== 'f') return [];
    return Array.from({ length: metal.count }, () => {
      const oxidationState = element.block === 'f' ? 3 : stateOf(metal);
      return {
        element: metal.element,
        group: element.group,
        oxidationState,
        dCount: oxidationState === null ? null : dElectronCount(metal.element, oxidationState),
        nominal: false,
        alternatives: [],
      };
    });
  });
}

/** Ask about a state that cannot be or is in no known compound; true when it stands. */
function acceptState(entity: RawEntity, charge: number, metal: RawMetal, state: number, context: Context): boolean {
  const field = ligandField(entity);
  const fit = plausibility(metal.element, state, field);
  if (fit === 'usual' || fit === 'rare' || isMetalPair(metal, state)) return true;
  const code = context.codeAt(
    fit === 'impossible' ? 'impossible-oxidation-state' : 'implausible-oxidation-state',
    entity.start,
  );
  if (fit === 'implausible' && context.answers[code] === 'keep') return true;
  const label = stateLabel(metal.element, state);
  const why =
    fit === 'impossible'
      ? impossibleBecause(metal.element, state)
      : state <= 0 && field.diimine && !field.acceptor
        ? 'is a convention at best: ligands of this kind take up the electrons themselves'
        : 'is met in no established compound of this kind';
  const others = usualCharges(entity).filter((c) => c.charge !== charge);
  const believable = others.filter((c) => /usual|rare/.test(plausibility(metal.element, c.state, field)));
  const repairs = (fit === 'impossible' && believable.length === 0 ? others : believable).map((c) => ({
    value: String(c.charge),
    label: `charge ${chargeOf(c.charge) || '0'}, ${stateLabel(metal.element, c.state)}`,
  }));
  const keep = { value: 'keep', label: `keep ${label}` };
  context.ask({
    code,
    detail: `A charge of ${chargeOf(charge) || '0'} makes ${label}, which ${why}.`,
    choices: fit === 'impossible' ? repairs : [...repairs, keep],
    position: context.source.at[entity.start],
  });
  return false;
}

/** Mercury(I), gold clusters and their like: bound to each other, the atoms share the s electrons that they keep. */
function isMetalPair({ element, count }: RawMetal, state: number): boolean {
  const group = findElement(element)?.group ?? 0;
  return count > 1 && ((group === 12 && state === 1) || (group === 11 && state > 0 && state < 1));
}

function impossibleBecause(symbol: string, state: number): string {
  const group = findElement(symbol)?.group ?? 0;
  return state > group
    ? `is beyond what group ${group} allows`
    : `would leave ${Number((group - state).toFixed(2))} electrons for five d orbitals`;
}

/** The state of each atom: the average, or the split a person chose for a fractional one. */
function statesOfAtoms(metal: RawMetal, state: number, context: Context, entity: RawEntity): number[] {
  const average = Array<number>(metal.count).fill(state);
  if (Number.isInteger(state)) return average;
  const upper = Math.round(metal.count * (state - Math.floor(state)));
  const split = average.map((_, i) => (i < metal.count - upper ? Math.floor(state) : Math.ceil(state)));
  const code = context.codeAt('mixed-valence', entity.start);
  if (context.answers[code] === split.join(',')) return split;
  if (context.answers[code] === 'average') return average;
  context.ask({
    code,
    detail: `${metal.count} ${metal.element} share ${stateLabel(metal.element, state)} on average; the formula alone does not say how.`,
    choices: [
      { value: 'average', label: `${stateLabel(metal.element, state)} each (delocalised)` },
      { value: split.join(','), label: split.map((s) => stateLabel(metal.element, s)).join(' ') },
    ],
    position: context.source.at[entity.start],
  });
  return average;
}

function shareBetweenElements(entity: RawEntity, charge: number, metals: RawMetal[], context: Context): Shared | null {
  const total = chargeOnMetals(entity, charge);
  if (total === null) return null;
  const splits = metals
    .reduce<Record<string, number>[]>(
      (found, m) =>
        found.flatMap((s) => commonStates(m.element).map((state) => ({ ...s, [m.element]: state }))).slice(0, 500),
      [{}],
    )
    .filter((s) => metals.reduce((sum, m) => sum + m.count * (s[m.element] ?? 0), 0) === total);
  const code = context.codeAt('oxidation-state-sharing', entity.start);
  const keyOf = (s: Record<string, number>) => metals.map((m) => `${m.element}=${s[m.element]}`).join(',');
  const chosen = splits.find((s) => keyOf(s) === context.answers[code]);
  if (chosen) {
    const centres = centresOf(entity, (m) => chosen[m.element] ?? null);
    return { centres: centres.map((c) => ({ ...c, nominal: true })), ligandCharges: new Map(), settled: true };
  }
  if (context.answers[code] === 'open')
    return { centres: centresOf(entity, () => null), ligandCharges: new Map(), settled: true };
  context.ask({
    code,
    detail: `${metals.map((m) => m.element).join(' and ')} share the charge; the formula alone does not say how.`,
    choices: [
      ...splits
        .slice(0, 6)
        .map((s) => ({ value: keyOf(s), label: metals.map((m) => stateLabel(m.element, s[m.element]!)).join(' ') })),
      { value: 'open', label: 'not known: leave the oxidation states out' },
    ],
    position: context.source.at[entity.start],
  });
  return null;
}

/** Redox-active ligands, and several centres that nothing is said or known to bridge, leave a formal state. */
function isNominal(entity: RawEntity): boolean {
  if (entity.ligands.some((l) => l.ligand.redoxActive)) return true;
  const atoms = entity.metals.reduce((sum, m) => sum + m.count, 0);
  return atoms > 1 && entity.ligands.every((l) => l.mu === null && !/^(O|OH|S)$/.test(l.ligand.abbreviation));
}
