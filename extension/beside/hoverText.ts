import { decibels } from '../../core/figures/decibels';
import { grouped } from '../../core/figures/numbers';
import { frequency, memory } from '../../core/figures/units';
import { readTaps } from '../../core/files/readTaps';
import { tapsFigures } from '../../core/files/tapsFigures';
import { name, plain } from '../../core/note/markdown';
import type { Palette } from '../../core/note/pictures/palettes';
import { tapsPicture, tapsPictureSize } from '../../core/note/pictures/tapsPicture';
import { base64Of } from './base64';
import type { Translate } from './words';

/** A hover is not shown at all where it is longer. */
export const longestHover = 100_000;

export interface HoverOptions {
  /** Null: no picture. */
  palette: Palette | null;
  /** In words. */
  standing: string;
  /** Target of a link that opens the document; null: none. */
  link: string | null;
  t: Translate;
}

/**
 * What a hover says of a written filter, as Markdown.
 * @param text of the taps file
 * @throws Refusal where it is none that this version can read
 */
export function hoverText(text: string, file: string, options: HoverOptions): string {
  const { palette, standing, link, t } = options;
  const taps = readTaps(text, file);
  const figures = tapsFigures(text);
  const document = name(taps.document.file);
  const figure = (label: string, value: string) => `${plain(label)} **${plain(value)}**`;
  const figuresLine = [
    figure(t('Held-out NMSE'), taps.heldOutNmseDb === null ? '–' : decibels(taps.heldOutNmseDb)),
    figure(t('Attainable limit'), limit(figures.attainableDb, t)),
    figure(t('Quantisation loss'), decibels(figures.quantisationLossDb)),
  ].join(' · ');
  const inputs = t('{0} inputs of {1} taps', taps.inputs.length, taps.coefficients[0].length);
  const row = (label: string, value: string) => `${plain(label)}: ${value}`;
  const rows = [
    row(t('Format'), plain(formatInWords(taps.arithmetic, figures.accumulator, t))),
    row(t('Filter'), plain(`${inputs}, ${frequency(taps.sampleRate)}`)),
    row(t('Cost'), plain(costInWords(figures, t))),
    row(t('Made from'), link === null ? document : `[${document}](${link})`),
    row(t('State'), plain(standing)),
  ].join('  \n');
  const heading = `**${plain(figures.title ?? taps.document.file)}**  \n${figuresLine}`;
  const said = [heading, rows].join('\n\n');
  if (palette === null) return said;
  const lines = taps.coefficients.map((of, r) => ({ label: taps.inputs[r], taps: of, first: 0 }));
  const whole = [heading, pictureLink(tapsPicture(lines, taps.sampleRate, palette), t), rows].join('\n\n');
  return whole.length < longestHover ? whole : said;
}

/** A picture inside the text itself. */
export function pictureLink(svg: string, t: Translate): string {
  const { width, height } = tapsPictureSize;
  const says = plain(t('Impulse response and magnitude response'));
  return `![${says}](data:image/svg+xml;base64,${base64Of(svg)}|width=${width},height=${height})`;
}

function limit(attainableDb: number | null, t: Translate): string {
  return attainableDb === null ? t('withheld') : t('about {0}', decibels(-attainableDb));
}

type Arithmetic = ReturnType<typeof readTaps>['arithmetic'];

function formatInWords({ word, fractionBits }: Arithmetic, accumulator: number | null, t: Translate): string {
  if (typeof word === 'string' || fractionBits === null) return String(word);
  const bits = t('{0}-bit taps, {1} fraction bits', word, fractionBits);
  return accumulator === null ? bits : `${bits}, ${t('accumulator of {0} bits', accumulator)}`;
}

function costInWords(
  { macsPerSample, macsPerSecond, coefficientBytes, stateBytes }: ReturnType<typeof tapsFigures>,
  t: Translate,
): string {
  const parts: string[] = [];
  if (macsPerSample !== null && macsPerSecond !== null) {
    parts.push(
      t(
        '{0} multiply-accumulates a sample, {1} a second',
        grouped(macsPerSample),
        grouped(Math.round(macsPerSecond)),
      ),
    );
  }
  if (coefficientBytes !== null && stateBytes !== null) {
    parts.push(t('{0} of taps, {1} of history', memory(coefficientBytes), memory(stateBytes)));
  }
  return parts.join('; ') || '–';
}
