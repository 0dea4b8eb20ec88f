/** The three rows of ten that hold the d elements of the registry. */
export const D_BLOCK = [
  ['Sc', 'Ti', 'V', 'Cr', 'Mn', 'Fe', 'Co', 'Ni', 'Cu', 'Zn'],
  ['Y', 'Zr', 'Nb', 'Mo', 'Tc', 'Ru', 'Rh', 'Pd', 'Ag', 'Cd'],
  ['Lu', 'Hf', 'Ta', 'W', 'Re', 'Os', 'Ir', 'Pt', 'Au', 'Hg'],
] as const;

interface DBlockProps {
  /** Complexes by element symbol; what is missing counts as none. */
  counts: Readonly<Record<string, number>>;
  chosen: readonly string[];
  onToggle: (symbol: string) => void;
}

/** The d elements as a filter, each cell shaded by how many complexes it holds. */
export function DBlock({ counts, chosen, onToggle }: DBlockProps) {
  const most = Math.max(1, ...Object.values(counts));
  return (
    <fieldset className="grid w-full max-w-[318px] min-w-[258px] grid-cols-10 gap-0.5">
      <legend className="mb-1.5 text-xs text-ink-soft">Metal</legend>
      {D_BLOCK.flat().map((symbol) => {
        const count = counts[symbol] ?? 0;
        const on = chosen.includes(symbol);
        return (
          <button
            key={symbol}
            type="button"
            aria-pressed={on}
            aria-label={`${symbol}, ${count} ${count === 1 ? 'complex' : 'complexes'}`}
            title={`${symbol}: ${count}`}
            onClick={() => onToggle(symbol)}
            className={`grid h-[26px] place-items-center rounded-sm text-xs hover:outline-1 hover:outline-zaffre ${
              on ? 'font-medium text-on-zaffre' : count > 0 ? 'text-ink' : 'text-ink-soft'
            }`}
            style={{ backgroundColor: on ? 'var(--color-zaffre)' : shade(count / most) }}
          >
            {symbol}
          </button>
        );
      })}
    </fieldset>
  );
}

/** From nearly nothing to a third of the pigment, so that the symbol on it stays readable. */
function shade(share: number): string {
  if (share === 0) return 'color-mix(in srgb, var(--color-ink) 4%, var(--color-glaze))';
  return `color-mix(in srgb, var(--color-band-dd) ${(6 + 30 * share).toFixed(1)}%, var(--color-glaze))`;
}
