import { renameSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { benchCopy, tapwright } from '../support/cli';

// What file names can do to a terminal: nothing.

const hidden = /[^\P{C}\n]|[\p{Zl}\p{Zp}]/u;
const document = 'a\u001b]0;owned\u0007\u001b[2J\u202e\nb: current\u2028\u009b31m.pairing.json';
const recording = 'x\u001b[31m\nowned: text\u202e.csv';

describe.skipIf(process.platform === 'win32')('a terminal obeys no name', () => {
  it.each([
    ['design', document],
    ['check', document],
    ['choose', document],
    ['inspect', document],
    ['inspect', recording],
    ['pair', recording, '-o', 'new.pairing.json'],
    ['pair', 'tubing.wav', '-o', document],
    ['design', 'none\u001b[31m.pairing.json'],
    ['apply', recording, 'tubing.wav', '-o', 'o\u001b.wav'],
  ])('%s %j', (...words) => {
    const folder = benchCopy();
    renameSync(join(folder, 'valve.pairing.json'), join(folder, document));
    renameSync(join(folder, 'tubing.pairing.json'), join(folder, 'taps.pairing.json'));
    if (words.includes(recording)) renameSync(join(folder, 'valve.csv'), join(folder, recording));
    for (const json of [[], ['--json']]) {
      const { out, err, status } = tapwright(folder, ...words, ...json);
      expect(out + err).not.toMatch(hidden);
      expect(out + err).not.toMatch(/^(b: current|owned: text)/m);
      expect([0, 1, 2]).toContain(status);
      if (json.length > 0) JSON.parse(out);
    }
  });
});
