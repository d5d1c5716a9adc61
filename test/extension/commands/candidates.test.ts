import { describe, expect, it } from 'vitest';
import type { RecordingHead } from '../../../core/protocol/messages';
import { candidates, nearestFirst } from '../../../extension/commands/candidates';
import { numberFrom } from '../../../extension/commands/numberFrom';
import { hostFinding } from '../../../extension/findingsOfHost';

const head = (path: string, change: Partial<RecordingHead> = {}): RecordingHead => ({
  path,
  samples: 1000,
  sampleRate: 800,
  channels: [1],
  problems: [],
  ...change,
});
const shown = (input: RecordingHead, inputs: (string | number)[], others: RecordingHead[]) =>
  candidates(input, inputs, others).map(({ path, channel }) => `${path} ${channel}`);

describe('what could be the desired signal', () => {
  it('is first the other channel of the same file, last the input itself', () => {
    const input = head('a.wav', { channels: ['x', 'y', 'z'] });
    expect(shown(input, ['y'], [])).toEqual(['a.wav x', 'a.wav z', 'a.wav y']);
  });

  it('is then a file of the same stem, rate and length, then of rate and length, then any other', () => {
    const others = [
      head('other.wav', { samples: 5 }),
      head('belt_short.wav', { samples: 5 }),
      head('twin.wav'),
      head('belt_out.wav'),
      head('slow/belt-out.wav', { sampleRate: 400 }),
    ];
    expect(shown(head('belt_in.wav'), [1], others)).toEqual([
      'belt_out.wav 1',
      'twin.wav 1',
      'belt_short.wav 1',
      'slow/belt-out.wav 1',
      'other.wav 1',
      'belt_in.wav 1',
    ]);
  });

  it('is no file that cannot be used', () => {
    expect(
      shown(
        head('a.wav'),
        [1],
        [head('b.wav', { channels: [], problems: [hostFinding('empty-file', 'broken')] })],
      ),
    ).toEqual(['a.wav 1']);
  });

  it('is looked for near by first', () => {
    const paths = ['x/belt.wav', 'y/zero.wav', 'zero.wav', 'belt_out.wav', 'belt_in.wav'];
    expect(nearestFirst('belt_in.wav', paths)).toEqual([
      'belt_out.wav',
      'zero.wav',
      'x/belt.wav',
      'y/zero.wav',
    ]);
  });
});

describe('a number that was typed', () => {
  it('may have a decimal comma, and is above 0', () => {
    expect(['800', ' 44100 ', '0,5', '2.5e3', '.5', '8.'].map(numberFrom)).toEqual([
      800, 44100, 0.5, 2500, 0.5, 8,
    ]);
    expect(['', '0', '-1', '8,000', '1,000.5', '8 kHz', '1e999', 'x'].map(numberFrom)).toEqual(
      Array(8).fill(null),
    );
  });
});
