import { describe, expect, it } from 'vitest';
import { memorySource } from '../../../../core/bytes/byteSource';
import type { Finding } from '../../../../core/findings/finding';
import { inspectPairing, inspectRecording } from '../../../../core/pipeline/inspect';
import { keepNothing } from '../../../../core/pipeline/keep';
import { nodeSha256 } from '../../../support/nodeSha256';
import { normals } from '../../../support/random';
import { pace } from '../../../support/takes';
import { scaled, sum } from './signals';

// How the findings of a recording come to those who name it.

const N = 6000;

function csv(columns: Record<string, Float64Array>): string {
  const rows = Array.from({ length: N }, (_, n) =>
    Object.values(columns)
      .map((column) => column[n])
      .join(','),
  );
  return [Object.keys(columns).join(','), ...rows].join('\n');
}

function hostOf(files: Record<string, string>) {
  return {
    open: async (path: string) =>
      files[path] === undefined ? ('missing' as const) : memorySource(new TextEncoder().encode(files[path])),
    newSha256: nodeSha256,
    keep: keepNothing,
    pace,
  };
}

const high = (x: Float64Array) => x.map((value) => value + 9);
const stuck = (x: Float64Array) => x.slice().fill(0.25, 3000, 3100);
const noise = (seed: number) => normals(seed, N);

const shown = (findings: readonly Finding[]) =>
  findings.map(({ code, severity, file, channel, path }) => ({ code, severity, file, channel, path }));

describe('inspecting a document', () => {
  const recording = csv({ spare: stuck(noise(1)), x: stuck(noise(2)), d: high(noise(3)), copy: noise(2) });
  const document = (removeMean: boolean) =>
    JSON.stringify({
      pairing: 1,
      job: 'identify',
      sampleRate: 1000,
      takes: [
        {
          name: 'first',
          inputs: [{ file: 'r.csv', channel: 'x' }],
          desired: { file: 'r.csv', channel: 'd' },
        },
      ],
      prepare: { removeMean },
      filter: { length: 4, delay: 0 },
    });
  const inspect = (removeMean: boolean) =>
    inspectPairing(hostOf({ 'r.csv': recording }), document(removeMean), {
      file: 'p.pairing.json',
      folder: '',
    });

  const stuckX = {
    code: 'stuck',
    severity: 'caution',
    file: 'r.csv',
    channel: 'x',
    path: ['takes', 0, 'inputs', 0, 'channel'],
  };

  it('tells what is found in the channels that it names, where it names them', async () => {
    const { findings } = await inspect(false);
    const own = shown(findings).filter(({ code }) => code === 'stuck' || code === 'offset');
    expect(own).toEqual([
      stuckX,
      { ...stuckX, code: 'offset', severity: 'note', channel: 'd', path: ['takes', 0, 'desired', 'channel'] },
    ]);
  });

  it('says nothing of an offset that it has taken off', async () => {
    const { findings } = await inspect(true);
    expect(shown(findings).filter(({ code }) => code === 'stuck' || code === 'offset')).toEqual([stuckX]);
  });

  it('uses its rate where the recording has none', async () => {
    const hum = Float64Array.from({ length: N }, (_, n) => Math.sin(0.1 * Math.PI * n));
    const files = { 'r.csv': csv({ x: sum(noise(2), scaled(hum, 0.5)), d: noise(3) }) };
    const { findings } = await inspectPairing(hostOf(files), document(true), { file: 'p.json', folder: '' });
    expect(shown(findings).filter(({ code }) => code === 'mains')).toEqual([
      { ...stuckX, code: 'mains', severity: 'note' },
    ]);
  });
});

describe('inspecting a recording', () => {
  it('tells what is found in all channels, worst first', async () => {
    const files = { 'r.csv': csv({ d: high(noise(3)), x: stuck(noise(2)), copy: stuck(noise(2)) }) };
    const { recording, findings } = await inspectRecording(hostOf(files), 'r.csv', 'r.csv');
    expect(recording?.levels.length).toBe(3);
    expect(findings.map(({ code, channel }) => `${code} ${channel}`)).toEqual([
      'stuck x',
      'stuck copy',
      'identical-channels copy',
      'offset d',
    ]);
  });
});
