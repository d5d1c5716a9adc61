import { frequencyResponse, magnitudeDecibels } from '../../figures/frequencyResponse';
import { brokenLine, shownIndices } from './curves';
import { decibelRange, frequencyUnit, raised } from './frequencyAxis';
import { type LinearScale, linearScale } from './linearScale';
import type { Palette } from './palettes';
import { coordinate, shortened, xmlText } from './svg';

/** One row of taps to draw. */
export interface TapsLine {
  label: string;
  taps: Float64Array;
  /** Delay of the first tap, so that rows meet where they meet the same sample. */
  first: number;
}

/** Lines drawn at most: a picture in a hover may not be large, and more could not be told apart. */
export const mostLines = 4;

export const tapsPictureSize = { width: 460, height: 140 } as const;

const { width, height } = tapsPictureSize;
const [top, bottom] = [24, height - 30];
const points = 241;
const depth = 80;
/** As many taps are drawn one by one where there is one row; more as a line. */
const stemsUpTo = 96;
const dashes = ['', '5 3', '2 2', '8 2 2 2'];

/** Impulse response and magnitude response side by side, small and in fixed colours, as a whole SVG. */
export function tapsPicture(given: readonly TapsLine[], sampleRate: number, palette: Palette): string {
  const lines = given.slice(0, mostLines);
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}" font-family="system-ui, 'Segoe UI', sans-serif" font-size="10">`,
    `<rect width="${width}" height="${height}" rx="4" fill="${palette.ground}"/>`,
    ...(given.length > 1 ? legend(lines, given.length, palette) : []),
    ...impulse(lines, palette),
    ...magnitude(lines, sampleRate, palette),
    '</svg>',
  ].join('\n');
}

function legend(lines: readonly TapsLine[], all: number, palette: Palette): string[] {
  const room = (width - 16) / (lines.length + (all > lines.length ? 0.5 : 0));
  const more = `<text x="${coordinate(8 + room * lines.length)}" y="14" fill="${palette.faint}">+${all - lines.length}</text>`;
  return [
    ...lines.flatMap(({ label }, i) => {
      const x = 8 + i * room;
      return [
        `<path d="M${coordinate(x)},10.5h18" fill="none" stroke-width="1.5" ${stroke(i, palette)}/>`,
        `<text x="${coordinate(x + 22)}" y="14" fill="${palette.ink}">${xmlText(shortened(label, Math.floor((room - 28) / 5.6)))}</text>`,
      ];
    }),
    ...(all > lines.length ? [more] : []),
  ];
}

function stroke(index: number, { lines }: Palette): string {
  const dash = dashes[index % dashes.length];
  return `stroke="${lines[index % lines.length]}"${dash === '' ? '' : ` stroke-dasharray="${dash}"`}`;
}

/** A rectangle with linear scales. */
interface Panel {
  left: number;
  right: number;
  x: LinearScale;
  y: LinearScale;
}

/** Beyond this the height of a plot is more than a double can hold. */
const largest = 1e300;

function panel(left: number, right: number, x: [number, number], y: [number, number]): Panel {
  const [from, to] = y.map((value) => Math.min(largest, Math.max(-largest, value)));
  const [low, high] = from < to ? [from, to] : [from - 0.5, to + 0.5];
  return {
    left,
    right,
    x: linearScale(x, [left, right]),
    y: linearScale([low, high], [bottom, top], 4),
  };
}

function axes({ left, right, x, y }: Panel, title: string, palette: Palette): string[] {
  const across = x.ticks(4);
  const up = y.ticks(4);
  const size = Math.max(...y.domain().map(Math.abs));
  const yLabel = size < 1e-2 || size >= 1e4 ? y.tickLabel(4, 'exponent') : y.tickLabel(4);
  const xLabel = x.tickLabel(4);
  const at = (value: number) => coordinate(value);
  return [
    `<path d="${[...across.map((v) => `M${at(x(v))},${top}V${bottom}`), ...up.map((v) => `M${left},${at(y(v))}H${right}`)].join('')}" stroke="${palette.grid}" stroke-width="0.75" fill="none"/>`,
    `<rect x="${left}" y="${top}" width="${right - left}" height="${bottom - top}" fill="none" stroke="${palette.faint}" stroke-width="0.75"/>`,
    `<g fill="${palette.faint}">`,
    ...across.map(
      (v) => `<text x="${at(x(v))}" y="${bottom + 12}" text-anchor="middle">${xmlText(xLabel(v))}</text>`,
    ),
    ...up.map(
      (v) => `<text x="${left - 4}" y="${at(y(v) + 3.5)}" text-anchor="end">${xmlText(yLabel(v))}</text>`,
    ),
    '</g>',
    `<text x="${at((left + right) / 2)}" y="${bottom + 25}" text-anchor="middle" fill="${palette.ink}">${xmlText(title)}</text>`,
  ];
}

function impulse(lines: readonly TapsLine[], palette: Palette): string[] {
  const from = Math.min(...lines.map(({ first }) => first));
  const to = Math.max(...lines.map(({ first, taps }) => first + taps.length - 1));
  const least = (row: Float64Array) => row.reduce((low, w) => Math.min(low, w), 0);
  const most = (row: Float64Array) => row.reduce((high, w) => Math.max(high, w), 0);
  const place = panel(
    48,
    226,
    [from - 0.5, to + 0.5],
    [Math.min(...lines.map(({ taps }) => least(taps))), Math.max(...lines.map(({ taps }) => most(taps)))],
  );
  const zero = coordinate(place.y(0));
  const single = lines.length === 1 && lines[0].taps.length <= stemsUpTo;
  return [
    ...axes(place, 'w[k]', palette),
    `<path d="M${place.left},${zero}H${place.right}" stroke="${palette.ink}" stroke-width="0.75"/>`,
    ...lines.map(({ taps, first }, i) => {
      const x = Float64Array.from(taps, (_, k) => first + k);
      if (!single) return curve(place, x, taps, i, palette);
      const stems = Array.from(
        taps,
        (w, k) => `M${coordinate(place.x(first + k))},${zero}V${coordinate(place.y(w))}`,
      );
      return `<path d="${stems.join('')}" fill="none" stroke-width="1.5" ${stroke(i, palette)}/>`;
    }),
  ];
}

function magnitude(lines: readonly TapsLine[], sampleRate: number, palette: Palette): string[] {
  const { unit, divisor } = frequencyUnit(sampleRate / 2);
  const highest = sampleRate / 2 / divisor;
  const rows = lines.map(({ taps }) => magnitudeDecibels(frequencyResponse(taps, points)));
  const range = decibelRange(rows, depth);
  const place = panel(282, width - 12, [0, highest], range);
  const x = Float64Array.from({ length: points }, (_, i) => (highest * i) / (points - 1));
  return [
    ...axes(place, `|H| in dB, f in ${unit}`, palette),
    ...rows.map((row, i) => curve(place, x, raised(row, range[0]), i, palette)),
  ];
}

function curve(place: Panel, x: Float64Array, y: Float64Array, index: number, palette: Palette): string {
  const d = brokenLine(
    shownIndices(y, place.right - place.left).map((i): [number, number] => [place.x(x[i]), place.y(y[i])]),
  );
  return `<path d="${d}" fill="none" stroke-width="1.5" stroke-linejoin="round" ${stroke(index, palette)}/>`;
}
