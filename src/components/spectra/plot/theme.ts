/** Colours and font of the canvas, read from the page, which alone knows the theme. */
export interface PlotTheme {
  ink: string;
  soft: string;
  grid: string;
  font: string;
  /** A colour as the canvas takes it: `var(--name)` becomes its value. */
  colour: (value: string) => string;
}

/** Series without a colour of their own, in this order; told apart by dash as well. */
export const SERIES_COLOURS = [
  'var(--color-ink)',
  'var(--color-band-mlct)',
  'var(--color-band-intraligand)',
  'var(--color-band-lmct)',
  'var(--color-band-dd)',
  'var(--color-band-intervalence)',
] as const;
export const SERIES_DASHES: readonly number[][] = [[], [7, 3], [2, 2.5], [8, 3, 2, 3], [4, 3], [12, 4]];

/** The theme that holds just now for an element. */
export function readTheme(element: Element): PlotTheme {
  const style = getComputedStyle(element);
  const colour = (value: string) => {
    const name = /^var\((--[\w-]+)\)$/.exec(value)?.[1];
    return name ? style.getPropertyValue(name).trim() || value : value;
  };
  return {
    ink: colour('var(--color-ink)'),
    soft: colour('var(--color-ink-soft)'),
    grid: colour('var(--color-faint)'),
    font: `12px ${style.getPropertyValue('--font-sans').trim() || 'sans-serif'}`,
    colour,
  };
}

/** Calls back whenever the page changes its theme; answers what ends the watch. */
export function watchTheme(onChange: () => void): () => void {
  const observer = new MutationObserver(onChange);
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ['data-theme'] });
  return () => observer.disconnect();
}
