/** How a stretch of text is set. Sub and sup share one size; nothing is both italic and lowered. */
export type RunStyle = 'normal' | 'sub' | 'sup' | 'italic';

/** A stretch of text in one style. The texts of all runs in a row are what a reader copies. */
export interface Run {
  text: string;
  style: RunStyle;
}

/** U+2212, the minus sign: what a hyphen becomes wherever it means a charge or a negative number. */
export const MINUS = '\u2212';

/** U+202F, the narrow no-break space between groups of three digits (ISO 80000-1, 7.3.1). */
export const DIGIT_SPACE = '\u202f';

/** Collects runs, joins neighbours of one style and drops empty ones. */
export class RunBuilder {
  readonly runs: Run[] = [];

  add(text: string, style: RunStyle = 'normal'): this {
    if (text === '') return this;
    const last = this.runs.at(-1);
    if (last?.style === style) last.text += text;
    else this.runs.push({ text, style });
    return this;
  }

  addAll(runs: readonly Run[]): this {
    for (const { text, style } of runs) this.add(text, style);
    return this;
  }
}

/** What is copied: the texts of the runs without their styles. */
export function runsToText(runs: readonly Run[]): string {
  return runs.map(({ text }) => text).join('');
}

const PRIMES: Record<string, string> = { "'": '′', '"': '″', "''": '″', "'''": '‴' };

/** Typewriter primes as true primes: `'` → ′, `''` → ″. */
export function toPrimes(text: string): string {
  return text.replace(/'{1,3}|"/g, (primes) => PRIMES[primes] ?? primes);
}

const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻';
const RAISED_PLAIN = `0123456789+${MINUS}`;

/** Raised characters as plain ones, for text that arrives with ³⁺ or cm⁻¹ already in it. */
export function lowerRaised(text: string): string {
  return [...text].map((c) => RAISED_PLAIN[RAISED.indexOf(c)] ?? c).join('');
}

/** Matches one or more raised digits and signs. */
export const RAISED_PATTERN = /[⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻]+/;
