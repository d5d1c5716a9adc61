import { describe, expect, it } from 'vitest';
import { palettes } from '../../../core/note/pictures/palettes';
import { mostLines, type TapsLine, tapsPicture } from '../../../core/note/pictures/tapsPicture';
import { hostileNames } from '../../support/hostileNames';
import { seededUniform } from '../../support/random';
import { xmlFault } from '../../support/wellFormedXml';

const uniform = seededUniform(3);
const row = (length: number, label = 'x', first = 0): TapsLine => ({
  label,
  taps: Float64Array.from({ length }, () => uniform() - 0.5),
  first,
});

const odd: TapsLine[][] = [
  [row(64)],
  [row(1)],
  [{ label: 'silent', taps: new Float64Array(8), first: 0 }],
  [{ label: 'small', taps: Float64Array.of(1e-300, -2e-300), first: -3 }],
  [{ label: 'large', taps: Float64Array.of(1e200, 1), first: 4 }],
  [{ label: 'largest', taps: Float64Array.of(1.5e308, -1.5e308), first: 0 }],
  [row(64, 'before', -4), row(32, 'after', 2)],
  hostileNames.slice(0, 4).map((name) => row(5, name)),
  Array.from({ length: 9 }, (_, i) => row(8192, hostileNames[i % hostileNames.length])),
];

describe('the picture of taps', () => {
  const all = odd.flatMap((lines) =>
    Object.values(palettes).map((palette) => tapsPicture(lines, 48000, palette)),
  );

  it('is well-formed whatever the taps and names are', () => {
    expect(all.map(xmlFault)).toEqual(all.map(() => null));
    for (const svg of all) expect(svg).not.toMatch(/NaN|Infinity|undefined/);
  });

  it('stays so small that a hover can hold it', () => {
    // Base64 makes four characters of three bytes; the words of the hover come on top.
    for (const svg of all) expect(new TextEncoder().encode(svg).length).toBeLessThan(70_000);
  });

  it('tells lines apart by dash as well as by colour, and says how many it leaves out', () => {
    const svg = tapsPicture(
      Array.from({ length: 6 }, (_, i) => row(8, `x${i}`)),
      8000,
      palettes.light,
    );
    const strokes = [
      ...svg.matchAll(
        /h18" fill="none" stroke-width="1.5" stroke="(#\w+)"(?: stroke-dasharray="([\d ]+)")?/g,
      ),
    ];
    expect(strokes).toHaveLength(mostLines);
    expect(new Set(strokes.map(([, colour]) => colour)).size).toBe(mostLines);
    expect(new Set(strokes.map(([, , dash]) => dash)).size).toBe(mostLines);
    expect(svg).toContain('>+2<');
  });

  it('has text and lines that stand out from their ground (WCAG 2.2: 4.5 and 3 to 1)', () => {
    for (const { ground, ink, faint, lines } of Object.values(palettes)) {
      for (const text of [ink, faint]) expect(contrast(text, ground)).toBeGreaterThan(4.5);
      for (const line of lines) expect(contrast(line, ground)).toBeGreaterThan(3);
    }
  });

  it('draws a stem for each tap at its delay, and its magnitude', () => {
    const svg = tapsPicture([{ label: 'x', taps: Float64Array.of(1, 1), first: 0 }], 1000, palettes.dark);
    const stems = /d="((?:M[\d.]+,[\d.]+V[\d.]+)+)" fill="none" stroke-width="1.5"/.exec(svg)?.[1] ?? '';
    expect(stems.match(/M/g)).toHaveLength(2);
    // Two taps of 1: 6.02 dB at 0 Hz, falling to nothing at half the rate.
    const curve = /d="M([^"]*L[^"]*)" fill="none" stroke-width="1.5" stroke-linejoin/.exec(svg)?.[1] ?? '';
    const heights = curve.split('L').map((point) => Number(point.split(',')[1]));
    expect(heights.length).toBeGreaterThan(200);
    expect(heights).toEqual([...heights].sort((a, b) => a - b));
  });
});

/** Relative luminance and contrast of WCAG 2.2. */
function contrast(a: string, b: string): number {
  const luminance = (colour: string) => {
    const [r, g, bl] = [1, 3, 5].map((i) => {
      const c = Number.parseInt(colour.slice(i, i + 2), 16) / 255;
      return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
    });
    return 0.2126 * r + 0.7152 * g + 0.0722 * bl;
  };
  const [high, low] = [luminance(a), luminance(b)].sort((x, y) => y - x);
  return (high + 0.05) / (low + 0.05);
}
