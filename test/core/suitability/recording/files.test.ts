import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { memorySource } from '../../../../core/bytes/byteSource';
import { openRecording } from '../../../../core/recordings/openRecording';
import { surveyRecording } from '../../../../core/suitability/recording/surveyRecording';
import { project } from '../../../support/cli';
import { needs } from '../../../support/programs';
import { pace } from '../../../support/takes';

// Recordings as they are: the sample bench, whose scenarios are known, and speech that Debian's alsa-utils brings.

async function codesIn(path: string, sampleRate: number | null = null): Promise<string[]> {
  const { recording } = await openRecording(memorySource(readFileSync(path)), 'file', pace);
  if (recording === null) throw new Error(`${path} is no recording`);
  const { findings } = await surveyRecording(recording, { sampleRate }, pace);
  return findings.map(({ code, channel }) => `${code} ${channel}`);
}

describe('the sample bench', () => {
  it.each([
    // media/bench/README.md: the mean of frame_z is gravity.
    ['slow.csv', 800, ['offset frame_z']],
    ['medium.csv', 800, ['offset frame_z']],
    ['fast.csv', 800, ['offset frame_z']],
    // The valve's current lies between 0.3 A and 0.8 A.
    ['valve.csv', null, ['offset current', 'offset flow']],
    ['tubing.wav', null, []],
  ])('%s has what its scenario has, and nothing else', async (file, rate, expected) => {
    expect(await codesIn(join(project, 'media', 'bench', file), rate)).toEqual(expected);
  });
});

describe('speech', () => {
  it.skipIf(!needs('alsa'))('has no findings', async () => {
    const folder = '/usr/share/sounds/alsa';
    const files = readdirSync(folder).filter((name) => name.endsWith('.wav'));
    expect(files.length).toBeGreaterThan(5);
    for (const file of files) expect(await codesIn(join(folder, file)), file).toEqual([]);
  });
});
