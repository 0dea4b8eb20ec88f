import { isDBlock } from '../elements.ts';
import { chargeOf } from './charge-text.ts';
import type { Context } from './entity.ts';
import { usualCharges } from './metal-charge.ts';
import { commonStates, stateLabel } from './oxidation-states.ts';
import type { RawEntity, RawSalt } from './raw.ts';
import { refuse } from './syntax.ts';

/** Charges after balancing; null where a question is open. */
export interface Balance {
  entities: (number | null)[];
  bareMetals: (number | null)[];
  overall: number | null;
}

/** One thing whose charge is sought: an entity or a bare metal ion. */
interface Unknown {
  count: number;
  typed: number | null;
  candidates: { charge: number; rank: number }[];
  elements: string[];
  label: (charge: number) => string;
}

/**
 * Charges of entities and bare metal ions, from what was typed and the demand that all sums to nothing (or to the
 * charge written behind the whole). Asks where typed charges do not sum up, and where several splits are as good.
 */
export function balanceCharges(salt: RawSalt, context: Context): Balance {
  const unknowns = [...salt.entities.map((e) => entityUnknown(e)), ...salt.bareMetals.map((m) => bareUnknown(m))];
  const ions = salt.ions.reduce((sum, one) => sum + one.ion.charge * one.count, 0);
  const total = salt.overallCharge ?? 0;
  const open = unknowns.filter((u) => u.typed === null);
  const typed = unknowns.reduce((sum, u) => sum + (u.typed ?? 0) * u.count, 0);
  const answer = (charges: (number | null)[], overall: number | null): Balance => ({
    entities: charges.slice(0, salt.entities.length),
    bareMetals: charges.slice(salt.entities.length),
    overall,
  });
  const settle = (found: ReadonlyMap<Unknown, number>, overall: number) =>
    answer(
      unknowns.map((u) => u.typed ?? found.get(u) ?? null),
      overall,
    );
  const nothing = answer(
    unknowns.map(() => null),
    null,
  );

  if (open.length === 0) {
    const sum = ions + typed;
    const single = salt.ions.length + unknowns.length === 1;
    if (sum === total || (single && salt.overallCharge === null)) return settle(new Map(), sum);
    return mismatch(salt, unknowns, total - ions, context, settle, ions) ?? nothing;
  }
  const mixed = sameElementTwice(salt) && open.length > 1;
  if (open.length === 1) {
    const [only] = open;
    const charge = (total - ions - typed) / only!.count;
    if (Number.isInteger(charge)) return settle(new Map([[only!, charge]]), total);
    return mismatch(salt, unknowns, total - ions, context, settle, ions) ?? nothing;
  }
  const found = splitCharge(open, total - ions - typed, mixed, context, salt);
  return found ? settle(found, total) : nothing;
}

function entityUnknown(entity: RawEntity): Unknown {
  return {
    count: entity.count,
    typed: entity.charge,
    candidates: usualCharges(entity).map(({ charge }, rank) => ({ charge, rank })),
    elements: entity.metals.map((m) => m.element).filter(isDBlock),
    label: (charge) => {
      const state = usualCharges(entity).find((c) => c.charge === charge)?.state;
      const [metal] = entity.metals;
      return metal && state !== undefined ? stateLabel(metal.element, state) : chargeOf(charge);
    },
  };
}

function bareUnknown(metal: RawSalt['bareMetals'][number]): Unknown {
  return {
    count: metal.count,
    typed: metal.charge,
    candidates: commonStates(metal.element).map((charge, rank) => ({ charge, rank })),
    elements: [metal.element],
    label: (charge) => stateLabel(metal.element, charge),
  };
}

function sameElementTwice(salt: RawSalt): boolean {
  const inside = new Set(salt.entities.flatMap((e) => e.metals.map((m) => m.element)));
  return salt.bareMetals.some((m) => inside.has(m.element));
}

/** Typed charges that do not sum up: keep them, or let the one entity take what balances. */
function mismatch(
  salt: RawSalt,
  unknowns: Unknown[],
  rest: number,
  context: Context,
  settle: (found: ReadonlyMap<Unknown, number>, overall: number) => Balance,
  ions: number,
): Balance | null {
  const code = 'charge-mismatch';
  const [first] = unknowns;
  const others = unknowns.slice(1).reduce((sum, u) => sum + (u.typed ?? 0) * u.count, 0);
  const balancing = first ? (rest - others) / first.count : Number.NaN;
  const canBalance = first !== undefined && Number.isInteger(balancing);
  const stated = unknowns.every((u) => u.typed !== null);
  const answer = context.answers[code];
  if (answer === 'stated' && stated) {
    return settle(new Map(), ions + unknowns.reduce((sum, u) => sum + (u.typed ?? 0) * u.count, 0));
  }
  if (answer === 'balance' && canBalance) {
    first.typed = balancing;
    return settle(new Map(), rest + ions);
  }
  const usual = stated || !first ? [] : first.candidates;
  const chosen = usual.find((c) => String(c.charge) === answer);
  if (first && chosen) return settle(new Map([[first, chosen.charge]]), ions + others + chosen.charge * first.count);
  const choices = [
    ...(stated
      ? [
          {
            value: 'stated',
            label: `the charge stated, ${chargeOf(first?.typed ?? 0) || '0'}; counter-ions are missing or too many`,
          },
        ]
      : []),
    ...(canBalance ? [{ value: 'balance', label: `the charge that balances, ${chargeOf(balancing) || '0'}` }] : []),
    ...usual.map((c) => ({ value: String(c.charge), label: `charge ${chargeOf(c.charge) || '0'}` })),
  ];
  const at = salt.entities[0]?.start ?? 0;
  if (choices.length === 0)
    throw refuse(
      'ambiguous',
      'no charge of the entity balances the ions: write it behind the bracket',
      context.source,
      at,
    );
  context.ask({
    code,
    detail: stated
      ? `The charges typed sum to ${ions + unknowns.reduce((s, u) => s + (u.typed ?? 0) * u.count, 0)}, not to ${rest + ions}.`
      : `No whole charge of the entity balances the counter-ions (${Number(balancing.toFixed(3))} would).`,
    choices,
    position: context.source.at[at],
  });
  return null;
}

/** Share a sum out over several unknowns by usual states; a tie, or one element in two roles, is a question. */
function splitCharge(
  open: Unknown[],
  sum: number,
  mixed: boolean,
  context: Context,
  salt: RawSalt,
): Map<Unknown, number> | null {
  const usual = open
    .reduce<{ charges: number[]; rank: number }[]>(
      (found, u) =>
        found
          .flatMap((s) => u.candidates.map((c) => ({ charges: [...s.charges, c.charge], rank: s.rank + c.rank })))
          .slice(0, 2000),
      [{ charges: [], rank: 0 }],
    )
    .filter((s) => s.charges.reduce((total, charge, i) => total + charge * open[i]!.count, 0) === sum)
    .sort((a, b) => a.rank - b.rank);
  const splits = usual.length > 0 ? usual : pairsOf(open, sum);
  if (splits.length === 0) {
    const at = salt.entities[0]?.start ?? 0;
    throw refuse('ambiguous', 'the charges do not follow: write the charge behind each bracket', context.source, at);
  }
  const code = mixed ? 'mixed-valence' : 'charge-split';
  const keyOf = (s: { charges: number[] }) => s.charges.join(',');
  const [best, next] = splits;
  const chosen =
    splits.find((s) => keyOf(s) === context.answers[code]) ??
    (best && !mixed && usual.length > 0 && (!next || next.rank > best.rank) ? best : null);
  if (chosen) return new Map(open.map((u, i) => [u, chosen.charges[i]!]));
  context.ask({
    code,
    detail: mixed
      ? 'One element stands in two roles; the sum of charges does not say which atom has which state.'
      : 'The charge can be shared between the ions in several ways.',
    choices: splits.slice(0, 6).map((s) => ({
      value: keyOf(s),
      label: s.charges.map((charge, i) => chargeLabel(open[i]!, charge)).join('; '),
    })),
    position: context.source.at[salt.entities[0]?.start ?? 0],
  });
  return null;
}

/** `Fe(III), ion 3-`; the charge alone where it gives no usual state. */
function chargeLabel(unknown: Unknown, charge: number): string {
  const [ion, state] = [`ion ${chargeOf(charge) || '0'}`, unknown.label(charge)];
  return state === chargeOf(charge) ? ion : `${state}, ${ion}`;
}

/** Where no usual states add up, all charges of two ions that do, small ones first. */
function pairsOf(open: readonly Unknown[], sum: number): { charges: number[]; rank: number }[] {
  const [first, second, third] = open;
  if (!first || !second || third) return [];
  return [2, -2, 1, -1, 3, -3, 4, -4]
    .map((charge) => ({ charges: [charge, (sum - charge * first.count) / second.count], rank: Math.abs(charge) }))
    .filter(({ charges }) => Number.isInteger(charges[1]));
}
