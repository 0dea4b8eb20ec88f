/** A label over a mark: middle and bottom in px, and how wide it is. */
export interface LabelBox {
  x: number;
  y: number;
  width: number;
}

/**
 * Lifts labels that would lie on each other, from left to right, each by whole lines over those it meets, and keeps them
 * between the two sides of the plot. Order and number stay as given.
 *
 * @returns for each label its new x and y
 */
export function placeLabels(
  labels: readonly LabelBox[],
  area: { width: number; lineHeight: number },
): { x: number; y: number }[] {
  const placed: (LabelBox & { index: number })[] = [];
  const order = labels.map((label, index) => ({ ...label, index })).sort((a, b) => a.x - b.x);
  for (const label of order) {
    const half = label.width / 2;
    const x = Math.min(Math.max(label.x, half), Math.max(half, area.width - half));
    let y = label.y;
    const clash = () =>
      placed.find((p) => Math.abs(p.x - x) < (p.width + label.width) / 2 + 4 && Math.abs(p.y - y) < area.lineHeight);
    for (let hit = clash(); hit; hit = clash()) y = hit.y - area.lineHeight;
    placed.push({ ...label, x, y: Math.max(y, area.lineHeight) });
  }
  return labels.map((_, index) => {
    const { x, y } = placed.find((p) => p.index === index)!;
    return { x, y };
  });
}
