import { isDBlock } from '../elements.ts';
import type { NormalText } from './normalise.ts';

/** A token that is probably mistyped, at its place in the normalised text. */
export interface Repair {
  start: number;
  length: number;
  /** What was typed, and what it is taken for. */
  typed: string;
  meant: string;
  /** The token on its own, for people: `H2O`. */
  token: string;
}

// A digit zero for the letter O, capital I for small l, capitals for a two-letter halogen. Each pattern is one that no
// sound formula holds: a count of zero, one with a leading zero, twenty hydrogens alone, carbon beside iodine.
const PATTERNS: readonly { pattern: RegExp; meant: (typed: string) => string }[] = [
  { pattern: /(?<![A-Za-z]\d*)H20(?!\d)/g, meant: () => 'H2O' },
  { pattern: /(?<=[(·])0H2?(?!\d)/g, meant: (t) => t.replace('0', 'O') },
  { pattern: /[A-Z][a-z]?20\d(?!\d)/g, meant: (t) => t.replace('20', '2O') },
  { pattern: /[A-Z][a-z]?0\d?(?!\d)/g, meant: (t) => t.replace('0', 'O') },
  { pattern: /CI(?![a-z])/g, meant: () => 'Cl' },
  { pattern: /CL(?![a-z])/g, meant: () => 'Cl' },
  { pattern: /BR(?![a-z])/g, meant: () => 'Br' },
];

/** Tokens that look mistyped in a normalised formula, in order. */
export function suspiciousTokens(source: NormalText): Repair[] {
  const found: Repair[] = [];
  for (const { pattern, meant } of PATTERNS) {
    for (const match of source.text.matchAll(pattern)) {
      const [typed] = match;
      // C2O4 typed with a zero keeps its first count: only `C204`, not `C20H30`.
      if (/20\d$/.test(typed) && !/^(C204|Cr207)$/.test(typed)) continue;
      if (found.some((r) => match.index < r.start + r.length && r.start < match.index + typed.length)) continue;
      found.push({ start: match.index, length: typed.length, typed, meant: meant(typed), token: meant(typed) });
    }
  }
  return found.sort((a, b) => a.start - b.start);
}

/** The first two letters after a bracket (or at the start) that are a d-block symbol but for their case, or null. */
export function mistypedMetal(source: NormalText): Repair | null {
  for (const match of source.text.matchAll(/(?<=^|[[{])([A-Za-z][A-Za-z])/g)) {
    const typed = match[0];
    const meant = typed[0]!.toUpperCase() + typed[1]!.toLowerCase();
    if (typed !== meant && isDBlock(meant)) return { start: match.index, length: 2, typed, meant, token: meant };
  }
  return null;
}

/** The text with repairs made. Offsets go on pointing at the original. */
export function applyRepairs(source: NormalText, repairs: readonly Repair[]): NormalText {
  let text = '';
  const at: number[] = [];
  let from = 0;
  for (const repair of repairs) {
    text += source.text.slice(from, repair.start) + repair.meant;
    at.push(...source.at.slice(from, repair.start), ...Array.from(repair.meant, () => source.at[repair.start] ?? 0));
    from = repair.start + repair.length;
  }
  text += source.text.slice(from);
  at.push(...source.at.slice(from));
  return { text, at };
}
