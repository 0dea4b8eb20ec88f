import { MINUS, type Run, RunBuilder, toPrimes } from './runs.ts';

const GREEK: Record<string, string> = {
  Sigma: 'Σ',
  Pi: 'Π',
  Delta: 'Δ',
  Phi: 'Φ',
  Gamma: 'Γ',
  sigma: 'σ',
  pi: 'π',
  delta: 'δ',
};

/** multiplicity, letter, index with parity, primes, reflection sign, parent in brackets */
const TERM =
  /^(\d+)?(Sigma|Pi|Delta|Phi|Gamma|sigma|pi|delta|[ΣΠΔΦΓ]|[A-Za-z])(?:_?(\d+(?:\/\d+)?)?_?([gu])?)('{1,3}|")?([gu])?([+\-−])?(\(.+\))?$/;

/**
 * Sets a term or an irrep: `4A2g`, `4T1g(F)`, `A1'`, `E''`, `2Sigma_g+`, `t2g`, `4F3/2`. The parity stands in the
 * subscript with the index, the prime after it. Text of another shape comes back as one plain run.
 */
export function parseTerm(term: string): Run[] {
  const found = TERM.exec(term.trim());
  if (!found) return term ? [{ text: toPrimes(term), style: 'normal' }] : [];
  const [, multiplicity = '', letter = '', index = '', parity = '', primes = '', late = '', sign = '', parent = ''] =
    found;
  const out = new RunBuilder()
    .add(multiplicity, 'sup')
    .add(GREEK[letter] ?? letter)
    .add(index + parity + late, 'sub')
    .add(toPrimes(primes))
    .add(sign === '-' ? MINUS : sign, 'sup');
  if (parent)
    out
      .add('(')
      .addAll(parseTerm(parent.slice(1, -1)))
      .add(')');
  return out.runs;
}

/**
 * Sets the symbol of a point group: an italic letter with an upright subscript (`D4h`, `Oh`, `Cinfv` → C∞v).
 * Symbols of quantities such as groups are italic, their indices upright unless they are quantities themselves.
 */
export function parsePointGroup(symbol: string): Run[] {
  const found = /^([A-Z])(.*)$/.exec(symbol.trim());
  if (!found) return symbol ? [{ text: symbol, style: 'normal' }] : [];
  return new RunBuilder().add(found[1]!, 'italic').add(found[2]!.replace('inf', '∞'), 'sub').runs;
}

/**
 * Sets a transition as lower → upper: two terms, or two orbital descriptions such as dπ(Ru) and π*(bpy). With one end
 * missing, the other stands alone.
 */
export function parseTransition(from: string | null | undefined, to: string | null | undefined): Run[] {
  const out = new RunBuilder();
  if (from) out.addAll(parseTerm(from));
  if (from && to) out.add(' → ');
  if (to) out.addAll(parseTerm(to));
  return out.runs;
}

/** Index, parity, primes and electrons. After a, b and t the first digit is the index; after e only if more follow. */
const SUBSHELL = /^(?:([abt]\d?|e(?:\d(?=[\dgu'"]))?)([gu]?)(['"]*)|(\d?)([spdfσπδ]))\^?(\d+)$/;

/** Sets an electron configuration: `t2g3 eg0`, `e4 t23`, `3d3`. Parts are divided by spaces, which stay. */
export function parseConfiguration(configuration: string): Run[] {
  const out = new RunBuilder();
  for (const part of configuration.split(/(\s+)/)) {
    const found = SUBSHELL.exec(part);
    if (!found) out.addAll(parseTerm(part));
    else if (found[5]) out.add(found[4]! + found[5]).add(found[6]!, 'sup');
    else
      out
        .add(found[1]![0]!)
        .add(found[1]!.slice(1) + found[2], 'sub')
        .add(toPrimes(found[3]!))
        .add(found[6]!, 'sup');
  }
  return out.runs;
}

/** Sets a d-electron count: d with the number raised. */
export function parseDCount(count: number): Run[] {
  return [
    { text: 'd', style: 'normal' },
    { text: String(count), style: 'sup' },
  ];
}

/** A term read aloud: "4 A 2g", "2 Sigma g plus". */
export function termLabel(term: string): string {
  return term
    .replace(/^(\d+)/, '$1 ')
    .replace(/([A-Z][a-z]{2,}|[A-Za-z])_?(\d)/, '$1 $2')
    .replaceAll('_', ' ')
    .replace(/\+$/, ' plus')
    .replace(/[-−]$/, ' minus')
    .replace(/'''/g, ' triple prime')
    .replace(/''|"/g, ' double prime')
    .replace(/'/g, ' prime');
}
