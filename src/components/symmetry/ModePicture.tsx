import { ChevronDown, ChevronLeft, ChevronRight, ChevronUp, Pause, Play } from 'lucide-react';
import { useState } from 'react';
import type { ModeVector } from '#src/chem/symmetry/mode-vectors.ts';
import { buttonClass } from '#src/components/ui/Button.tsx';
import { drawMode } from './mode-drawing.ts';
import { displacementText, motionWord, type ShownVibrations } from './shown-vibrations.ts';
import { usePlaying, useSwing } from './useSwing.ts';

const SIZE = 320;
const STEP = 15; // degrees

interface Props {
  shown: ShownVibrations;
  mode: ModeVector | null;
}

/** A vibration as arrows on a ball-and-stick drawing that swings along them, turned by buttons. */
export function ModePicture({ shown, mode }: Props) {
  const [playing, setPlaying] = usePlaying();
  const [view, setView] = useState({ turn: 28, tilt: 18 });
  const phase = useSwing(playing && mode !== null);
  const { bonds, atoms, arrows, axes } = drawMode(shown.placed, mode, { size: SIZE, phase, ...view });
  const title = mode
    ? `Vibration ${mode.irrep}, ${motionWord(mode)}. Displacements: ${displacementText(mode, shown)}`
    : 'The atoms at rest';
  const turn = (by: Partial<typeof view>) =>
    setView(({ turn: a, tilt: b }) => ({ turn: a + (by.turn ?? 0), tilt: b + (by.tilt ?? 0) }));
  return (
    <figure className="flex-none">
      <svg
        role="img"
        aria-label={title}
        viewBox={`0 0 ${SIZE} ${SIZE}`}
        className="keep-ink block aspect-square w-full max-w-[360px] border border-hairline bg-porcelain"
      >
        <title>{title}</title>
        {axes.map(({ name, from, to, label }) => (
          <g key={name}>
            <line x1={from.x} y1={from.y} x2={to.x} y2={to.y} stroke="var(--color-edge)" />
            <text
              x={label.x}
              y={label.y + 4}
              fontSize="12"
              fontStyle="italic"
              textAnchor="middle"
              fill="var(--color-ink-soft)"
            >
              {name}
            </text>
          </g>
        ))}
        {bonds.map(({ key, from, to }) => (
          <line
            key={key}
            x1={from.x}
            y1={from.y}
            x2={to.x}
            y2={to.y}
            stroke="color-mix(in srgb, var(--color-zaffre) 45%, var(--color-glaze))"
            strokeWidth="2"
          />
        ))}
        {arrows.map(({ index, shaft: [from, to], head }) => (
          <g key={index} stroke="var(--color-band-lmct)" fill="var(--color-band-lmct)">
            <line x1={from.x} y1={from.y} x2={to.x} y2={to.y} strokeWidth="2.2" />
            <polygon points={head.map(({ x, y }) => `${x},${y}`).join(' ')} stroke="none" />
          </g>
        ))}
        {atoms.map(({ index, x, y, radius }) => (
          <g key={index}>
            <circle cx={x} cy={y} r={radius} fill="var(--color-glaze)" stroke="var(--color-zaffre)" strokeWidth="1.4" />
            <text x={x} y={y + 4} fontSize="11" textAnchor="middle" fill="var(--color-ink)">
              {shown.labels[index]}
            </text>
          </g>
        ))}
      </svg>
      <figcaption className="mt-2 flex flex-wrap items-center gap-1.5">
        <button
          type="button"
          className={buttonClass('plain', 'small')}
          disabled={mode === null}
          onClick={() => setPlaying(!playing)}
        >
          {playing ? <Pause aria-hidden="true" size={14} /> : <Play aria-hidden="true" size={14} />}
          {playing ? 'Pause' : 'Play'}
        </button>
        <span className="ml-auto flex gap-1">
          <Turn label="Turn left" Icon={ChevronLeft} onClick={() => turn({ turn: -STEP })} />
          <Turn label="Turn right" Icon={ChevronRight} onClick={() => turn({ turn: STEP })} />
          <Turn label="Tilt up" Icon={ChevronUp} onClick={() => turn({ tilt: -STEP })} />
          <Turn label="Tilt down" Icon={ChevronDown} onClick={() => turn({ tilt: STEP })} />
        </span>
      </figcaption>
    </figure>
  );
}

function Turn({ label, Icon, onClick }: { label: string; Icon: typeof ChevronUp; onClick: () => void }) {
  return (
    <button
      type="button"
      aria-label={label}
      title={label}
      onClick={onClick}
      className={`${buttonClass('plain', 'small')} px-1.5!`}
    >
      <Icon aria-hidden="true" size={14} />
    </button>
  );
}
