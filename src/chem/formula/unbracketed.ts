import { findElement } from '../elements.ts';
import { assembleEntity } from './assemble.ts';
import { type Context, holdsMetal, interpretParts, type Part, runHoldsMetal } from './entity.ts';
import type { Ion } from './ions.ts';
import { findAnion, findCation, longest } from './lexicon.ts';
import { commonStates } from './oxidation-states.ts';
import type { RawIon, RawSalt } from './raw.ts';
import { withoutStereo } from './stereo.ts';
import { type Component, countOf, type Item, readCharge } from './syntax.ts';

/**
 * Everyday formulae without square brackets. Leading cations and trailing anions that hardly bind (sulfate,
 * perchlorate, hexafluoridophosphate …) are taken as free ions; the rest is the entity. Where more donors are left
 * than six, halides at the end go outside.
 */
export function interpretUnbracketed(component: Component, context: Context): RawSalt {
  const salt: RawSalt = { entities: [], ions: [], bareMetals: [], solvates: [], overallCharge: null };
  const typed = context.source.text.slice(0, component.start + component.text.length);
  const stereo = withoutStereo(component.items);
  const { items: body, options } = splitTrailingCharge(stereo.items, typed);
  const { items: afterCations, ions: leading } = peelCations(body, context);
  const { items: core, ions: trailing } = peelAnions(afterCations, context);
  salt.ions.push(...leading);
  const parts = interpretParts(core, context);
  const chosen = chooseCharge(options, parts, leading, context, component.start);
  const counted = chosen?.count === undefined || chosen.count === null ? parts : withLastCount(parts, chosen.count);
  const { inside, outside } = fillSphere(counted, chosen !== null && trailing.length === 0);
  salt.ions.push(...outside, ...trailing);
  salt.overallCharge = chosen?.charge ?? null;
  const frame = { charge: null, count: 1, configuration: stereo.prefix, bracketed: false, start: component.start };
  salt.entities.push(assembleEntity(inside, frame));
  return salt;
}

/** A way to read the digits and sign at the end: the charge, and the count of the symbol before where digits are shared. */
interface ChargeOption {
  charge: number;
  count: number | null;
}

function splitTrailingCharge(
  items: readonly Item[],
  text: string,
): { items: readonly Item[]; options: ChargeOption[] } {
  const last = items.at(-1);
  if (!last) return { items, options: [] };
  if (last.kind === 'group') {
    if (last.charge === null) return { items, options: [] };
    const bare = /^(\d+)[+-]$/.exec(text.slice(last.start + last.inner.length + 2))?.[1];
    const cut = [...items.slice(0, -1), { ...last, charge: null }];
    if (bare !== undefined) return { items: cut, options: sharedDigits(bare, Math.sign(last.charge)) };
    return {
      items: [...items.slice(0, -1), { ...last, charge: null }],
      options: [{ charge: last.charge, count: null }],
    };
  }
  const raised = /(\^\(?(\d*[+-]+|[+-]\d+)\)?|\((\d*[+-]|[+-]\d+)\))$/.exec(last.text);
  const plain = raised ? null : /(\d*)([+-]+)$/.exec(last.text);
  const cut = (length: number): readonly Item[] =>
    length === last.text.length
      ? items.slice(0, -1)
      : [...items.slice(0, -1), { ...last, text: last.text.slice(0, -length) }];
  if (raised)
    return { items: cut(raised[0].length), options: [{ charge: readCharge(raised[0])?.charge ?? 0, count: null }] };
  if (!plain) return { items, options: [] };
  const [whole, digits = '', signs = ''] = plain;
  const sign = signs.startsWith('-') ? -1 : 1;
  const single = { charge: sign * signs.length, count: digits === '' ? null : Number(digits) };
  const options = signs.length > 1 || digits === '' ? [single] : sharedDigits(digits, sign);
  return { items: cut(whole.length), options };
}

/** `63+` behind a ligand: six of it and 3+; `2+`: two of it and +, or 2+. */
function sharedDigits(digits: string, sign: number): ChargeOption[] {
  if (digits.length > 1) return [{ charge: sign * Number(digits.at(-1)), count: Number(digits.slice(0, -1)) }];
  return [
    { charge: sign, count: Number(digits) },
    { charge: sign * Number(digits), count: null },
  ];
}

/** Settle `VO2+` (one oxide and 2+, or two and 1+) by the states the metal is usually met in; ask when both are usual. */
function chooseCharge(
  options: ChargeOption[],
  parts: readonly Part[],
  ions: readonly RawIon[],
  context: Context,
  start: number,
): ChargeOption | null {
  const [first, second] = options;
  if (!first || !second) return first ?? null;
  if (parts.length === 1) return second;
  const outer = ions.reduce((sum, one) => sum + one.ion.charge * one.count, 0);
  const usual = options.filter((option) => {
    const { metals, ligands } = flat(option.count === null ? parts : withLastCount(parts, option.count));
    const bound = ligands.reduce((sum, l) => sum + l.ligand.charge * l.count, 0);
    const atoms = metals.reduce((sum, m) => sum + m.count, 0);
    return metals.every((m) => commonStates(m.element).includes((option.charge - outer - bound) / atoms));
  });
  if (usual.length < 2) return usual[0] ?? first;
  const label = (option: ChargeOption) =>
    `${option.count ?? 1} of the last ligand, charge ${chargeText(option.charge)}`;
  const code = context.codeAt('charge-text', start);
  const answer = usual.find((option) => chargeText(option.charge) === context.answers[code]);
  if (!answer) {
    context.ask({
      code,
      detail: 'The digit before the sign can be a count or belong to the charge.',
      choices: usual.map((option) => ({ value: chargeText(option.charge), label: label(option) })),
      position: context.source.at[start],
    });
  }
  return answer ?? first;
}

const chargeText = (charge: number) => `${Math.abs(charge) === 1 ? '' : Math.abs(charge)}${charge < 0 ? '-' : '+'}`;

function flat(parts: readonly Part[]) {
  const { metals, ligands } = assembleEntity(parts, {
    charge: null,
    count: 1,
    configuration: null,
    bracketed: false,
    start: 0,
  });
  return { metals, ligands };
}

function withLastCount(parts: readonly Part[], count: number): Part[] {
  return parts.map((part, i) => {
    if (i < parts.length - 1) return part;
    if (part.kind === 'ligand') return { kind: 'ligand', ligand: { ...part.ligand, count } };
    return part.kind === 'metal' ? { kind: 'metal', metal: { ...part.metal, count } } : part;
  });
}

function peelCations(items: readonly Item[], context: Context): { items: readonly Item[]; ions: RawIon[] } {
  const ions: RawIon[] = [];
  let rest = items;
  for (let first = rest[0]; first; first = rest[0]) {
    if (first.kind === 'group') {
      const ion = findCation(first.inner.replace(/\^?\+$/, ''));
      if (!ion || rest.length === 1) break;
      ions.push({ ion, count: first.count });
      rest = rest.slice(1);
      continue;
    }
    const found = longest(first.text, 0, (spelling) =>
      findElement(spelling)?.block === 'd' ? ('metal' as const) : findCation(spelling),
    );
    if (!found || found.value === 'metal' || !mayLead(found.value, items, context)) break;
    const digits = /^\d+/.exec(first.text.slice(found.length))?.[0] ?? '';
    ions.push({
      ion: found.value,
      count: digits === '' ? 1 : countOf(digits, context.source, first.start + found.length),
    });
    const length = found.length + digits.length;
    const left = first.text.slice(length).replace(/^\^?\+/, '');
    const run: Item = { kind: 'run', text: left, start: first.start + first.text.length - left.length };
    rest = left === '' ? rest.slice(1) : [run, ...rest.slice(1)];
  }
  return { items: rest, ions };
}

/** H before a carbonyl or phosphane metal is a hydride, and an f-block metal leads only where a d-block metal follows. */
function mayLead(ion: Ion, items: readonly Item[], context: Context): boolean {
  const neutral = items.some((item) => item.kind === 'group' && /^(CO|NO|P[A-Z(]|Cp|dp)/.test(item.inner));
  if (ion.symbol === 'H') return !neutral;
  if (findElement(ion.symbol)?.block !== 'f') return true;
  return items.some((item) => {
    const text = item.kind === 'run' ? item.text.replace(ion.symbol, '') : '';
    return item.kind === 'run' ? runHoldsMetal(text, context) : holdsMetal(item, context);
  });
}

function peelAnions(items: readonly Item[], context: Context): { items: readonly Item[]; ions: RawIon[] } {
  const ions: RawIon[] = [];
  let rest = items;
  for (let last = rest.at(-1); last && rest.length > 0; last = rest.at(-1)) {
    if (last.kind === 'group') {
      const ion = findAnion(last.inner.replace(/\^?\d?-$/, ''));
      if (!ion?.outer || rest.length === 1) break;
      ions.unshift({ ion, count: last.count });
      rest = rest.slice(0, -1);
      continue;
    }
    const peeled = peelFromRun(last.text, rest.length === 1);
    if (!peeled) break;
    ions.unshift({
      ion: peeled.ion,
      count: peeled.digits === '' ? 1 : countOf(peeled.digits, context.source, last.start),
    });
    rest = peeled.left === '' ? rest.slice(0, -1) : [...rest.slice(0, -1), { ...last, text: peeled.left }];
  }
  return { items: rest, ions };
}

/** An outer anion at the end of a run (`VOSO4`), with its count; the longest that fits. */
function peelFromRun(text: string, only: boolean): { ion: Ion; digits: string; left: string } | null {
  for (let length = Math.min(12, text.length - (only ? 1 : 0)); length >= 3; length -= 1) {
    const ion = findAnion(text.slice(-length));
    if (ion?.outer) return { ion, digits: '', left: text.slice(0, -length) };
  }
  return null;
}

/** Charged single-donor ligands at the end go outside while one centre would hold more than six donors. */
function fillSphere(parts: readonly Part[], charged: boolean): { inside: readonly Part[]; outside: RawIon[] } {
  const { metals, ligands } = flat(parts);
  const single = metals.length === 1 && metals[0]!.count === 1;
  const neutralDonors = ligands.some((l) => l.ligand.charge === 0);
  if (!single || charged || !neutralDonors || parts.some((part) => part.kind === 'fragment'))
    return { inside: parts, outside: [] };
  let excess =
    ligands.reduce((sum, l) => sum + l.count * (l.hapticity === null ? Math.min(...l.ligand.denticities) : 1), 0) - 6;
  const inside = [...parts];
  const outside: RawIon[] = [];
  for (let i = inside.length - 1; i >= 0 && excess > 0; i -= 1) {
    const part = inside[i]!;
    const ion = part.kind === 'ligand' ? findAnion(part.ligand.ligand.abbreviation) : null;
    if (part.kind !== 'ligand' || !ion || ion.charge !== -1) continue;
    const moved = Math.min(part.ligand.count, excess);
    excess -= moved;
    outside.unshift({ ion, count: moved });
    if (moved === part.ligand.count) inside.splice(i, 1);
    else inside[i] = { kind: 'ligand', ligand: { ...part.ligand, count: part.ligand.count - moved } };
  }
  return { inside, outside };
}
