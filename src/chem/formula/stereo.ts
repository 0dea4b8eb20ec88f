import type { Item } from './syntax.ts';

// `trans`, `all-trans`, `trans(N)`, `Δ`, `(OC-6-22)`, `(R)`, `(R,S)`, `(+)`, `(-)589`, `D`; joined by comma or hyphen.
const UNIT =
  '(?:(?:all-)?(?:trans|cis|fac|mer|rac|meso)(?:\\([A-Z][a-z]?(?:,[A-Z][a-z]?)*\\))?|ΔΛ|[ΔΛδλ]|[Dd]elta|[Ll]ambda|' +
  '\\([A-Z]{1,5}-\\d(?:-[\\dACΔΛ′]+)*\\)|\\([RS](?:,[RS])*\\)|\\([+-]\\)(?:_?(?:D|\\d{3}))?|[DL](?=-))';
const PREFIX = `(?:${UNIT}(?:,${UNIT})*-)+`;
const STEREO_END = new RegExp(`(${PREFIX})$`);
const STEREO_START = new RegExp(`^(${PREFIX})`);
const BRACKET = /^\((?:[A-Z]{1,5}-\d(?:-[\dACΔΛ′]+)*|[RS](?:,[RS])*)\)(?=[-,])/;
const DONORS = /^\([A-Z][a-z]?(?:,[A-Z][a-z]?)*\)(?=[-,])/;

/** Length of a stereodescriptor in parentheses at a place, as `(OC-6-22)-` or the `(N)` of `trans(N)-`; 0 for none. */
export function bracketedStereo(text: string, index: number): number {
  const ahead = text.slice(index, index + 24);
  const donors = /(?:trans|cis|fac|mer)$/.test(text.slice(Math.max(0, index - 5), index)) ? DONORS.exec(ahead) : null;
  return (BRACKET.exec(ahead) ?? donors)?.[0].length ?? 0;
}

/** Stereodescriptors that end a text, as in `K trans-` before a bracket, with their hyphens; null without any. */
export function stereoBefore(text: string): string | null {
  return STEREO_END.exec(text)?.[0] ?? null;
}

/** Items without a stereodescriptor at their start, and that descriptor. */
export function withoutStereo(items: readonly Item[]): { items: readonly Item[]; prefix: string | null } {
  const [first, ...rest] = items;
  const lead = first?.kind === 'run' ? STEREO_START.exec(first.text)?.[0] : undefined;
  if (first?.kind !== 'run' || lead === undefined) return { items, prefix: null };
  const text = first.text.slice(lead.length);
  const left: Item[] = text === '' ? rest : [{ kind: 'run', text, start: first.start + lead.length }, ...rest];
  return { items: left, prefix: descriptorOf(lead) };
}

/** A prefix as it is kept: without its last hyphen, Greek letters for their names. */
export function descriptorOf(prefix: string): string {
  return prefix
    .slice(0, -1)
    .replace(/[Dd]elta/g, 'Δ')
    .replace(/[Ll]ambda/g, 'Λ');
}
