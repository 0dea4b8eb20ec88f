/** What stands in a sentence as it is written, and what is set as chemistry. */
export type ProsePiece = string | { count: number } | { operation: string } | { direction: string };

const SYMBOL = /(?<![\p{L}\d])(d\d{1,2}|[CS]\d(?:[′″]|'{1,2})?|σ[hvd]|[xyz]{1,2})(?![\p{L}\d-])/u;

/** Finds d-counts (d6), axes (C4, C2′), mirrors (σv) and directions (x, xz) in a plain sentence. */
export function prosePieces(text: string): ProsePiece[] {
  return text
    .split(SYMBOL)
    .filter((part) => part !== '')
    .map((part) => {
      if (SYMBOL.exec(part)?.[0] !== part) return part;
      if (part.startsWith('d')) return { count: Number(part.slice(1)) };
      if (/^[xyz]/.test(part)) return { direction: part };
      return { operation: part.replace('σ', 'sigma_').replace('″', "''").replace('′', "'") };
    });
}
