import { grouped, significant } from '../../figures/numbers';
import { duration, frequency } from '../../figures/units';
import type { DesignResult } from '../../pipeline/designResult';
import { name, plain, section, table } from '../markdown';

/** The files that were read, and the levels of their channels. */
export function recordings(result: DesignResult): string {
  return section(
    'Recordings',
    table(
      ['file', 'format', 'sample rate', 'samples', 'duration', 'SHA-256'],
      result.recordings.map(({ file, format, sampleRate, samples, sha256 }) => [
        name(file),
        plain(format),
        sampleRate === null ? 'not in the file' : frequency(sampleRate),
        grouped(samples),
        duration(samples / result.sampleRate),
        `${sha256.slice(0, 12)}…`,
      ]),
      ['sample rate', 'samples', 'duration'],
    ),
    'Levels over the whole file, in its own unit (fixed-point audio: -1 to 1):',
    table(
      ['file', 'channel', 'used as', 'minimum', 'maximum', 'mean', 'RMS'],
      result.recordings.flatMap(({ file, channels, levels }) =>
        channels.map((channel, c) => {
          const { min, max, mean, rms } = levels[c];
          return [
            name(file),
            name(channel),
            use(result, file, channel),
            ...[min, max, mean, rms].map((level) => significant(level)),
          ];
        }),
      ),
      ['minimum', 'maximum', 'mean', 'RMS'],
    ),
  );
}

function use({ takes }: DesignResult, file: string, channel: string): string {
  const is = (track: { file: string; channel: string }) => track.file === file && track.channel === channel;
  const uses = takes.flatMap((take) => [
    ...take.inputs.flatMap((track, r) => (is(track) ? [take.inputs.length === 1 ? 'x' : `x_${r}`] : [])),
    ...(is(take.desired) ? ['d'] : []),
  ]);
  return uses.length === 0 ? 'not used' : [...new Set(uses)].join(', ');
}
