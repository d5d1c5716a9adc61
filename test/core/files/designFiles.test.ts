import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { designFiles } from '../../../core/files/designFiles';
import { documentStem } from '../../../core/files/documentStem';
import { madeFromDigest, readMark } from '../../../core/files/generatedMark';
import { selfDigestHolds } from '../../../core/files/selfDigest';
import { nodeSha256 } from '../../support/nodeSha256';
import { type SampleOptions, sampleResult } from '../../support/sampleResult';

const all: SampleOptions = { languages: ['c', 'rs', 'csv', 'npy'] };

function paths(options: SampleOptions): string[] {
  return designFiles(sampleResult(options), nodeSha256).map(({ path }) => path);
}

describe('designFiles', () => {
  it('names every file, NAME.taps.json last', () => {
    expect(paths(all)).toEqual([
      'generated/belt_taps.h',
      'generated/belt_vectors.h',
      'generated/belt_taps.rs',
      'generated/belt_vectors.rs',
      'generated/belt_taps.csv',
      'generated/belt_taps.npy',
      'generated/belt.note.md',
      'generated/belt.note/impulse.svg',
      'generated/belt.note/magnitude.svg',
      'generated/belt.note/spectra.svg',
      'generated/belt.taps.json',
    ]);
  });

  it('takes NAME from the document, SYMBOL from what is asked for, and leaves out what is not', () => {
    const options: SampleOptions = {
      documentFile: 'line 3.pairing.json',
      symbol: 'L3',
      languages: ['rs'],
      folder: './a/b/',
    };
    expect(paths(options)).toEqual([
      'a/b/L3_taps.rs',
      'a/b/L3_vectors.rs',
      'a/b/line 3.note.md',
      'a/b/line 3.note/impulse.svg',
      'a/b/line 3.note/magnitude.svg',
      'a/b/line 3.note/spectra.svg',
      'a/b/line 3.taps.json',
    ]);
    expect(paths({ folder: '.' })[0]).toBe('belt_taps.h');
    expect(paths({ folder: '', vectors: 0 })).not.toContain('belt_vectors.h');
    expect(['x.pairing.json', 'x.json', 'x'].map(documentStem)).toEqual(['x', 'x', 'x']);
  });

  it('marks every file with the document and the digest of what it was made from', () => {
    const result = sampleResult(all);
    const digest = madeFromDigest(nodeSha256, result.documentSha256, [result.recordings[0].sha256]);
    for (const { bytes } of designFiles(result, nodeSha256)) {
      expect(readMark(new TextDecoder().decode(bytes))).toEqual({ document: 'belt.pairing.json', digest });
    }
  });

  it('lists the digests of the others by their paths from its own folder (against Node, crypto)', () => {
    const files = designFiles(sampleResult(all), nodeSha256);
    const json = JSON.parse(new TextDecoder().decode(files[files.length - 1].bytes));
    const expected = files
      .slice(0, -1)
      .map(({ path, bytes }) => [
        path.replace('generated/', ''),
        createHash('sha256').update(bytes).digest('hex'),
      ]);
    expect(Object.entries(json.files)).toEqual(expected);
  });

  it('closes NAME.taps.json with its own digest, which an edit breaks and line ends do not', () => {
    const files = designFiles(sampleResult(), nodeSha256);
    const text = new TextDecoder().decode(files[files.length - 1].bytes);
    const zeros = text.replace(/"self": "[0-9a-f]{64}"/, `"self": "${'0'.repeat(64)}"`);
    expect(JSON.parse(text).self).toBe(createHash('sha256').update(zeros).digest('hex'));
    expect(selfDigestHolds(text, nodeSha256)).toBe(true);
    expect(selfDigestHolds(text.replace(/\n/g, '\r\n'), nodeSha256)).toBe(true);
    expect(selfDigestHolds(text.replace('18432', '18433'), nodeSha256)).toBe(false);
  });

  it('gives the same bytes for the same result, with LF alone and no trace of the machine', () => {
    const once = designFiles(sampleResult(all), nodeSha256);
    expect(designFiles(sampleResult(all), nodeSha256)).toEqual(once);
    for (const { path, bytes } of once.filter((file) => !file.path.endsWith('.npy'))) {
      const text = new TextDecoder().decode(bytes);
      expect(text, path).not.toContain('\r');
      expect(text, path).not.toContain(process.cwd());
      expect(text, path).not.toMatch(/\b(NaN|Infinity|undefined|\[object)/);
      expect(text.endsWith('\n'), path).toBe(true);
    }
  });
});
