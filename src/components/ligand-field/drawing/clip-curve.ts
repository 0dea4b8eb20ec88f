export interface Window {
  x: readonly [from: number, to: number];
  y: readonly [from: number, to: number];
}

export interface ClippedCurve {
  /** Stretches within the window, in the units of the window. */
  stretches: (readonly [x: number, y: number])[][];
  /** Where the curve is last seen, and by which side it leaves. */
  end: { x: number; y: number; side: 'right' | 'top' | 'bottom' } | null;
}

/** The part of a curve that lies within a window; x rises, ends that are cut off are found between the points. */
export function clipCurve(x: readonly number[], y: readonly number[], window: Window): ClippedCurve {
  const [low, high] = window.y;
  const [left, right] = window.x;
  const stretches: [number, number][][] = [];
  let open: [number, number][] | null = null;
  let end: ClippedCurve['end'] = null;
  const cutAt = (i: number, level: number): [number, number] => {
    const share = (level - y[i]!) / (y[i + 1]! - y[i]!);
    return [x[i]! + share * (x[i + 1]! - x[i]!), level];
  };
  const inside = (value: number) => value >= low && value <= high;
  for (let i = 0; i < x.length; i++) {
    if (x[i]! < left || x[i]! > right) continue;
    const here = inside(y[i]!);
    const before = i > 0 && x[i - 1]! >= left ? inside(y[i - 1]!) : null;
    if (here && !open) {
      open = before === false ? [cutAt(i - 1, y[i - 1]! > high ? high : low)] : [];
      stretches.push(open);
    }
    if (here) {
      open!.push([x[i]!, y[i]!]);
      end = { x: x[i]!, y: y[i]!, side: 'right' };
    } else if (open) {
      const side = y[i]! > high ? 'top' : 'bottom';
      const cut = cutAt(i - 1, side === 'top' ? high : low);
      open.push(cut);
      end = { x: cut[0], y: cut[1], side };
      open = null;
    }
  }
  return { stretches: stretches.filter((points) => points.length > 1), end };
}

/** Rounded values at which an axis is marked: about `count` of them. */
export function ticksOf([from, to]: readonly [number, number], count: number): number[] {
  const rough = (to - from) / Math.max(1, count);
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = ([1, 2, 5, 10].find((factor) => factor * power >= rough) ?? 10) * power;
  const first = Math.ceil(from / step - 1e-9);
  const last = Math.floor(to / step + 1e-9);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => Number(((first + i) * step).toPrecision(12)));
}

/** The next round number above a value, for the end of an axis. */
export function roundUp(value: number): number {
  const power = 10 ** Math.floor(Math.log10(Math.max(value, 1e-9)));
  return ([1, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10].find((factor) => factor * power >= value) ?? 10) * power;
}
