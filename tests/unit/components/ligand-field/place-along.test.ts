import { describe, expect, test } from 'vitest';
import { placeAlong, type SideLabel } from '#src/components/ligand-field/drawing/place-along.ts';

/** A fixed sequence of numbers from 0 to 1 (a linear congruence), so that every run tries the same labels. */
function* sequence(seed: number) {
  for (let state = seed; ; ) {
    state = (state * 1_103_515_245 + 12_345) % 2_147_483_648;
    yield state / 2_147_483_648;
  }
}

const room = { from: 20, to: 400, gap: 2 };

describe('labels along a side', () => {
  test.each(Array.from({ length: 40 }, (_, i) => i + 1))(
    'never overlap, keep their order and stay inside: case %i',
    (seed) => {
      const draw = sequence(seed);
      const next = () => draw.next().value as number;
      const count = 2 + Math.floor(next() * 40);
      const labels: SideLabel[] = Array.from({ length: count }, (_, rank) => ({
        at: next() * 500 - 50,
        size: 10 + next() * 20,
        rank,
      }));
      const placed = placeAlong(labels, room);
      const kept = labels
        .map((label, i) => ({ ...label, middle: placed[i] }))
        .filter((label): label is SideLabel & { middle: number } => typeof label.middle === 'number')
        .sort((a, b) => a.middle - b.middle);
      expect(kept.length).toBeGreaterThan(1);
      kept.forEach((label, i) => {
        expect(label.middle - label.size / 2).toBeGreaterThanOrEqual(room.from - 1e-9);
        expect(label.middle + label.size / 2).toBeLessThanOrEqual(room.to + 1e-9);
        const before = kept[i - 1];
        if (!before) return;
        expect(label.middle - label.size / 2 - (before.middle + before.size / 2)).toBeGreaterThanOrEqual(
          room.gap - 1e-9,
        );
        expect(label.at).toBeGreaterThanOrEqual(before.at);
      });
    },
  );

  test('those with room stay where they want to be', () => {
    const labels = [60, 200, 120].map((at, rank) => ({ at, size: 12, rank }));
    expect(placeAlong(labels, room)).toEqual([60, 200, 120]);
  });

  test('two at one place share the shift', () => {
    const labels = [100, 100].map((at, rank) => ({ at, size: 10, rank }));
    expect(placeAlong(labels, { from: 0, to: 200, gap: 0 })).toEqual([95, 105]);
  });

  test('without room for all, the highest ranks are left out', () => {
    const labels = [3, 1, 2].map((rank) => ({ at: 10, size: 10, rank }));
    expect(placeAlong(labels, { from: 0, to: 22, gap: 2 })).toEqual([null, 5, 17]);
    expect(placeAlong([], room)).toEqual([]);
  });
});
