import type { Axis, Curve, PlotData } from './data';

export interface Range {
  min: number;
  max: number;
}

/** Lowest and highest of what `add` was given; values that are not finite, or not positive on a logarithmic axis, are left out. */
function newExtent(logarithmic: boolean) {
  let min = Number.POSITIVE_INFINITY;
  let max = Number.NEGATIVE_INFINITY;
  return {
    add(value: number) {
      if (!Number.isFinite(value) || (logarithmic && value <= 0)) return;
      if (value < min) min = value;
      if (value > max) max = value;
    },
    range: (): Range | null => (min <= max ? { min, max } : null),
  };
}

/** A range with room around it; one of no width gets some. */
export function padded(range: Range | null, share: number, logarithmic = false): Range {
  if (range === null) return logarithmic ? { min: 1, max: 10 } : { min: 0, max: 1 };
  const { min, max } = range;
  if (logarithmic) {
    const factor = max > min ? (max / min) ** share : 2;
    return { min: min / factor, max: max * factor };
  }
  const room = max > min ? (max - min) * share : Math.abs(max) * 0.1 || 1;
  return { min: min - room, max: max + room };
}

/** What the horizontal axis spans. */
export function horizontalRange({ curves, marks }: PlotData, axis: Axis): Range {
  const logarithmic = axis.scale === 'logarithmic';
  const extent = newExtent(logarithmic);
  for (const { x } of curves) for (let i = 0; i < x.length; i++) extent.add(x[i]);
  for (const mark of marks) if (mark.kind === 'place') extent.add(mark.x);
  const apart = curves.some(({ style }) => style === 'stems' || style === 'points');
  return padded(extent.range(), apart || marks.some(({ kind }) => kind === 'place') ? 0.02 : 0, logarithmic);
}

/**
 * What the vertical axis spans: curves, error bars, levels and places in full. A shaded interval widens it by at most the
 * curves' own height on either side, since one that reaches far would flatten the curve it belongs to.
 */
export function verticalRange({ curves, marks }: PlotData, axis: Axis): Range {
  const logarithmic = axis.scale === 'logarithmic';
  const extent = newExtent(logarithmic);
  for (const curve of curves) addCurve(curve, extent.add);
  for (const mark of marks) if (mark.kind !== 'span') extent.add(mark.y);
  const own = extent.range();
  const height = own === null ? 0 : own.max - own.min || Math.abs(own.max) * 0.1 || 1;
  const limited = (value: number) =>
    own === null || logarithmic ? value : Math.min(own.max + height, Math.max(own.min - height, value));
  for (const { low, high } of curves) {
    for (let i = 0; low && i < low.length; i++) extent.add(limited(low[i]));
    for (let i = 0; high && i < high.length; i++) extent.add(limited(high[i]));
  }
  return padded(extent.range(), 0.06, logarithmic);
}

function addCurve({ y, errors, style }: Curve, add: (value: number) => void): void {
  for (let i = 0; i < y.length; i++) {
    add(y[i]);
    if (!errors) continue;
    add(y[i] - errors[i]);
    add(y[i] + errors[i]);
  }
  if (style === 'stems') add(0);
}
