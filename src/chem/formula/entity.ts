import { findElement } from '../elements.ts';
import { findLigand, type Ligand, type LigandIndex, ligand as makeLigand, nearestLigand } from '../ligands/index.ts';
import { compositionOf, entitySymbol, longest } from './lexicon.ts';
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
}

/** Content of an entity in the order written. */
export type Part =
  | { kind: 'metal'; metal: RawMetal }
  | { kind: 'ligand'; ligand: RawLigand }
  | { kind: 'fragment'; fragment: Fragment };

const PREFIX = /^(?:(?:μ|mu)_?(\d?)|(?:η|eta|h)\^?(\d{1,2}))-/;

interface Marks {
  mu: number | null;
  hapticity: number | null;
}

/** The metals, ligands and fragments written in the brackets of an entity (or in an unbracketed formula). */
export function interpretParts(items: readonly Item[], context: Context): Part[] {
  const parts: Part[] = [];
  let marks: Marks = { mu: null, hapticity: null };
  for (const item of items) {
    if (item.kind === 'run') {
      marks = interpretRun(item.text, item.start, marks, parts, context);
    } else {
      parts.push(...interpretGroup(item, marks, context));
      marks = { mu: null, hapticity: null };
    }
  }
  return parts;
}

/** Strip `μ-`, `μ3-`, `η5-` from the front of a text. */
function readMarks(text: string, before: Marks): { marks: Marks; length: number } {
  let length = 0;
  const marks = { ...before };
  for (let match = PREFIX.exec(text); match; match = PREFIX.exec(text.slice(length))) {
    const [whole, mu, eta] = match;
    if (eta === undefined) marks.mu = mu ? Number(mu) : 2;
    else marks.hapticity = Number(eta);
    length += whole.length;
  }
  return { marks, length };
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
      parts.push({ kind: 'ligand', ligand: rawLigand(found.value.ligand, count, marks, start + i, null) });
    } else {
      parts.push({ kind: 'metal', metal: { element: found.value.element, count, start: start + i } });
    }
    marks = { mu: null, hapticity: null };
    i += found.length + digits.length;
  }
  return marks;
}

function interpretGroup(group: Group, before: Marks, context: Context): Part[] {
  if (group.charge !== null) throw chargeInside(context, group.start);
  const { marks, length } = readMarks(group.inner, before);
  const suffix = /-κ\^?\d*([A-Z][a-z]?)\S*$/.exec(group.inner);
  const name = group.inner.slice(length, suffix?.index);
  const start = group.start + 1 + length;
  const found = findLigand(name, context.library);
  if (found) return [{ kind: 'ligand', ligand: rawLigand(found, group.count, marks, start, suffix?.[1] ?? null) }];
  if (holdsMetal(group, context)) return fragmentParts(group, context);
  if (group.items.every((item) => item.kind === 'group') || group.open !== '(') {
    return interpretParts(group.items, context).map((part) => multiplied(part, group.count));
  }
  const unknown = unknownLigand(name, start, context);
  return [
    { kind: 'ligand', ligand: { ...rawLigand(unknown.ligand, group.count, marks, start, null), known: unknown.known } },
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
  return (
    findLigand(group.inner.slice(readMarks(group.inner, { mu: null, hapticity: null }).length), context.library) !==
    null
  );
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

function rawLigand(ligand: Ligand, count: number, marks: Marks, start: number, kappa: string | null): RawLigand {
  const other = kappa !== null && ligand.otherDonors.includes(kappa) ? [kappa] : null;
  return {
    ligand,
    count,
    mu: marks.mu,
    hapticity: marks.hapticity ?? ligand.hapticity,
    donors: other ?? ligand.donors,
    known: true,
    start,
  };
}

/** A ligand of known atoms but not in the library: a person says which it is, or what charge it bears. */
function unknownLigand(name: string, start: number, context: Context): { ligand: Ligand; known: boolean } {
  const composition = compositionOf(name);
  if (!composition) throw unknownToken(name, start, context);
  const plain = Object.entries(composition)
    .map(([symbol, n]) => symbol + (n === 1 ? '' : n))
    .join('');
  const same = context.library.byFormula.get(name) ?? [];
  const code = 'unknown-ligand';
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
