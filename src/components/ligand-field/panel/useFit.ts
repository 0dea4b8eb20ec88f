import { useEffect, useState } from 'react';
import type { CubicGeometry, FitCandidate, FitRequest } from '#src/chem/ligand-field/index.ts';
import type { BandRecord } from '#src/contracts/spectra.ts';
import { useComputed } from '../worker/useComputed.ts';
import { fitBands } from './observed-bands.ts';

interface FitAsked {
  n: number;
  geometry: CubicGeometry;
  metal: { element: string; oxidationState: number | null };
  spinState: string | null;
  bands: readonly BandRecord[];
  onCandidate: (candidate: FitCandidate) => void;
}

/** Fits of the chosen bands; the best one moves the sliders once it is there. */
export function useFit({ n, geometry, metal, spinState, bands, onCandidate }: FitAsked) {
  const chosen = fitBands(bands);
  const spin = spinState === 'high' || spinState === 'low' ? spinState : undefined;
  const ion = metal.oxidationState === null ? {} : { metal: metal.element, oxidationState: metal.oxidationState };
  const request: FitRequest & { bands: typeof chosen } = {
    n,
    geometry,
    ...ion,
    ...(spin ? { spin } : {}),
    bands: chosen,
  };
  const plain = { ...request, bands: chosen.map(({ band: _, ...rest }) => rest) };
  const { answer, refusal } = useComputed('fit', chosen.length > 0 ? plain : null);
  const [index, setIndex] = useState(0);
  const candidates = answer?.candidates ?? [];
  const candidate = candidates[Math.min(index, candidates.length - 1)] ?? null;
  useEffect(() => {
    setIndex(0);
    const best = answer?.candidates[0];
    if (best) onCandidate(best);
  }, [answer]);
  const choose = (next: number) => {
    setIndex(next);
    const one = candidates[next];
    if (one) onCandidate(one);
  };
  return { input: request, candidates, candidate, index, choose, refusal };
}

export type Fitting = ReturnType<typeof useFit>;
