import type { Mark } from './data';
import { make, makeSvg } from './elements';
import type { Stroke } from './strokes';
import { cssColour } from './theme';

/** An entry of a legend. */
export type LegendEntry =
  | { label: string; stroke: Stroke; points?: boolean }
  | { label: string; shape: 'now' | 'suggested' | 'span' };

/** Fills a list with swatches and words; colours follow the theme by themselves. */
export function fillLegend(list: HTMLElement, entries: LegendEntry[]): void {
  list.replaceChildren(
    ...entries.map((entry) => {
      const item = make('li');
      item.append(
        'stroke' in entry ? strokeSwatch(entry) : shapeSwatch(entry.shape),
        make('span', '', entry.label),
      );
      return item;
    }),
  );
}

/** Entries of marks, each label once; levels carry theirs in the plot too. */
export function markEntries(marks: Mark[], levelStroke: Stroke): LegendEntry[] {
  const entries = new Map<string, LegendEntry>();
  for (const mark of marks) {
    if (mark.label === '' || entries.has(mark.label)) continue;
    if (mark.kind === 'place') entries.set(mark.label, { label: mark.label, shape: mark.shape });
    else if (mark.kind === 'span') entries.set(mark.label, { label: mark.label, shape: 'span' });
    else entries.set(mark.label, { label: mark.label, stroke: levelStroke });
  }
  return [...entries.values()];
}

function swatch(): SVGSVGElement {
  return makeSvg('svg', { width: 30, height: 12, viewBox: '0 0 30 12', 'aria-hidden': 'true' });
}

function strokeSwatch({ stroke, points }: { stroke: Stroke; points?: boolean }): SVGSVGElement {
  const svg = swatch();
  svg.style.color = cssColour(stroke.variables);
  const line = {
    stroke: 'currentColor',
    'stroke-width': stroke.width,
    'stroke-dasharray': stroke.dash.join(' '),
  };
  if (stroke.fill > 0) {
    svg.append(
      makeSvg('rect', { x: 1, y: 3, width: 28, height: 9, fill: 'currentColor', opacity: stroke.fill }),
    );
  }
  // Thin lines lie on pixels, not between them.
  const y = (stroke.fill > 0 ? 3 : 6) + (stroke.width < 2 ? 0.5 : 0);
  if (points) svg.append(makeSvg('circle', { cx: 15, cy: 6, r: 3, fill: 'currentColor' }));
  else svg.append(makeSvg('line', { x1: 1, y1: y, x2: 29, y2: y, ...line }));
  return svg;
}

function shapeSwatch(shape: 'now' | 'suggested' | 'span'): SVGSVGElement {
  const svg = swatch();
  if (shape === 'now') svg.append(makeSvg('circle', { cx: 15, cy: 6, r: 4.5, fill: 'currentColor' }));
  else if (shape === 'span') {
    svg.append(makeSvg('rect', { x: 4, y: 1, width: 22, height: 10, fill: 'currentColor', opacity: 0.2 }));
  } else {
    const diamond = {
      d: 'M15 1 L20 6 L15 11 L10 6 Z',
      fill: 'none',
      stroke: 'currentColor',
      'stroke-width': 1.5,
    };
    svg.append(makeSvg('path', diamond));
  }
  return svg;
}
