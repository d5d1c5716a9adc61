import type { Kind } from './data';
import type { End } from './intervalEnds';

/** Where the parts of the lanes are, in pixels. */
export interface LanesLayout {
  width: number;
  height: number;
  /** Left edge and width of what shares the time axis. */
  left: number;
  across: number;
  lanes: { top: number; height: number }[];
  /** Middle of each kind's row of bars; kinds without intervals have none. */
  bars: Partial<Record<Kind, number>>;
  /** Top of the time axis. */
  axis: number;
}

export const barRow = 20;
const laneGap = 4;
const axisRow = 34;

/** Height of a lane: lower where there are many. */
export function laneHeight(lanes: number): number {
  return lanes <= 4 ? 76 : lanes <= 8 ? 56 : 40;
}

/** Fit on top, the lanes, held-out and disturbance-only below them, then the axis. */
export function lanesLayout(width: number, lanes: number, has: Record<Kind, boolean>): LanesLayout {
  const left = 60;
  const layout: LanesLayout = {
    width,
    height: 0,
    left,
    across: Math.max(20, width - left - 14),
    lanes: [],
    bars: {},
    axis: 0,
  };
  let top = 2;
  const row = (kind: Kind) => {
    if (!has[kind]) return;
    layout.bars[kind] = top + barRow / 2;
    top += barRow;
  };
  row('fit');
  for (let i = 0; i < lanes; i++) {
    layout.lanes.push({ top, height: laneHeight(lanes) });
    top += laneHeight(lanes) + (i < lanes - 1 ? laneGap : 0);
  }
  row('heldOut');
  row('disturbanceOnly');
  layout.axis = top + 2;
  layout.height = top + 2 + axisRow;
  return layout;
}

/**
 * Where an end is taken hold of, from the left edge of the time axis: mostly on its own interval's side, so that ends of
 * neighbours that meet stay apart.
 */
export function gripBox({ end }: Pick<End, 'end'>, pixel: number): { left: number; width: number } {
  return end === 'from' ? { left: pixel - 2, width: 20 } : { left: pixel - 18, width: 20 };
}

/** Vertical place of a value in a lane; the lane's lowest and highest keep a little room. */
export function valuePixel(
  { top, height }: { top: number; height: number },
  { min, max }: { min: number; max: number },
  value: number,
): number {
  const middle = (min + max) / 2;
  const half = ((max - min) / 2) * 1.08 || Math.abs(middle) * 0.1 || 1;
  return top + height / 2 - ((value - middle) / half) * (height / 2);
}
