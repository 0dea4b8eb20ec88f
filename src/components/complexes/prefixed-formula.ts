interface Isomer {
  descriptor: string | null;
  chirality: string | null;
}

/** A descriptor that chemists write before a formula; the long ones tell an isomer apart, but nobody prefixes them. */
const IS_PREFIX = /^[\p{L}-]{1,12}$/u;

/** The formula of an entity with what is stated of its isomer before it: `trans-[…]`, `rac-[…]`, `Δ-cis-[…]`. */
export function prefixedFormula(formula: string, { descriptor, chirality }: Isomer): string {
  const prefixes = [chirality, descriptor !== null && IS_PREFIX.test(descriptor) ? descriptor : null];
  return [...prefixes.filter(Boolean), formula].join('-');
}

/** A descriptor that is too long for a prefix, to stand beside the formula; null where the prefix says all. */
export function longDescriptor({ descriptor }: Isomer): string | null {
  return descriptor !== null && !IS_PREFIX.test(descriptor) ? descriptor : null;
}
