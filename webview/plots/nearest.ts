import type { Curve } from './data';

/** A point of a plot: number of its curve and of the point. */
export interface Point {
  curve: number;
  index: number;
}

/** Number of the value nearest to `wanted` in a rising list; -1 where it is empty. */
export function nearestIndex(rising: ArrayLike<number>, wanted: number): number {
  if (rising.length === 0) return -1;
  let low = 0;
  let high = rising.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (rising[middle] < wanted) low = middle + 1;
    else high = middle;
  }
  return low > 0 && wanted - rising[low - 1] <= rising[low] - wanted ? low - 1 : low;
}

/** The point nearest along the horizontal axis, of several curves the one nearest along the vertical axis too; null where there is none. */
export function nearestPoint(
  curves: Curve[],
  at: { x: number; pixelX: number; pixelY: number },
  pixel: { x(value: number): number; y(value: number): number },
): Point | null {
  let best: Point | null = null;
  let bestAcross = Number.POSITIVE_INFINITY;
  let bestAlong = Number.POSITIVE_INFINITY;
  curves.forEach((curve, number) => {
    const index = nearestIndex(curve.x, at.x);
    if (index < 0 || !Number.isFinite(curve.y[index])) return;
    const across = Math.round(Math.abs(pixel.x(curve.x[index]) - at.pixelX));
    const along = Math.abs(pixel.y(curve.y[index]) - at.pixelY);
    if (across > bestAcross || (across === bestAcross && along >= bestAlong)) return;
    best = { curve: number, index };
    bestAcross = across;
    bestAlong = along;
  });
  return best;
}

/** Where a key leads from a point; null where the key is none of ours. Gaps are stepped over. */
export function pointAfterKey(curves: Curve[], from: Point | null, key: string, fast: boolean): Point | null {
  if (curves.length === 0) return null;
  const now = from ?? { curve: 0, index: 0 };
  const curve = curves[Math.min(now.curve, curves.length - 1)];
  const last = curve.y.length - 1;
  const along = (start: number, step: number) => {
    let index = Math.min(last, Math.max(0, start));
    while (index > 0 && index < last && !Number.isFinite(curve.y[index])) index += step;
    return { curve: Math.min(now.curve, curves.length - 1), index };
  };
  const steps = fast ? 10 : 1;
  if (key === 'ArrowRight') return along(from === null ? 0 : now.index + steps, 1);
  if (key === 'ArrowLeft') return along(from === null ? 0 : now.index - steps, -1);
  if (key === 'Home') return along(0, 1);
  if (key === 'End') return along(last, -1);
  if (key !== 'ArrowUp' && key !== 'ArrowDown') return null;
  const count = curves.length;
  const next = (now.curve + (key === 'ArrowDown' ? 1 : count - 1)) % count;
  const index = nearestIndex(curves[next].x, curve.x[Math.min(now.index, last)]);
  return index < 0 ? now : { curve: next, index };
}
