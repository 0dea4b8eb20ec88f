/** Signs of our subject and how they are written where only ASCII is allowed. */
const PLAIN: Record<string, string> = {
  ...{
    Δ: 'Delta',
    δ: 'delta',
    Λ: 'Lambda',
    λ: 'lambda',
    ε: 'epsilon',
    ϵ: 'epsilon',
    μ: 'u',
    µ: 'u',
    η: 'eta',
    κ: 'kappa',
  },
  ...{ π: 'pi', σ: 'sigma', ν: 'nu', α: 'alpha', β: 'beta', γ: 'gamma', Å: 'A', '°': ' deg ', '±': '+/-', '→': '->' },
  ...{
    '·': '.',
    '⋅': '.',
    '−': '-',
    '–': '-',
    '—': '-',
    '‐': '-',
    '×': 'x',
    '…': '...',
    ø: 'o',
    Ø: 'O',
    ł: 'l',
    Ł: 'L',
  },
  ...{ ß: 'ss', æ: 'ae', Æ: 'AE', '‘': "'", '’': "'", '“': '"', '”': '"', '′': "'", '″': '"' },
};

/** A text in printable ASCII on one line: superscripts come down, accents go, other signs become `?`. */
export function toAscii(text: string): string {
  return Array.from(text, (sign) => PLAIN[sign] ?? sign)
    .join('')
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .replace(/−/g, '-') // what NFKD makes of a superscript minus
    .replace(/\s+/g, ' ')
    .replace(/[^\x20-\x7e]/gu, '?')
    .trim();
}
