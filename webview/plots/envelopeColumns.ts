import type { Envelope } from '../../core/protocol/messages';
import { pixelOf, type View } from './sampleView';

/** What is drawn of a lane: places in pixels with the lowest and highest value there. */
export interface Columns {
  x: number[];
  low: number[];
  high: number[];
}

/** Samples that an envelope covers. */
export function coverage({ from, step, lanes }: Envelope): View {
  return { from, to: from + step * (lanes[0]?.low.length ?? 0) };
}

/**
 * The columns of a lane in view, one beyond either edge so that lines run on; where several fall on one pixel they are
 * joined to one. Columns without values (NaN) stay as gaps.
 */
export function columnsInView(envelope: Envelope, lane: number, view: View, width: number): Columns {
  const { from, step, lanes } = envelope;
  const { low, high } = lanes[lane];
  const first = Math.max(0, Math.floor((view.from - from) / step) - 1);
  const last = Math.min(low.length - 1, Math.ceil((view.to - from) / step) + 1);
  const joined: Columns = { x: [], low: [], high: [] };
  let pixel = Number.NaN;
  for (let k = first; k <= last; k++) {
    const x = pixelOf(view, width, from + step * k + (step - 1) / 2);
    const end = joined.x.length - 1;
    if (Math.floor(x) !== pixel || Number.isNaN(low[k]) !== Number.isNaN(joined.low[end])) {
      pixel = Math.floor(x);
      joined.x.push(x);
      joined.low.push(low[k]);
      joined.high.push(high[k]);
    } else {
      joined.low[end] = Math.min(joined.low[end], low[k]);
      joined.high[end] = Math.max(joined.high[end], high[k]);
    }
  }
  return joined;
}

/** What to ask for so that a view can be drawn and moved half its length without asking again. */
export function wantedEnvelope(
  view: View,
  samples: number,
  width: number,
): { from: number; to: number; columns: number } {
  const room = (view.to - view.from) / 2;
  const from = Math.max(0, Math.floor(view.from - room));
  const to = Math.min(samples, Math.ceil(view.to + room));
  const columns = Math.ceil((width * (to - from)) / (view.to - view.from));
  return { from, to, columns: Math.min(8192, Math.max(1, columns)) };
}

/** Whether an envelope is good enough for a view: covers it, and is as fine as the pixels. */
export function suits(envelope: Envelope | null, view: View, samples: number, width: number): boolean {
  if (envelope === null) return false;
  const { from, to } = coverage(envelope);
  const perPixel = (view.to - view.from) / width;
  return (
    from <= view.from && to >= Math.min(view.to, samples) && envelope.step <= Math.max(1, 1.5 * perPixel)
  );
}

/** The value of a lane at a sample: lowest and highest of its column; null where none is known. */
export function valueAt(
  envelope: Envelope,
  lane: number,
  sample: number,
): { low: number; high: number } | null {
  const column = Math.floor((sample - envelope.from) / envelope.step);
  const { low, high } = envelope.lanes[lane];
  if (column < 0 || column >= low.length || Number.isNaN(low[column])) return null;
  return { low: low[column], high: high[column] };
}
