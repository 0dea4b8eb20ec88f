/** The mark of the program: a cobalt lozenge with the six vertices of an octahedron. */
export function Mark({ size = 22 }: { size?: number }) {
  return (
    <svg width={size} height={size} viewBox="0 0 22 22" aria-hidden="true" className="block flex-none">
      <path d="M11 .8 21.2 11 11 21.2.8 11Z" fill="var(--color-zaffre)" />
      <g fill="var(--color-on-zaffre)">
        <circle cx="11" cy="5" r="1.3" />
        <circle cx="11" cy="17" r="1.3" />
        <circle cx="5" cy="11" r="1.3" />
        <circle cx="17" cy="11" r="1.3" />
        <circle cx="8.6" cy="9" r="1" />
        <circle cx="13.4" cy="13" r="1" />
      </g>
    </svg>
  );
}
