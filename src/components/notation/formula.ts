import { lowerRaised, MINUS, type Run, RunBuilder } from './runs.ts';

/**
 * Structural and geometrical prefixes are italic, each joined by a hyphen; Greek letters (Δ, Λ, η, μ, κ) stay upright.
 *
 * @see IUPAC, Nomenclature of Inorganic Chemistry, Recommendations 2005: IR-2.9(a) and IR-4.6.5 (italic prefixes),
 *   IR-2.10 ("Greek letters (in Roman type)"). *rac* is set like them: common practice.
 */
const PREFIX = /^(?:trans|cis|fac|mer|rac|catena|cyclo|nido|closo|arachno|triangulo|quadro|tetrahedro)(?=[-,])/;
const POLYHEDRAL = /^\((?:[A-Z]{1,5})-(?:\d{1,2})(?:-[\dA-Z']+)?(?:-[ΔΛCA])?\)(?=-)/;
/** A sign is a charge unless something that a hyphen could join follows it. */
const CHARGE = /^(?:\^?\{?(\d*)([+\-−])\}?)(?![\p{L}\d[({])/u;
const COUNT = /^\d+(?:\.\d+)?/;
const RAISED_CHARGE = /^[⁰¹²³⁴⁵⁶⁷⁸⁹]*[⁺⁻]/;
const LOWERED = '₀₁₂₃₄₅₆₇₈₉';

/** True where a number is a count of what stands before it. */
const isCounted = (before: string) => /[\p{L}\])}*]/u.test(before);

/** Whether all that stands before is one symbol with nothing to count, as in `Fe3+`; there every digit is charge. */
const isMonatomic = (text: string, at: number) => /(?:^|[\s·,;[(])[A-Z][a-z]?$/.test(text.slice(0, at));

/**
 * Splits digits followed by a sign between count and charge. After a square bracket all are charge; after the symbol
 * of a lone atom as well (Fe3+); otherwise the last of several digits is (SO42-), and a single one is a count (NO3-).
 */
function splitCharge(text: string, at: number, digits: string): [count: string, charge: string] {
  if (text[at - 1] === ']' || isMonatomic(text, at)) return ['', digits];
  return digits.length > 1 ? [digits.slice(0, -1), digits.slice(-1)] : [digits, ''];
}

/**
 * Sets a formula given in the plain text of the contract: `[Cr(ox)3]3-`, `trans-[CoCl2(en)2]+`,
 * `K3[Cr(ox)3]·3H2O`, `[Fe(η5-C5H5)2]`, `SO4^2-`. Never refuses: what is not understood stays as it is.
 *
 * @returns runs whose texts in a row are the formula again, with U+2212 for the minus of a charge
 */
export function parseFormula(formula: string): Run[] {
  const out = new RunBuilder();
  let at = 0;
  const take = (text: string, style: Run['style'] = 'normal', length = text.length) => {
    out.add(text, style);
    at += length;
  };

  while (at < formula.length) {
    const rest = formula.slice(at);
    const before = formula[at - 1] ?? '';
    const atWordStart = at === 0 || /[\s[({,\-·]/.test(before);

    const prefix = atWordStart && PREFIX.exec(rest);
    const polyhedral = atWordStart && POLYHEDRAL.exec(rest);
    const charge = isCounted(before) || rest.startsWith('^') ? CHARGE.exec(rest) : null;
    const raised = RAISED_CHARGE.exec(rest);
    const hapto = /^([ηκ])(\d+)/.exec(rest);
    const bridge = /^([μµ])(\d+)/.exec(rest);
    const lowered = LOWERED.indexOf(rest[0]!);
    const count = isCounted(before) ? COUNT.exec(rest) : null;

    if (prefix) take(prefix[0], 'italic');
    else if (polyhedral) take(polyhedral[0], 'italic');
    else if (raised) take(lowerRaised(raised[0]), 'sup', raised[0].length);
    else if (hapto) {
      take(hapto[1]!);
      take(hapto[2]!, 'sup');
    } else if (bridge) {
      take(bridge[1]!);
      take(bridge[2]!, 'sub');
    } else if (lowered >= 0) take(String(lowered), 'sub', 1);
    else if (charge) {
      const explicit = charge[0].startsWith('^');
      const [n, z] = explicit ? ['', charge[1]!] : splitCharge(formula, at, charge[1]!);
      out.add(n, 'sub').add(z + (charge[2] === '+' ? '+' : MINUS), 'sup');
      at += charge[0].length;
    } else if (count) take(count[0], 'sub');
    else if (before === ']' && /^n(?![a-z])/.test(rest)) take('n', 'sub');
    else take(rest[0]!);
  }
  return out.runs;
}

/** The formula as it is read aloud: the signs of charges and prefixes as words. */
export function formulaLabel(formula: string): string {
  const runs = parseFormula(formula);
  return runs
    .map(({ text, style }) => {
      const charge = style === 'sup' && /^(\d*)([+−])$/.exec(text);
      if (!charge) return text.replaceAll('·', ' · ');
      return ` ${charge[1] || ''}${charge[1] ? ' ' : ''}${charge[2] === '+' ? 'plus' : 'minus'}`;
    })
    .join('');
}
