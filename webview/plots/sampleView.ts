/** The samples in view, half-open; fractions are kept so that zooming in and out again leads back. */
export interface View {
  from: number;
  to: number;
}

/** Fewest samples in view. */
export const fewestSamples = 16;

/** A view of at least a few samples and at most all, moved inside `[0, samples]`. */
export function clampView({ from, to }: View, samples: number): View {
  const length = Math.min(samples, Math.max(Math.min(fewestSamples, samples), to - from));
  // A view that had to grow grows around its middle.
  const wanted = length === to - from ? from : (from + to - length) / 2;
  const start = Math.min(samples - length, Math.max(0, wanted));
  return { from: start, to: start + length };
}

/** `factor` below 1 zooms in; the sample `at` stays where it is. */
export function zoomView(view: View, factor: number, at: number, samples: number): View {
  const least = Math.min(fewestSamples, samples) / (view.to - view.from);
  const most = samples / (view.to - view.from);
  const kept = Math.min(most, Math.max(least, factor));
  return clampView({ from: at - (at - view.from) * kept, to: at + (view.to - at) * kept }, samples);
}

/** Moved by a number of samples, as far as there are any. */
export function panView({ from, to }: View, by: number, samples: number): View {
  const kept = Math.min(samples - to, Math.max(-from, by));
  return { from: from + kept, to: to + kept };
}

/** What a key makes of the view; null where the key is none of ours. */
export function viewAfterKey(view: View, key: string, samples: number): View | null {
  const length = view.to - view.from;
  const middle = (view.from + view.to) / 2;
  switch (key) {
    case '+':
    case '=':
      return zoomView(view, 0.5, middle, samples);
    case '-':
    case '_':
      return zoomView(view, 2, middle, samples);
    case '0':
      return { from: 0, to: samples };
    case 'ArrowLeft':
      return panView(view, -length / 10, samples);
    case 'ArrowRight':
      return panView(view, length / 10, samples);
    case 'PageUp':
      return panView(view, -length, samples);
    case 'PageDown':
      return panView(view, length, samples);
    case 'Home':
      return panView(view, -view.from, samples);
    case 'End':
      return panView(view, samples - view.to, samples);
    default:
      return null;
  }
}

/** The view that shows a span with what is around it: the present one where the span is well in it and not a mere speck. */
export function viewOf(span: View, view: View, samples: number): View {
  const length = span.to - span.from;
  const seen = span.from >= view.from && span.to <= view.to;
  if (seen && length >= (view.to - view.from) / 20) return view;
  const room = Math.max(2 * length, 64);
  return clampView({ from: span.from - room, to: span.to + room }, samples);
}

/** The view in which a sample is: the present one, or moved just as far as needed. */
export function viewHolding(sample: number, view: View, samples: number): View {
  const margin = (view.to - view.from) / 20;
  if (sample < view.from) return panView(view, sample - margin - view.from, samples);
  if (sample > view.to) return panView(view, sample + margin - view.to, samples);
  return view;
}

/** Pixel of a sample in a plot of `width` pixels. */
export function pixelOf(view: View, width: number, sample: number): number {
  return ((sample - view.from) / (view.to - view.from)) * width;
}

/** Sample at a pixel, fractions included. */
export function sampleAt(view: View, width: number, pixel: number): number {
  return view.from + (pixel / width) * (view.to - view.from);
}

/** Factor of a turn of the wheel, whatever unit it is told in. */
export function wheelFactor(delta: number, mode: number): number {
  const pixels = delta * (mode === 1 ? 20 : mode === 2 ? 400 : 1);
  return Math.exp(Math.min(1, Math.max(-1, pixels * 0.002)));
}
