/** A charge as written behind a formula: `3+`, `-`; empty for none. */
export function chargeOf(charge: number): string {
  if (charge === 0) return '';
  const size = Math.abs(charge);
  return `${size === 1 ? '' : size}${charge > 0 ? '+' : '-'}`;
}
