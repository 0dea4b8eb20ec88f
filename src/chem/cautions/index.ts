import { compositionRules } from './composition-rules.ts';
import { conditionRules } from './condition-rules.ts';
import { type Caution, type CautionContext, type CautionRule, factsOf } from './rule.ts';

export type { Caution, CautionContext, CautionRule, Facts } from './rule.ts';

/** Stands on every panel of cautions. */
export const STANDING_SENTENCE =
  'A prompt drawn from the composition. It does not replace the safety data sheet, a risk assessment, local rules or trained supervision.';

/** Stands where no rule matched: silence of the rules says nothing about the substance. */
export const NO_RULE_MATCHED = 'No rule matched. That is not a judgement of hazard: consult the safety data sheet.';

/** Stands where a formula cannot be read. */
export const NO_CAUTION_COMPUTED = 'The formula cannot be read, so no caution could be computed.';

/** Every rule, in the order shown. */
export const cautionRules: readonly CautionRule[] = [...compositionRules, ...conditionRules];

/**
 * Usual cautions for a composition in its solvent, medium, technique and temperature. Prompts, never a classification;
 * an empty list means that no rule matched and must be shown with {@link NO_RULE_MATCHED}.
 */
export function cautionsFor(context: CautionContext): Caution[] {
  const facts = factsOf(context);
  return cautionRules
    .filter((rule) => rule.test(facts))
    .map(({ id, sentence, codes, source }) => ({ id, detail: sentence, codes: [...codes], source }));
}
