import { findElement } from '../elements.ts';
import { findLigand, type Ligand, type LigandIndex, ligand as makeLigand, nearestLigand } from '../ligands/index.ts';
import { compositionOf, entitySymbol, longest } from './lexicon.ts';
import { KAPPA_SUFFIX, kappaOf, type Marks, NO_MARKS, readMarks } from './marks.ts';
import type { NormalText } from './normalise.ts';
import type { Fragment, RawLigand, RawMetal } from './raw.ts';
import { countOf, type Group, type Item, refuse } from './syntax.ts';
import type { Answers, Question } from './types.ts';

/** What interpreting needs besides the text: library, answers given, and a place for questions raised. */
export interface Context {
  source: NormalText;
  library: LigandIndex;
  answers: Answers;
  ask(question: Question): void;
  /** The code of a doubt at a place of the text: plain for the first place it comes up at, then `code:2`, `code:3`. */
  codeAt(code: string, start: number): string;
}

/** Content of an entity in the order written. */
export type Part =
  | { kind: 'metal'; metal: RawMetal }
  | { kind: 'ligand'; ligand: RawLigand }
  | { kind: 'fragment'; fragment: Fragment };

/** The metals, ligands and fragments written in the brackets of an entity (or in an unbracketed formula). */
export function interpretParts(items: readonly Item[], context: Context): Part[] {
  const parts: Part[] = [];
  let marks = NO_MARKS;
  for (const item of items) {
    if (item.kind === 'run') {
      marks = interpretRun(item.text, item.start, marks, parts, context);
    } else {
      parts.push(...interpretGroup(item, marks, context));
      marks = NO_MARKS;
    }
  }
  return parts;
}

function interpretRun(text: string, start: number, before: Marks, parts: Part[], context: Context): Marks {
  let i = 0;
  let marks = before;
  while (i < text.length) {
    if (/[,;:\s-]/.test(text[i]!)) {
      i += 1; // separators and bond dashes carry no atoms
      continue;
    }
    const lead = readMarks(text.slice(i), marks);
    marks = lead.marks;
    i += lead.length;
    if (i === text.length) return marks;
    const heteroatom = /^[PB](?=\d?(?:W|Mo|V))/.exec(text.slice(i)); // of a polyoxometalate, as in [PW12O40]3-
    const found = heteroatom
      ? { value: { element: heteroatom[0] }, length: 1 }
      : longest(text, i, (spelling) => entitySymbol(spelling, context.library));
    if (!found && /[+^]/.test(text[i]!)) throw chargeInside(context, start + i);
    if (!found) throw unknownToken(text.slice(i), start + i, context);
    const digits = /^\d+/.exec(text.slice(i + found.length))?.[0] ?? '';
    const count = digits === '' ? 1 : countOf(digits, context.source, start + i + found.length);
    if ('ligand' in found.value) {
      const typed = text.slice(i, i + found.length);
      parts.push({ kind: 'ligand', ligand: rawLigand(found.value.ligand, typed, count, marks, start + i, context) });
    } else {
      parts.push({ kind: 'metal', metal: { element: found.value.element, count, start: start + i } });
    }
    marks = NO_MARKS;
    i += found.length + digits.length;
  }
  return marks;
}

function interpretGroup(group: Group, before: Marks, context: Context): Part[] {
  if (group.charge !== null) throw chargeInside(context, group.start);
  const { marks: read, length } = readMarks(group.inner, before);
  const suffix = KAPPA_SUFFIX.exec(group.inner);
  const name = group.inner.slice(length, suffix?.index);
  const marks = suffix ? { ...read, kappa: kappaOf(suffix[1] ?? '', suffix[2] ?? '') } : read;
  const start = group.start + 1 + length;
  const found = findLigand(name, context.library);
  if (found) return [{ kind: 'ligand', ligand: rawLigand(found, name, group.count, marks, start, context) }];
  if (holdsMetal(group, context)) return fragmentParts(group, context);
  if (group.items.every((item) => item.kind === 'group') || group.open !== '(') {
    return interpretParts(group.items, context).map((part) => multiplied(part, group.count));
  }
  const unknown = unknownLigand(name, marks.hapticity, start, context);
  return [
    {
      kind: 'ligand',
      ligand: {
        ...rawLigand(unknown.ligand, name, group.count, { ...marks, kappa: null }, start, context),
        known: unknown.known,
      },
    },
  ];
}

/** A bracket inside an entity that holds a metal of its own: `{Ru(NH3)5}2`. */
function fragmentParts(group: Group, context: Context): Part[] {
  const inner = interpretParts(group.items, context);
  if (inner.some((part) => part.kind === 'fragment')) return inner.map((part) => multiplied(part, group.count));
  const metals = inner.flatMap((part) => (part.kind === 'metal' ? [part.metal] : []));
  const ligands = inner.flatMap((part) => (part.kind === 'ligand' ? [part.ligand] : []));
  return [{ kind: 'fragment', fragment: { metals, ligands, count: group.count } }];
}

function multiplied(part: Part, by: number): Part {
  if (part.kind === 'metal') return { kind: 'metal', metal: { ...part.metal, count: part.metal.count * by } };
  if (part.kind === 'ligand') return { kind: 'ligand', ligand: { ...part.ligand, count: part.ligand.count * by } };
  return { kind: 'fragment', fragment: { ...part.fragment, count: part.fragment.count * by } };
}

/** Whether a d- or f-block symbol stands in a group (ligand names such as `en` or `salen` hold none). */
export function holdsMetal(group: Group, context: Context): boolean {
  return group.items.some((item) =>
    item.kind === 'group' ? !isKnown(item, context) && holdsMetal(item, context) : runHoldsMetal(item.text, context),
  );
}

function isKnown(group: Group, context: Context): boolean {
  return findLigand(group.inner.slice(readMarks(group.inner, NO_MARKS).length), context.library) !== null;
}

/** Whether a d- or f-block symbol stands in a run of text. */
export function runHoldsMetal(text: string, context: Context): boolean {
  for (let i = 0; i < text.length; ) {
    const found = longest(text, i, (spelling) => entitySymbol(spelling, context.library));
    if (found && 'element' in found.value && ['d', 'f'].includes(findElement(found.value.element)?.block ?? ''))
      return true;
    i += found?.length ?? 1;
  }
  return false;
}

function rawLigand(
  named: Ligand,
  typed: string,
  count: number,
  { mu, hapticity, kappa }: Marks,
  start: number,
  context: Context,
): RawLigand {
  const ligand = kappa?.atom ? linkageIsomer(named, kappa.atom, context.library) : named;
  const other = kappa?.atom && ligand.otherDonors.includes(kappa.atom) ? [kappa.atom] : null;
  if (kappa && kappa.count > (other ?? ligand.donors).length) {
    const most = (other ?? ligand.donors).length;
    throw refuse(
      'unreadable',
      `the κ asks for ${kappa.count} donor atoms; ${typed} has ${most}`,
      context.source,
      start,
    );
  }
  return {
    ligand,
    count,
    mu,
    hapticity: hapticity ?? ligand.hapticity,
    donors: other ?? ligand.donors,
    denticity: kappa && ligand.hapticity === null && hapticity === null ? kappa.count : null,
    typed,
    known: true,
    start,
  };
}

/** `SCN-κN` is the ligand of the same atoms bound by nitrogen; as named where there is none such. */
function linkageIsomer(ligand: Ligand, atom: string, { byFormula }: LigandIndex): Ligand {
  if (ligand.donors.includes(atom) || ligand.otherDonors.includes(atom)) return ligand;
  return byFormula.get(ligand.formula)?.find((l) => l.charge === ligand.charge && l.donors[0] === atom) ?? ligand;
}

/** A ligand of known atoms but not in the library: a person says which it is, or what charge it bears. */
function unknownLigand(
  name: string,
  hapticity: number | null,
  start: number,
  context: Context,
): { ligand: Ligand; known: boolean } {
  const composition = compositionOf(name);
  if (!composition) throw unknownToken(name, start, context);
  const plain = Object.entries(composition)
    .map(([symbol, n]) => symbol + (n === 1 ? '' : n))
    .join('');
  const all = context.library.byFormula.get(name) ?? [];
  const same = hapticity === null ? all : all.filter((entry) => entry.hapticity === hapticity);
  if (hapticity !== null && same.length === 1) return { ligand: same[0]!, known: true };
  const code = context.codeAt('unknown-ligand', start);
  const answer = context.answers[code];
  const chosen = same.find((entry) => entry.abbreviation === answer);
  if (chosen) return { ligand: chosen, known: true };
  const charge = answer !== undefined && /^[+-]?\d$/.test(answer) ? Number(answer) : null;
  if (charge === null) {
    context.ask({
      code,
      detail: `The ligand ${name} is ${same.length > 0 ? 'one of several in' : 'not in'} the ligand library.`,
      choices: [
        ...same.map((entry) => ({ value: entry.abbreviation, label: `${entry.abbreviation}: ${entry.name}` })),
        ...[0, -1, -2].map((z) => ({
          value: String(z),
          label: `a ligand of charge ${z === 0 ? '0' : `${-z}-`}, one donor atom`,
        })),
      ],
      position: context.source.at[start],
    });
  }
  const donor = /^[A-Z][a-z]?/.exec(name)?.[0] ?? 'C';
  const made = makeLigand(name, plain, charge ?? 0, donor, name, '', 'none');
  return { ligand: made, known: charge !== null };
}

function chargeInside(context: Context, offset: number): ReturnType<typeof refuse> {
  return refuse('unreadable', 'a charge stands inside the brackets; write it behind them', context.source, offset);
}

/** A refusal for a token that is neither element nor ligand, with the nearest known one. */
export function unknownToken(text: string, start: number, context: Context): ReturnType<typeof refuse> {
  const token = /^[A-Za-z][a-z0-9′*]*/.exec(text)?.[0] ?? text.slice(0, 1);
  const near = nearestLigand(token, context.library);
  const hint = near === null ? '' : `; did you mean "${near}"?`;
  const what = /^[A-Z][a-z]?\d*$/.test(token) && near === null ? 'symbol' : 'ligand';
  return refuse('unknown-symbol', `the ${what} "${token}" is unknown${hint}`, context.source, start);
}
