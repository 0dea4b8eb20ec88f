import type { ReadOptions, SpectrumBlock, SpectrumWarning } from './types.ts';
import { rangeOf, suggestXUnit } from './unit-names.ts';

/** Fractions of light above this are taken to be per cent written under the wrong name (scatter stays below it). */
const LARGEST_FRACTION = 1.5;

/**
 * Puts a person's answers in place of what the file states, and asks where neither says.
 *
 * A transmittance (or reflectance) above 1.5 is no fraction: its unit becomes null and the question is put.
 */
export function settleUnits(block: SpectrumBlock, options: ReadOptions): SpectrumBlock {
  const xUnit = options.xUnit ?? block.xUnit;
  const settled: SpectrumBlock = { ...block, xUnit, warnings: [...block.warnings] };
  if (xUnit === null) {
    const suggestion = suggestXUnit(block.x, block.xUnitText);
    if (suggestion) settled.suggestedXUnit = suggestion;
    settled.warnings.push(askX(block.xUnitText, suggestion));
  }
  if (options.yUnit) return { ...settled, yUnit: options.yUnit };
  if (block.yUnit === null) {
    settled.warnings.push({ code: 'ask-y-unit', detail: `${said(block.yUnitText)}; say what the ordinate is` });
    return settled;
  }
  const highest = rangeOf(block.y)[1];
  const isFraction = block.yUnit === 'transmittance' || block.yUnit === 'reflectance';
  if (!isFraction || !(highest > LARGEST_FRACTION)) return settled;
  settled.warnings.push({
    code: `ask-${block.yUnit}`,
    detail: `${block.yUnitText} is a fraction, yet values reach ${highest}; say whether they are fractions or per cent`,
  });
  return {
    ...settled,
    yUnit: null,
    suggestedYUnit: block.yUnit === 'reflectance' ? 'percent-reflectance' : 'percent-transmittance',
  };
}

function askX(text: string, suggestion: string | undefined): SpectrumWarning {
  const hint = suggestion ? `; the numbers would suit ${suggestion}` : '';
  return { code: 'ask-x-unit', detail: `${said(text)}; say what the unit of the abscissa is${hint}` };
}

function said(text: string): string {
  return text === '' ? 'the file states no unit' : `"${text}" is no unit known here`;
}
