/** Tokens as a file on paper has them: it leaves the page without the style sheet that tells them. */
export const PAPER: Record<string, string> = {
  '--color-ink': '#181a22',
  '--color-ink-soft': '#565b6e',
  '--color-hairline': '#dddfe9',
  '--color-zaffre': '#1f2f9c',
  '--color-glaze': '#ffffff',
  '--color-band-lmct': '#a12c4b',
  '--color-band-mlct': '#15746a',
  '--color-band-dd': '#2b46c8',
  '--color-band-intraligand': '#9a6408',
  '--color-band-intervalence': '#6b3a9e',
};

/**
 * The markup of a drawing as a file of its own: colours as values, fonts by name, nothing that hangs on the page.
 *
 * @throws Error for a token without a value on paper
 */
export function svgFile(markup: string): string {
  const plain = markup
    .replace(/ (?:class|style|data-[a-z-]+|aria-[a-z-]+|role|id)="[^"]*"/g, '')
    .replace(/<(?=(?:path|line|text|g|circle)[ >])/g, '\n<')
    .replace(/var\((--[a-z-]+)\)/g, (_, token: string) => {
      const value = PAPER[token];
      if (value === undefined) throw new Error(`${token} has no value on paper`);
      return value;
    });
  return `<?xml version="1.0" encoding="UTF-8"?>\n${plain}\n`;
}
