import type { FileView } from '../../core/protocol/views';
import { el } from '../elements';
import { count, decibels, plain } from '../figures';
import { table } from '../tables';
import { phrase, t } from '../words';

/** Levels of the channels that are used. */
export function levelTable(files: readonly FileView[]): HTMLElement {
  const rows = files.flatMap(({ file, pcm, channels }) =>
    channels
      .filter(({ rms }) => rms !== null)
      .map((channel) => [
        `${file} · ${channel.label}`,
        plain(channel.min),
        plain(channel.max),
        plain(channel.mean),
        plain(channel.rms),
        pcm ? decibels(channel.peakDb) : '–',
        pcm ? decibels(channel.rmsDb) : '–',
      ]),
  );
  const head = [t('channel'), t('lowest'), t('highest'), t('mean'), t('RMS'), t('peak'), t('RMS level')];
  const withoutLevels = files.every(({ pcm }) => !pcm);
  return el(
    'div',
    { 'data-anchor': 'levels' },
    table(
      withoutLevels
        ? t("Levels, in the file's own unit")
        : t("Levels, in the file's own unit and relative to full scale"),
      withoutLevels ? head.slice(0, 5) : head,
      withoutLevels ? rows.map((row) => row.slice(0, 5)) : rows,
      [1, 2, 3, 4, 5, 6],
    ),
  );
}

/** Format, rate and length of the files. */
export function fileTable(files: readonly FileView[]): HTMLElement {
  const rows = files.map(({ file, format, samples, sampleRate, channels }) => [
    file,
    phrase(format),
    sampleRate === null ? t('not given') : t('{0} Hz', plain(sampleRate, 8)),
    count(samples),
    String(channels.length),
  ]);
  const head = [t('file'), t('format'), t('rate'), t('samples'), t('channels')];
  return table(t('Files'), head, rows, [2, 3, 4]);
}
