import { dElectronCount } from '../electrons.ts';
import { findElement, isDBlock } from '../elements.ts';
import { ligandKey } from './assemble.ts';
import { chargeOf } from './charge-text.ts';
import type { Context } from './entity.ts';
import { commonStates, type LigandField, type Plausibility, plausibility, stateLabel } from './oxidation-states.ts';
import type { RawEntity, RawLigand, RawMetal } from './raw.ts';
import type { CentreReading } from './types.ts';

/** Atoms inside an entity that keep one state: heteroatoms of polyoxometalates, and s-block cations between oxides. */
const FIXED: Readonly<Record<string, number>> = {
  P: 5,
  As: 5,
  Sb: 5,
  Si: 4,
  Ge: 4,
  Sn: 4,
  B: 3,
  Al: 3,
  Ga: 3,
  In: 3,
  Bi: 3,
  Tl: 1,
  Pb: 2,
  Te: 6,
  Li: 1,
  Na: 1,
  K: 1,
  Rb: 1,
  Cs: 1,
  Mg: 2,
  Ca: 2,
  Sr: 2,
  Ba: 2,
};

/** Charge counted for each ligand of an entity: that of the library unless a person or the metal says otherwise. */
export type LigandCharges = ReadonlyMap<RawLigand, number>;

export interface Shared {
  centres: CentreReading[];
  ligandCharges: LigandCharges;
  /** False while a question about oxidation states is open. */
  settled: boolean;
}

/** Facts about the ligands that tell believable from unbelievable oxidation states. */
export function ligandField(entity: RawEntity): LigandField {
  const ligands = entity.ligands.map(({ ligand }) => ligand);
  return {
    acceptor: ligands.some(
      (l) => l.donors.some((d) => /^(C|H|P|As|Sn|S)$/.test(d)) || /^(NO|N2)$/.test(l.abbreviation),
    ),
    diimine: ligands.some(isDiimine),
    strongDonor: ligands.some((l) => /^(O|F|N|O2|OOH|S|OH)$/.test(l.abbreviation)),
    allNeutral: ligands.length > 0 && ligands.every((l) => l.charge === 0),
  };
}

/** Chelating N-heterocycles, which take up electrons before a metal reaches zero: bpy, phen, tpy. */
function isDiimine({ piCharacter, donors, denticity }: RawLigand['ligand']): boolean {
  return piCharacter === 'acceptor' && denticity > 1 && donors.every((d) => d === 'N');
}

/** Charge left for the d-block centres once ligands and atoms of fixed state have theirs; null when a ligand is open. */
export function chargeOnMetals(entity: RawEntity, charge: number, charges?: LigandCharges): number | null {
  if (entity.ligands.some((l) => !l.known)) return null;
  const bound = entity.ligands.reduce((sum, l) => sum + l.count * (charges?.get(l) ?? l.ligand.charge), 0);
  const fixed = entity.metals.reduce((sum, m) => sum + m.count * (isDBlock(m.element) ? 0 : fixedState(m.element)), 0);
  return charge - bound - fixed;
}

function fixedState(symbol: string): number {
  return FIXED[symbol] ?? (findElement(symbol)?.block === 'f' ? 3 : 0);
}

export function dMetals(entity: RawEntity): RawMetal[] {
  return entity.metals.filter((m) => isDBlock(m.element));
}

/** Entity charges that give the metal one of its usual states, usual first; for one kind of d-block metal only. */
export function usualCharges(entity: RawEntity): { charge: number; state: number }[] {
  const [metal, other] = dMetals(entity);
  const zero = chargeOnMetals(entity, 0);
  if (zero === null || other) return [];
  // Without a d-block centre all states are fixed, and so is the charge: [Al(H2O)6]3+
  if (!metal) return [{ charge: -zero || 0, state: fixedState(entity.metals[0]?.element ?? '') }];
  return commonStates(metal.element).map((state) => ({ charge: state * metal.count - zero || 0, state }));
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

/** One way to count the ligands of an entity, and the state it leaves to the metal. */
interface ChargeOption {
  /** `-1`; where several kinds of ligand are open, `NO=1,dmit=-2`. */
  value: string;
  /** `NO counted +` */
  words: string;
  charges: LigandCharges;
  state: number;
  fit: Plausibility;
}

const MOST_OPTIONS = 81;

/** All ways to count the ligands that can be counted in several, each usual way first; whatever the order typed. */
function chargeOptions(entity: RawEntity, open: readonly RawLigand[], charge: number, metal: RawMetal): ChargeOption[] {
  const field = ligandField(entity);
  const usual: LigandCharges = new Map(entity.ligands.map((l) => [l, l.ligand.charge]));
  return open
    .reduce<LigandCharges[]>(
      (ways, l) =>
        ways
          .flatMap((way) => [l.ligand.charge, ...l.ligand.alternativeCharges].map((z) => new Map(way).set(l, z)))
          .slice(0, MOST_OPTIONS),
      [usual],
    )
    .flatMap((charges) => {
      const left = chargeOnMetals(entity, charge, charges);
      if (left === null) return [];
      const state = left / metal.count;
      const each = open.map((l) => ({ symbol: l.ligand.abbreviation, z: charges.get(l) ?? 0 }));
      const value = each.length === 1 ? String(each[0]!.z) : each.map(({ symbol, z }) => `${symbol}=${z}`).join(',');
      const words = each.map(({ symbol, z }) => `${symbol} counted ${chargeOf(z) || '0'}`).join(', ');
      return [{ value, words, charges, state, fit: plausibility(metal.element, state, field) }];
    });
}

/** Ligands that may be counted in several ways: the usual way unless only another one gives the metal a usual state. */
function chooseLigandCharges(
  entity: RawEntity,
  charge: number,
  metal: RawMetal,
  context: Context,
): (ChargeOption & { alternatives: number[] }) | null {
  const open = entity.ligands
    .filter((l) => l.ligand.alternativeCharges.length > 0)
    .sort((a, b) => (ligandKey(a) < ligandKey(b) ? -1 : 1));
  const options = chargeOptions(entity, open, charge, metal);
  const [first] = options;
  if (!first) return null;
  if (open.length === 0) return { ...first, alternatives: [] };
  const code = context.codeAt('ligand-charge', entity.start);
  const answered = options.find((o) => o.value === context.answers[code]?.replace('+', ''));
  const usual = options.filter((o) => o.fit === 'usual');
  const believable = options.filter((o) => o.fit === 'usual' || o.fit === 'rare');
  const dioxygen = open.some((l) => l.ligand.abbreviation === 'O2');
  const doubtful = dioxygen ? usual.length > 1 : first.fit !== 'usual' && believable.length > 1;
  if (!answered && doubtful) {
    const names = open.map((l) => l.ligand.abbreviation);
    context.ask({
      code,
      detail: `${names.join(' and ')} can be counted in several ways, and each gives ${metal.element} a state of its own.`,
      choices: believable.map((o) => ({ value: o.value, label: `${o.words}: ${stateLabel(metal.element, o.state)}` })),
      position: context.source.at[Math.min(...open.map((l) => l.start))],
    });
    return null;
  }
  const taken =
    answered ??
    (first.fit === 'usual' ? first : (usual[0] ?? (believable.includes(first) ? first : (believable[0] ?? first))));
  const others = believable.filter((o) => o !== taken).map((o) => o.state);
  return { ...taken, alternatives: [...new Set(others)].filter((state) => state !== taken.state) };
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

/** Mercury(I) and its like: two atoms share the one s electron that each keeps. */
function isMetalPair(metal: RawMetal, state: number): boolean {
  return findElement(metal.element)?.group === 12 && state === 1 && metal.count > 1;
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
