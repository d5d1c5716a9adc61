import { changeInWords } from '../../core/comparison/changeInWords';
import { compareTaps } from '../../core/comparison/compareTaps';
import { decibels } from '../../core/figures/decibels';
import { grouped, noFigure } from '../../core/figures/numbers';
import { frequency } from '../../core/figures/units';
import { readTaps, type TapsFile } from '../../core/files/readTaps';
import { type TapsFigures, tapsFigures } from '../../core/files/tapsFigures';
import type { Dictionary } from '../../core/findings/translate';
import { translatedPhrase } from '../../core/findings/translatePhrase';
import { bullets, name, plain, table } from '../../core/note/markdown';
import type { Palette } from '../../core/note/pictures/palettes';
import { tapsPicture } from '../../core/note/pictures/tapsPicture';
import { base64Of } from './base64';
import type { Translate } from './words';

/** One of the two filters that are compared. */
export interface Side {
  /** What it is, in words. */
  label: string;
  /** Of the taps file. */
  text: string;
}

/** Pictures drawn at most, one an input. */
const mostPictures = 8;

/**
 * Two written filters side by side, as Markdown.
 * @param dictionary translations of what `core` says, by its English
 * @throws Refusal where one is no taps file that this version can read
 */
export function comparisonText(
  file: string,
  before: Side,
  after: Side,
  palette: Palette,
  t: Translate,
  dictionary: Dictionary = {},
): string {
  const [old, now] = [before, after].map(({ text }) => ({
    taps: readTaps(text, file),
    figures: tapsFigures(text),
  }));
  const change = compareTaps(old.taps, now.taps);
  const sameInputs = old.taps.coefficients.length === now.taps.coefficients.length;
  const said = !sameInputs
    ? [t('The filters have other numbers of inputs.')]
    : change === null
      ? [t('The taps are the same.')]
      : [
          ...changeInWords(change).map((text) => plain(translatedPhrase(text, dictionary))),
          ...origins(change, t),
        ];
  const figures = figureRows(old, now, t);
  return [
    `# ${t('Taps of {0}', name(file))}`,
    ...pictures(old.taps, now.taps, before, after, palette, t),
    bullets(said),
    table([t('Figure'), plain(before.label), plain(after.label)], figures, [
      plain(before.label),
      plain(after.label),
    ]),
    '',
  ].join('\n\n');
}

type Change = NonNullable<ReturnType<typeof compareTaps>>;

function origins({ documentChanged, recordingsChanged }: Change, t: Translate): string[] {
  const said: string[] = [];
  if (documentChanged) said.push(t('The pairing document has changed.'));
  if (recordingsChanged.length > 0) {
    said.push(t('Recordings that are others: {0}', recordingsChanged.map(name).join(', ')));
  }
  return said.length > 0 ? said : [t('Document and recordings are the same.')];
}

/** For each input one plot of both, where they meet the same sample of the desired signal. */
function pictures(
  old: TapsFile,
  now: TapsFile,
  before: Side,
  after: Side,
  palette: Palette,
  t: Translate,
): string[] {
  const inputs = Math.min(old.inputs.length, now.inputs.length, mostPictures);
  const says = plain(t('Impulse response and magnitude response of both'));
  return Array.from({ length: inputs }, (_, r) => {
    const lines = [
      { label: `${old.inputs[r]}, ${before.label}`, taps: old.coefficients[r], first: -old.delay },
      { label: `${now.inputs[r]}, ${after.label}`, taps: now.coefficients[r], first: -now.delay },
    ];
    const svg = base64Of(tapsPicture(lines, now.sampleRate, palette));
    return `![${says}: ${plain(now.inputs[r])}](data:image/svg+xml;base64,${svg})`;
  });
}

interface Read {
  taps: TapsFile;
  figures: TapsFigures;
}

function figureRows(old: Read, now: Read, t: Translate): string[][] {
  const row = (label: string, show: (side: Read) => string) => [
    plain(label),
    plain(show(old)),
    plain(show(now)),
  ];
  return [
    row(t('Held-out NMSE'), ({ taps }) => decibels(taps.heldOutNmseDb)),
    row(t('Held-out NMSE in the target'), ({ taps }) => decibels(taps.arithmetic.heldOutNmseDb)),
    row(t('Attainable limit'), ({ figures: { attainableDb } }) =>
      decibels(attainableDb === null ? null : -attainableDb),
    ),
    row(t('Quantisation loss'), ({ figures }) => decibels(figures.quantisationLossDb)),
    row(t('Taps of each input'), ({ taps }) => grouped(taps.coefficients[0].length)),
    row(t('Delay in samples'), ({ taps }) => String(taps.delay)),
    row(t('Word'), ({ taps }) => String(taps.arithmetic.word)),
    row(t('Fraction bits'), ({ taps }) => String(taps.arithmetic.fractionBits ?? noFigure)),
    row(t('Multiply-accumulates a sample'), ({ figures: { macsPerSample } }) =>
      macsPerSample === null ? noFigure : grouped(macsPerSample),
    ),
    row(t('Sample rate'), ({ taps }) => frequency(taps.sampleRate)),
  ];
}
