import { DomainError } from '../errors.ts';
import type { NormalText } from './normalise.ts';
import { bracketedStereo } from './stereo.ts';

/** Letters, digits and marks between brackets, counts included: `CoCl2`, `K4`, `SO4^2-`. */
export interface Run {
  kind: 'run';
  text: string;
  /** Offset of the first character in the normalised text. */
  start: number;
}

/** What stands between a pair of brackets, with the count and charge written behind it. */
export interface Group {
  kind: 'group';
  open: '(' | '[' | '{';
  items: Item[];
  inner: string;
  count: number;
  charge: number | null;
  start: number;
}

export type Item = Run | Group;

/** A part between centred dots: `3H2O` has coefficient 3. */
export interface Component {
  coefficient: number;
  items: Item[];
  /** The text without its coefficient. */
  text: string;
  start: number;
}

const CLOSES: Readonly<Record<string, string>> = { ')': '(', ']': '[', '}': '{' };
const MAX_DEPTH = 8;
const MAX_COUNT = 999;

/**
 * Brackets, counts, charges and centred dots of a normalised formula.
 *
 * @throws {DomainError} `unbalanced-bracket`, `malformed-hydrate`, `too-large` (depth over 8, count over 999),
 *   `unreadable` (empty bracket, count of zero, a stray character), each with its offset in the text as typed
 */
export function parseSyntax(source: NormalText): Component[] {
  checkBrackets(source);
  const components: Component[] = [];
  let start = 0;
  let depth = 0;
  for (let i = 0; i <= source.text.length; i += 1) {
    const c = source.text[i];
    if (c !== undefined && '([{'.includes(c)) depth += 1;
    if (c !== undefined && c in CLOSES) depth -= 1;
    if (c === '·' && depth > 0) throw refuse('unreadable', 'a centred dot stands inside a bracket', source, i);
    if (c !== undefined && c !== '·') continue;
    components.push(parseComponent(source, start, i, components.length > 0));
    start = i + 1;
  }
  return components;
}

function parseComponent(source: NormalText, start: number, end: number, follows: boolean): Component {
  const text = source.text.slice(start, end);
  const lead = /^(\d+\/\d+|\d+(?:\.\d+)?|n|x)(?=[A-Z([{a-z])/.exec(text);
  const body = lead ? lead[0].length : 0;
  if (text === '' || body === text.length || /^[\d./]+$/.test(text)) {
    throw refuse('malformed-hydrate', 'a formula is expected beside the centred dot', source, start);
  }
  const coefficient = lead ? coefficientOf(lead[0], source, start, follows) : 1;
  return { coefficient, items: parseItems(source, start + body, end), text: text.slice(body), start: start + body };
}

function coefficientOf(text: string, source: NormalText, start: number, follows: boolean): number {
  if (text === 'n' || text === 'x') {
    throw refuse('malformed-hydrate', `"${text}" is no number: state how many, or leave it out`, source, start);
  }
  const [top, bottom] = text.split('/').map(Number);
  const value = bottom === undefined ? top! : top! / bottom;
  if (!(value > 0) || !Number.isFinite(value)) {
    throw refuse(
      follows ? 'malformed-hydrate' : 'unreadable',
      `a coefficient of ${text} makes no sense`,
      source,
      start,
    );
  }
  if (value > MAX_COUNT) throw refuse('too-large', `a count of ${text} is over ${MAX_COUNT}`, source, start);
  return value;
}

function parseItems(source: NormalText, start: number, end: number): Item[] {
  const items: Item[] = [];
  let i = start;
  while (i < end) {
    const c = source.text[i]!;
    if ('([{'.includes(c) && keptInRun(source.text, i) === 0) {
      const close = matchingClose(source.text, i);
      const inner = source.text.slice(i + 1, close);
      if (inner === '') throw refuse('unreadable', 'the brackets are empty', source, i);
      const tail = countAndCharge(source, close + 1, end);
      items.push({
        kind: 'group',
        open: c as Group['open'],
        items: parseItems(source, i + 1, close),
        inner,
        count: tail.count,
        charge: tail.charge,
        start: i,
      });
      i = tail.end;
    } else {
      let j = i;
      while (j < end && (!'([{'.includes(source.text[j]!) || keptInRun(source.text, j) > 0)) {
        j += Math.max(1, keptInRun(source.text, j));
      }
      items.push({ kind: 'run', text: source.text.slice(i, j), start: i });
      i = j;
    }
  }
  return items;
}

/** Length of what stands in parentheses without being a group: a charge or a stereodescriptor. */
function keptInRun(text: string, index: number): number {
  return bracketedCharge(text, index) || bracketedStereo(text, index);
}

/** Length of a charge in parentheses, as in `Fe(3+)`; 0 where there is none. */
function bracketedCharge(text: string, index: number): number {
  return /^\((\d*[+-]|[+-]\d+)\)/.exec(text.slice(index, index + 8))?.[0].length ?? 0;
}

/** The bracket that closes the one at `open`; balance has been checked before. */
function matchingClose(text: string, open: number): number {
  let depth = 0;
  for (let i = open; ; i += 1) {
    if ('([{'.includes(text[i]!)) depth += 1;
    else if (text[i]! in CLOSES) depth -= 1;
    if (depth === 0) return i;
  }
}

/** Written charge at the start of a text: `3+`, `+3`, `^3-`, `(2+)`, `--`; with `caret`, only raised ones. */
export function readCharge(text: string): { charge: number; length: number } | null {
  const match =
    /^\^?\((\d*)([+-])\)/.exec(text) ??
    /^\^?\(([+-])(\d+)\)/.exec(text) ??
    /^\^?(\d+)([+-])/.exec(text) ??
    /^\^?([+-])(\d+)/.exec(text) ??
    /^\^?()(\++|-+)/.exec(text);
  if (!match) return null;
  const [whole, a = '', b = ''] = match;
  const digits = /\d/.test(a) ? a : /\d/.test(b) ? b : '';
  const signs = /[+-]/.test(a) ? a : b;
  const size = digits === '' ? signs.length : Number(digits);
  return { charge: signs.startsWith('-') ? -size || 0 : size, length: whole.length };
}

function countAndCharge(
  source: NormalText,
  from: number,
  end: number,
): { count: number; charge: number | null; end: number } {
  const rest = source.text.slice(from, end);
  // `]3+` is a charge, `]3` a count, `)2(` a count; `(3+)` is a charge only right behind a bracket.
  const charge = readCharge(rest);
  let i = from + (charge?.length ?? 0);
  const digits = /^\d+/.exec(source.text.slice(i, end))?.[0];
  let count = 1;
  if (digits !== undefined) {
    count = countOf(digits, source, i);
    i += digits.length;
  }
  const late = charge ? null : readCharge(source.text.slice(i, end));
  return { count, charge: charge?.charge ?? late?.charge ?? null, end: i + (late?.length ?? 0) };
}

/** A count written behind a symbol or bracket. */
export function countOf(digits: string, source: NormalText, offset: number): number {
  const count = Number(digits);
  if (count === 0 || digits.startsWith('0'))
    throw refuse('unreadable', `a count of ${digits} makes no sense`, source, offset);
  if (count > MAX_COUNT) throw refuse('too-large', `a count of ${digits} is over ${MAX_COUNT}`, source, offset);
  return count;
}

function checkBrackets(source: NormalText): void {
  const open: { bracket: string; at: number }[] = [];
  for (let i = 0; i < source.text.length; i += 1) {
    const c = source.text[i]!;
    if ('([{'.includes(c)) {
      open.push({ bracket: c, at: i });
      if (open.length > MAX_DEPTH) throw refuse('too-large', `brackets are nested deeper than ${MAX_DEPTH}`, source, i);
    } else if (c in CLOSES) {
      const last = open.pop();
      if (!last) throw refuse('unbalanced-bracket', `"${c}" closes a bracket that was not opened`, source, i);
      if (last.bracket !== CLOSES[c]) {
        throw refuse('unbalanced-bracket', `"${c}" closes the "${last.bracket}" opened before it`, source, i);
      }
    }
  }
  const left = open.pop();
  if (left) throw refuse('unbalanced-bracket', `the "${left.bracket}" is never closed`, source, left.at);
}

/** A refusal that points at the text as typed. */
export function refuse(code: DomainError['code'], message: string, source: NormalText, offset: number): DomainError {
  const position = source.at[Math.min(offset, source.at.length - 1)] ?? 0;
  return new DomainError(
    code,
    `${message[0]!.toUpperCase()}${message.slice(1)} (at character ${position + 1})`,
    'formula',
    position,
  );
}
