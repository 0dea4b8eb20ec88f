import { useMemo } from 'react';
import type { Run } from '#src/components/notation/runs.ts';
import { parsePointGroup } from '#src/components/notation/term.ts';
import type { Window } from '../drawing/clip-curve.ts';
import type { DrawnCurve } from '../drawing/lay-out.ts';
import { useComputed } from '../worker/useComputed.ts';
import type { LevelsState } from './levels-address.ts';

export interface Drawing {
  curves: DrawnCurve[];
  window: Window;
  crossings: { x: number; from: string; to: string; title: string }[];
  xLabel: Run[];
  yLabel: Run[];
  xNames?: { x: number; text: string }[];
  title: string;
  refusal: string | null;
  /** How much of the energy a number of the y axis is worth, for the head of a column. */
  unit: 'B' | 'cm-1';
}

const run = (text: string, style: Run['style'] = 'normal'): Run => ({ text, style });
const OVER_B = [run('E', 'italic'), run(' / '), run('B', 'italic')];
const DELTA_OVER_B = [run('Δ', 'italic'), run(' / '), run('B', 'italic')];
const WAVENUMBERS = [run('E', 'italic'), run(' / cm'), run('−1', 'sup')];
const multiplicityOf = (label: string): string => /^\d+/.exec(label)?.[0] ?? '';
const span = (curves: readonly DrawnCurve[]): [number, number] => {
  const all = curves.flatMap(({ y }) => [...y]);
  return all.length === 0 ? [0, 1] : [Math.min(...all), Math.max(...all)];
};

const PATH_ENDS = {
  tetragonal: ['octahedron', 'square plane'],
  twist: ['octahedron', 'trigonal prism'],
  flattening: ['tetrahedron', 'square plane'],
} as const;

/** The drawing that a state of the page asks for. */
export function useDrawing(state: LevelsState): Drawing {
  const { view, n, geometry, ratio, max, top, path, B, sigma, pi } = state;
  const isField = view === 'ground' || view === 'absolute';
  const field = useComputed(
    'drawing',
    isField
      ? {
          diagram: { n, geometry, ratioCB: ratio, max, points: 161, view },
          levels: { n, field: { kind: 'cubic', geometry, delta: 0 }, B: 1, C: ratio },
        }
      : null,
  );
  const orgel = useComputed('orgel', view === 'orgel' ? { n, B: 1, C: ratio, max, points: 161 } : null);
  const along = useComputed(
    'path',
    view === 'path' ? { n, path, B, C: ratio * B, eSigma: sigma, ePi: pi, view: 'ground' } : null,
  );
  return useMemo<Drawing>(() => {
    const none = { crossings: [], xLabel: DELTA_OVER_B, yLabel: OVER_B, unit: 'B' as const };
    if (view === 'orgel') {
      const curves = (orgel.answer?.curves ?? []).map(({ label, y }) => ({
        label,
        y,
        x: orgel.answer!.x,
        strong: true,
      }));
      const [low, high] = span(curves);
      const room = Math.max(2, 0.04 * (high - low));
      return {
        ...none,
        curves,
        window: { x: [-max, max], y: [Math.floor(low - room), Math.ceil(high + room)] },
        xLabel: [run('tetrahedron  '), ...DELTA_OVER_B, run('  octahedron')],
        title: `Orgel diagram of d${n}: levels of highest spin, tetrahedral to the left and octahedral to the right`,
        refusal: orgel.refusal,
      };
    }
    if (view === 'path') {
      const answer = along.answer;
      const ground = new Set((answer?.x ?? []).map((_, i) => multiplicityOf(lowestAt(answer!.curves, i))));
      const curves = (answer?.curves ?? []).map(({ label, y }) => ({
        label,
        y,
        x: answer!.x,
        strong: ground.has(multiplicityOf(label)),
      }));
      const ends = PATH_ENDS[path];
      return {
        ...none,
        curves,
        window: { x: [0, 1], y: [0, top * B] },
        xLabel: answer ? [run('labels in '), ...parsePointGroup(answer.group)] : [run('labels')],
        yLabel: WAVENUMBERS,
        xNames: [
          { x: 0, text: ends[0] },
          { x: 1, text: ends[1] },
        ],
        title: `Levels of d${n} from ${ends[0]} to ${ends[1]}`,
        refusal: along.refusal,
        unit: 'cm-1',
      };
    }
    const diagram = field.answer?.diagram;
    const spins = new Set(diagram?.ground.map(({ label }) => multiplicityOf(label)));
    const curves = (diagram?.curves ?? []).map(({ label, y }) => ({
      label,
      y,
      x: diagram!.x,
      strong: spins.has(multiplicityOf(label)),
    }));
    const low = view === 'absolute' ? Math.floor(Math.min(0, span(curves)[0]) / 10) * 10 : 0;
    return {
      ...none,
      curves,
      window: { x: [0, max], y: [low, top] },
      crossings: (diagram?.crossings ?? []).map(({ x, from, to }) => ({
        x,
        from,
        to,
        title: `At Δ/B ${x.toFixed(2)} the ground level changes from ${from} to ${to}`,
      })),
      title: `Energy over B against Δ over B of d${n} in ${geometry}, C/B ${ratio}`,
      refusal: field.refusal,
    };
  }, [view, n, geometry, ratio, max, top, path, B, field, orgel, along]);
}

function lowestAt(curves: readonly { label: string; y: readonly number[] }[], i: number): string {
  return curves.reduce((best, curve) => (curve.y[i]! < best.y[i]! ? curve : best)).label;
}
