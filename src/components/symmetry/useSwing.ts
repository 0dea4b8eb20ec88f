import { useEffect, useState } from 'react';

const PERIOD = 1800; // ms

/** Where a vibration stands in its swing, −1 to 1, while it plays; at rest 0. */
export function useSwing(playing: boolean): number {
  const [phase, setPhase] = useState(0);
  useEffect(() => {
    if (!playing) {
      setPhase(0);
      return;
    }
    let frame = 0;
    let start: number | null = null;
    const step = (now: number) => {
      start ??= now;
      setPhase(Math.sin((2 * Math.PI * (now - start)) / PERIOD));
      frame = requestAnimationFrame(step);
    };
    frame = requestAnimationFrame(step);
    return () => cancelAnimationFrame(frame);
  }, [playing]);
  return phase;
}

/** Whether vibrations play: from the start unless the reader asked for little motion; then once they press Play. */
export function usePlaying(): [playing: boolean, setPlaying: (playing: boolean) => void] {
  const [playing, setPlaying] = useState(false);
  useEffect(() => {
    if (!matchMedia('(prefers-reduced-motion: reduce)').matches) setPlaying(true);
  }, []);
  return [playing, setPlaying];
}
