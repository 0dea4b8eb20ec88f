import { useMemo } from 'react';
import type { CubicGeometry } from '#src/chem/ligand-field/index.ts';
import { roundUp, type Window } from '../drawing/clip-curve.ts';
import type { DrawnCurve } from '../drawing/lay-out.ts';
import { useComputed } from '../worker/useComputed.ts';
import type { Sliders } from './slider-state.ts';

interface LevelsAsked {
  n: number;
  geometry: CubicGeometry;
  sliders: Sliders;
  /** The highest observed band, cm⁻¹. */
  highest: number;
}

const multiplicityOf = (label: string): string => /^\d+/.exec(label)?.[0] ?? '';

/** Diagram and levels at the place of the sliders, computed in workers: the slow spin–orbit problem apart from the rest. */
export function useLevels({ n, geometry, sliders: { delta, B, C, zeta }, highest }: LevelsAsked) {
  const at = delta / B;
  const max = Math.max(10, roundUp(1.25 * at));
  const field = { kind: 'cubic', geometry, delta } as const;
  const quick = useComputed('drawing', {
    diagram: { n, geometry, ratioCB: C / B, max, points: 101 },
    levels: { n, field, B, C },
  });
  const coupled = useComputed('levels', zeta > 0 ? { n, field, B, C, zeta } : null);

  const { diagram } = quick.answer ?? {};
  const last = diagram?.x.at(-1) ?? max;
  const window = useMemo<Window>(
    () => ({ x: [0, last], y: [0, Math.min(150, roundUp(Math.max((1.2 * highest) / B, 25)))] }),
    [last, highest, B],
  );
  const curves = useMemo<DrawnCurve[]>(() => {
    if (!diagram) return [];
    const { ground, x } = diagram;
    const spins = new Set(ground.map(({ label }) => multiplicityOf(label)));
    return diagram.curves.map(({ label, y }) => ({ label, x, y, strong: spins.has(multiplicityOf(label)) }));
  }, [diagram]);
  return { at, quick, coupled, window, curves, crossings: diagram?.crossings ?? [] };
}
