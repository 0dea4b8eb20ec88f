import { isDBlock } from '../elements.ts';
import { nearestSpelling } from '../ligands/index.ts';
import { assembleEntity } from './assemble.ts';
import { type Context, holdsMetal, interpretParts, runHoldsMetal } from './entity.ts';
import type { Ion } from './ions.ts';
import { compositionOf, findAnion, findCation, findSolvent, ionSpellings, longest, metalOxoanion } from './lexicon.ts';
import { mergeIons, mergeSolvates, separateBracketedIons } from './merge-parts.ts';
import { bridgedPair } from './oligomer.ts';
import type { BareMetal, RawSalt } from './raw.ts';
import { descriptorOf, stereoBefore, withoutStereo } from './stereo.ts';
import { type Component, countOf, type Group, type Item, readCharge, refuse } from './syntax.ts';
import { interpretUnbracketed } from './unbracketed.ts';

/** As many entities and bare metal ions as charges are shared out over. */
const MOST_UNKNOWNS = 8;

/** Everything typed, taken apart into entities, free ions and solvates. */
export function interpretSalt(components: readonly Component[], context: Context): RawSalt {
  const salt: RawSalt = { entities: [], ions: [], bareMetals: [], solvates: [], overallCharge: null };
  const alone = components.length === 1;
  for (const component of components) {
    const part = interpretComponent(component, alone, context);
    const k = component.coefficient;
    salt.entities.push(...part.entities.map((entity) => ({ ...entity, count: entity.count * k })));
    salt.ions.push(...part.ions.map((one) => ({ ...one, count: one.count * k })));
    salt.bareMetals.push(...part.bareMetals.map((one) => ({ ...one, count: one.count * k })));
    salt.solvates.push(...part.solvates.map((one) => ({ ...one, count: one.count * k })));
    if (part.overallCharge !== null) salt.overallCharge = (salt.overallCharge ?? 0) + part.overallCharge * k;
  }
  separateBracketedIons(salt);
  const beyond = [...salt.entities, ...salt.bareMetals][MOST_UNKNOWNS];
  if (beyond)
    throw refuse('too-large', `more than ${MOST_UNKNOWNS} complexes and metal ions`, context.source, beyond.start);
  salt.ions = mergeIons(salt.ions);
  salt.solvates = mergeSolvates(salt.solvates);
  return salt;
}

function interpretComponent(component: Component, alone: boolean, context: Context): RawSalt {
  const salt: RawSalt = { entities: [], ions: [], bareMetals: [], solvates: [], overallCharge: null };
  const metal = component.items.some((item) =>
    item.kind === 'run' ? runHoldsMetal(item.text, context) : holdsMetal(item, context),
  );
  if (!metal && !alone && asSolvate(component, salt)) return salt;
  const oneIon = alone ? null : anionOf(component.text);
  if (oneIon) {
    salt.ions.push({ ion: oneIon, count: 1 });
    return salt;
  }
  if (component.items.some((item) => item.kind === 'group' && isEntityGroup(item, context)) || (!metal && !alone)) {
    interpretBracketed(component.items, salt, context);
    return salt;
  }
  return interpretUnbracketed(component, context);
}

function asSolvate(component: Component, salt: RawSalt): boolean {
  const group = component.items.length === 1 && component.items[0]!.kind === 'group' ? component.items[0]! : null;
  const [text, count] = group?.kind === 'group' ? [group.inner, group.count] : [component.text, 1];
  const known = findSolvent(text);
  if (known) {
    salt.solvates.push({ symbol: known.symbol, composition: compositionOf(known.formula)!, count });
    return true;
  }
  const composition = compositionOf(text);
  const ionic = longest(text.replace(/^\(/, ''), 0, findCation);
  if (!composition || (ionic && ionic.value.symbol !== 'H')) return false;
  salt.solvates.push({ symbol: text, composition, count });
  return true;
}

/** Square brackets that hold no known free ion, or round ones round such a bracket. */
function isEntityGroup(group: Group, context: Context): boolean {
  if (group.open === '[') return findCation(group.inner) === null && anionOf(group.inner) === null;
  return group.items.length === 1 && group.items[0]!.kind === 'group' && isEntityGroup(group.items[0]!, context);
}

function anionOf(text: string): Ion | null {
  return (
    withoutCharge(text)
      .map(findAnion)
      .find((found) => found !== null) ?? null
  );
}

/** A text as it stands, without a sign at its end, and without the digit before that: `PF6-`, `SO42-`. */
function withoutCharge(text: string): string[] {
  return [text, text.replace(/\^?[+-]+$/, ''), text.replace(/\^?\d?[+-]$/, '')];
}

function interpretBracketed(items: readonly Item[], salt: RawSalt, context: Context): void {
  const dimer = bridgedPair(items);
  if (dimer) {
    pushEntity(dimer, 1, null, salt, context);
    return;
  }
  let configuration: string | null = null;
  items.forEach((item, i) => {
    if (item.kind === 'run') {
      const next = items[i + 1];
      const prefix = next?.kind === 'group' && next.open === '[' ? stereoBefore(item.text) : null;
      configuration = prefix === null ? null : descriptorOf(prefix);
      interpretOuterRun(prefix === null ? item.text : item.text.slice(0, -prefix.length), item.start, salt, context);
    } else if (isEntityGroup(item, context)) {
      pushEntity(item, 1, configuration, salt, context);
      configuration = null;
    } else {
      interpretOuterGroup(item, salt, context);
    }
  });
}

function pushEntity(group: Group, times: number, configuration: string | null, salt: RawSalt, context: Context): void {
  const only = group.items[0]!;
  if (group.items.length === 1 && only.kind === 'group' && only.open === '[' && group.open !== '[') {
    pushEntity(only, times * group.count, configuration, salt, context);
    return;
  }
  const { items, prefix } = withoutStereo(group.items);
  salt.entities.push(
    assembleEntity(interpretParts(items, context), {
      charge: group.charge,
      count: group.count * times,
      configuration: configuration ?? prefix,
      bracketed: true,
      start: group.start,
    }),
  );
}

function interpretOuterGroup(group: Group, salt: RawSalt, context: Context): void {
  const text = group.inner.replace(/\^?\d*[+-]$/, '');
  const ion = withoutCharge(group.inner)
    .map((one) => findCation(one) ?? findAnion(one))
    .find((found) => found !== null);
  if (ion) {
    salt.ions.push({ ion, count: group.count });
    return;
  }
  const oxoanion = metalOxoanion(text);
  if (oxoanion || holdsMetal(group, context)) {
    const items: Item[] = oxoanion ? [{ kind: 'run', text, start: group.start + 1 }] : group.items;
    const charge = group.charge ?? oxoanion?.charge ?? null;
    salt.entities.push(
      assembleEntity(interpretParts(items, context), {
        charge,
        count: group.count,
        configuration: null,
        bracketed: true,
        start: group.start,
      }),
    );
    return;
  }
  throw refuse(
    'unknown-symbol',
    `the ion "${group.inner}" is unknown${nearIon(group.inner)}`,
    context.source,
    group.start,
  );
}

/** Ions outside the brackets, one after the other: `KNa2`, `Cl3`, `SO4^2-`, `Fe4`. */
function interpretOuterRun(text: string, start: number, salt: RawSalt, context: Context): void {
  let i = 0;
  while (i < text.length) {
    if (/[,;\s]/.test(text[i]!)) {
      i += 1;
      continue;
    }
    const polyhalide = /^(I3|Br3)(?=\^?-)/.exec(text.slice(i))?.[0];
    const found = polyhalide
      ? { value: { ion: findAnion(polyhalide)! }, length: polyhalide.length }
      : longest(text, i, outerSymbol);
    if (!found) {
      const token = text.slice(i);
      throw refuse('unknown-symbol', `"${token}" is no known ion${nearIon(token)}`, context.source, start + i);
    }
    const after = text.slice(i + found.length);
    const tail = ionTail(
      after,
      'ion' in found.value ? found.value.ion.charge : null,
      context,
      start + i + found.length,
    );
    if ('ion' in found.value) salt.ions.push({ ion: found.value.ion, count: tail.count });
    else if ('oxoanion' in found.value) {
      const item: Item = { kind: 'run', text: text.slice(i, i + found.length), start: start + i };
      const frame = {
        charge: found.value.oxoanion,
        count: tail.count,
        configuration: null,
        bracketed: true,
        start: start + i,
      };
      salt.entities.push(assembleEntity(interpretParts([item], context), frame));
    } else {
      const metal: BareMetal = {
        element: found.value.element,
        count: tail.count,
        charge: tail.charge,
        start: start + i,
      };
      salt.bareMetals.push(metal);
    }
    i += found.length + tail.length;
  }
}

function nearIon(token: string): string {
  const near = nearestSpelling(token, ionSpellings());
  return near === null ? '' : `; did you mean "${near}"?`;
}

type OuterSymbol = { ion: Ion } | { element: string } | { oxoanion: number };

function outerSymbol(spelling: string): OuterSymbol | null {
  const ion = findCation(spelling) ?? findAnion(spelling);
  if (ion) return { ion };
  const oxoanion = metalOxoanion(spelling);
  if (oxoanion) return { oxoanion: oxoanion.charge };
  return isDBlock(spelling) ? { element: spelling } : null;
}

/** Count and charge behind an ion. Digits before a sign are the charge when the ion bears just that, else the count. */
function ionTail(
  text: string,
  known: number | null,
  context: Context,
  offset: number,
): { count: number; charge: number | null; length: number } {
  const digits = /^\d+/.exec(text)?.[0] ?? '';
  const written = readCharge(text);
  if (written && (known === null || written.charge === known || digits === '')) {
    if (known !== null && written.charge !== known) {
      throw refuse(
        'unreadable',
        `the charge written does not belong to this ion (${known > 0 ? '+' : ''}${known})`,
        context.source,
        offset,
      );
    }
    const more = /^\d+/.exec(text.slice(written.length))?.[0] ?? '';
    const count = more === '' ? 1 : countOf(more, context.source, offset + written.length);
    return { count, charge: written.charge, length: written.length + more.length };
  }
  const count = digits === '' ? 1 : countOf(digits, context.source, offset);
  const raised = digits === '' ? null : readCharge(text.slice(digits.length));
  return { count, charge: raised?.charge ?? null, length: digits.length + (raised?.length ?? 0) };
}
