import type { VisibleRule } from './visible-light.ts';

/** The rule of visible light as a thin strip; its parent is positioned and as wide as the axis. */
export function VisibleLight({ rule, top, height = 2 }: { rule: VisibleRule | null; top: number; height?: number }) {
  if (!rule) return null;
  return (
    <span
      aria-hidden="true"
      className="keep-ink pointer-events-none absolute block"
      style={{
        left: `${(rule.start * 100).toFixed(2)}%`,
        width: `${(rule.width * 100).toFixed(2)}%`,
        top,
        height,
        backgroundImage: rule.gradient,
      }}
    />
  );
}
