import type { Context } from './entity.ts';

/** Numbers the places at which a doubt comes up, in the order in which they are first asked for. */
export function placeNumbering(): Context['codeAt'] {
  const places = new Map<string, number[]>();
  return (code, start) => {
    const known = places.get(code) ?? [];
    if (!known.includes(start)) places.set(code, [...known, start]);
    return codeOfPlace(code, places.get(code)!.indexOf(start));
  };
}

/** `code` for the first place, `code:2` for the second. */
export function codeOfPlace(code: string, index: number): string {
  return index === 0 ? code : `${code}:${index + 1}`;
}
