import { readdirSync, readFileSync, statSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { readDocument } from '../../core/document/readDocument';
import ideals from '../../media/bench/ideal.json';
import { benchFiles, benchScenarios } from './bench';

const folder = fileURLToPath(new URL('../../media/bench/', import.meta.url));
const scenarios = benchScenarios();

describe('the sample bench', () => {
  it.each([...benchFiles(scenarios)])('%s is what the generator makes, byte for byte', (name, bytes) => {
    expect(Buffer.compare(readFileSync(folder + name), bytes)).toBe(0);
  });

  it.each(scenarios)('$document reads without a finding', ({ document }) => {
    const { document: read, findings } = readDocument(readFileSync(folder + document, 'utf8'));
    expect(findings).toEqual([]);
    expect(read).not.toBeNull();
  });

  it('has the ideal figures in its README', () => {
    const readme = readFileSync(`${folder}README.md`, 'utf8');
    for (const [document, { idealNmseDb }] of Object.entries(ideals)) {
      const row = readme.split('\n').find((line) => line.startsWith(`| \`${document}\``));
      expect(row).toContain(`${idealNmseDb.toFixed(2)} dB`);
    }
  });

  it('stays below 1.8 MiB', () => {
    const sizes = readdirSync(folder, { withFileTypes: true })
      .filter((entry) => entry.isFile())
      .map(({ name }) => statSync(folder + name).size);
    expect(sizes.reduce((sum, size) => sum + size, 0)).toBeLessThan(1.8 * 1024 * 1024);
  });

  it.each(scenarios)('$document names every recording that is made for it', ({ document, files }) => {
    const { takes } = JSON.parse(readFileSync(folder + document, 'utf8'));
    const named = takes.flatMap((take: { inputs: { file: string }[]; desired: { file: string } }) =>
      [...take.inputs, take.desired].map(({ file }) => file),
    );
    expect(new Set(named)).toEqual(new Set(files.keys()));
  });
});
