interface CuvetteProps {
  /** `#rrggbb` of the solution, or null where no spectrum tells it. */
  colour: string | null;
  /** Concentration, path and hex, for the tooltip and a screen reader. */
  title: string;
  /** Times the 10 × 26 px of a table. */
  scale?: number;
}

/** An upright cell filled with the computed colour of the solution; hatched where no spectrum allows one. */
export function Cuvette({ colour, title, scale = 1 }: CuvetteProps) {
  return (
    <svg
      role="img"
      aria-label={title}
      width={12 * scale}
      height={28 * scale}
      viewBox="0 0 12 28"
      className="keep-ink inline-block flex-none align-middle"
    >
      <title>{title}</title>
      <rect
        x="1"
        y="1"
        width="10"
        height="26"
        rx="1.5"
        fill="var(--color-glaze)"
        stroke="var(--color-glass)"
        vectorEffect="non-scaling-stroke"
      />
      {colour ? (
        <rect x="2" y="7" width="8" height="19" rx="0.6" fill={colour} />
      ) : (
        <path
          d="M2 11 6 7M2 16 10 8M2 21 10 13M2.5 25.5 10 18M7.5 25.5 10 23"
          stroke="var(--color-glass)"
          strokeWidth="1.1"
          fill="none"
        />
      )}
    </svg>
  );
}
