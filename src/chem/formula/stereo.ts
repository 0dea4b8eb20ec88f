import type { Item } from './syntax.ts';

const STEREO_END = /((?:(?:trans|cis|fac|mer|rac|meso|Δ|Λ)-)+)$/;
const STEREO_START = /^((?:(?:trans|cis|fac|mer|rac|meso|Δ|Λ)-)+)/;

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
  return { items: left, prefix: lead.slice(0, -1) };
}
