import type { PolyhedronDrawing } from '#src/chem/geometry/projection.ts';
import { donorColours } from './donor-colours.ts';

interface PolyhedronProps {
  /** What `drawPolyhedron` made of a geometry and its chelate rings. */
  drawing: PolyhedronDrawing;
  /** Letter of each donor by vertex; without them the donors are open circles. */
  sites?: readonly string[];
  /** What it shows, for a screen reader: isomer and geometry. */
  title: string;
  /** Side in px; that of the drawing unless given. */
  size?: number;
}

/** A coordination polyhedron: faces and edges faint, chelate rings as arcs, donors lettered, what is nearer on top. */
export function Polyhedron({ drawing, sites, title, size = drawing.size }: PolyhedronProps) {
  const colours = donorColours(sites ?? []);
  const discs = [...drawing.vertices, { ...drawing.metal, vertex: null }].sort((a, b) => a.depth - b.depth);
  return (
    <svg
      role="img"
      aria-label={title}
      width={size}
      height={size}
      viewBox={`0 0 ${drawing.size} ${drawing.size}`}
      className="keep-ink block flex-none"
    >
      <title>{title}</title>
      {drawing.faces.map(({ vertices, points }) => (
        <polygon key={vertices.join()} points={points.join(' ')} fill="var(--color-band-dd)" fillOpacity="0.045" />
      ))}
      {drawing.edges.map(({ from, to, x1, y1, x2, y2, back }) => (
        <line
          key={`${from} ${to}`}
          {...{ x1, y1, x2, y2 }}
          stroke="color-mix(in srgb, var(--color-zaffre) 45%, var(--color-glaze))"
          strokeOpacity={back ? 0.5 : 1}
          strokeWidth={back ? 0.8 : 1.1}
          strokeDasharray={back ? '3 2.5' : undefined}
        />
      ))}
      {drawing.arcs.map(({ from, to, x1, y1, cx, cy, x2, y2 }) => (
        <path
          key={`${from} ${to}`}
          d={`M${x1} ${y1}Q${cx} ${cy} ${x2} ${y2}`}
          fill="none"
          stroke="var(--color-zaffre)"
          strokeWidth="2.6"
          strokeLinecap="round"
        />
      ))}
      {discs.map(({ vertex, x, y, enlargement }) =>
        vertex === null ? (
          <circle key="metal" cx={x} cy={y} r={drawing.radius * 0.78} fill="var(--color-zaffre)" />
        ) : (
          <Donor
            key={vertex}
            {...{ x, y }}
            radius={drawing.radius * (sites ? 1 : 0.6) * enlargement}
            letter={sites?.[vertex]}
            colour={colours.get(sites?.[vertex] ?? '') ?? 'var(--color-zaffre)'}
          />
        ),
      )}
    </svg>
  );
}

interface DonorProps {
  x: number;
  y: number;
  radius: number;
  letter: string | undefined;
  colour: string;
}

function Donor({ x, y, radius, letter, colour }: DonorProps) {
  const ground = letter ? `color-mix(in srgb, ${colour} 12%, var(--color-glaze))` : 'var(--color-glaze)';
  const size = radius * (letter && letter.length > 1 ? 1.05 : 1.2);
  return (
    <g>
      <circle cx={x} cy={y} r={radius} fill={ground} stroke={colour} strokeWidth="1.4" />
      {letter && (
        <text x={x} y={y + size * 0.36} fontSize={size} textAnchor="middle" fill="var(--color-ink)">
          {letter}
        </text>
      )}
    </g>
  );
}
