import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { needs, python } from '../../../support/programs';
import { readText } from '../../../support/textBytes';

// Reference: pandas.DataFrame.to_csv writes, pandas.read_csv reads (float_precision="round_trip", its only exact parser).

let folder = '';
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'text-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

/** Runs a script in which `d` is a frame of 3,000 rows with holes; it writes `x.csv` and its channels to `x.f64`. */
function written(script: string): { bytes: Uint8Array; reference: Float64Array } {
  const start = `
import numpy as np, pandas as pd
r = np.random.default_rng(11)
d = pd.DataFrame(r.standard_normal((3000, 3)) * [1e-7, 1, 1e9], columns=["a", "b (m/s²)", "c, left"])
d.loc[r.integers(1, 3000, 50), "b (m/s²)"] = np.nan
d.iloc[5] = [np.inf, -np.inf, 0]
t = np.arange(3000)
def read(**options): return pd.read_csv("x.csv", float_precision="round_trip", **options)
def keep(frame): np.ascontiguousarray(frame.to_numpy(dtype=float)).tofile("x.f64")
`;
  execFileSync(python, ['-c', start + script], { cwd: folder });
  const load = (name: string) => new Uint8Array(readFileSync(join(folder, name)));
  return { bytes: load('x.csv'), reference: new Float64Array(load('x.f64').slice().buffer) };
}

const names = ['a', 'b (m/s²)', 'c, left'];

async function expectSame(script: string, channels: (string | null)[] = names) {
  const { bytes, reference } = written(script);
  const read = await readText(bytes);
  expect(read.recording.channels).toEqual(channels);
  expect(read.recording.samples).toBe(reference.length / channels.length);
  read.values.forEach((plane, c) => {
    const wrong = plane.findIndex((value, n) => !Object.is(value, reference[n * channels.length + c]));
    expect(wrong).toBe(-1);
  });
  expect((await readText(bytes, 0)).values).toEqual(read.values);
  return read;
}

describe.skipIf(!needs('pandas'))('against pandas', () => {
  it.each([
    ['as it stands', '', '', ''],
    ['semicolons and the decimal comma', 'sep=";", decimal=","', 'sep=";", decimal=","', ''],
    ['tabs and UTF-16', 'sep="\\t", encoding="utf-16"', 'sep="\\t", encoding="utf-16"', ''],
    [
      'decimal comma and UTF-16',
      'sep=";", decimal=",", encoding="utf-16"',
      'sep=";", decimal=",", encoding="utf-16"',
      '',
    ],
    ['a UTF-8 mark', 'encoding="utf-8-sig"', 'encoding="utf-8-sig"', ''],
    ['CR LF', 'lineterminator="\\r\\n"', '', ''],
    ['everything quoted', 'quoting=1', '', ''],
    ['a float format', 'float_format="%.5e"', '', ''],
    ['nan in words', 'na_rep="nan"', '', ''],
  ])('reads to_csv, %s', async (_, save, load) => {
    const script = `d.to_csv("x.csv", index=False, ${save})\nkeep(read(${load}))`;
    const { codes } = await expectSame(script);
    expect(codes).toEqual([]);
  });

  it('takes the index for none of the channels', async () => {
    const { recording, codes } = await expectSame('d.to_csv("x.csv")\nkeep(read(index_col=0))');
    expect(recording.sampleRate).toBeNull();
    expect(codes).toEqual([]);
  });

  it('reads an index of dates and times', async () => {
    const { recording, codes } = await expectSame(
      'd.index = pd.date_range("2024-02-28 23:59:59", periods=3000, freq="125us")\nd.to_csv("x.csv")\nkeep(read(index_col=0))',
    );
    expect(recording.sampleRate).toBe(8000);
    expect(codes).toEqual([]);
  });

  it.each([1000, 44100])('reads an index of times at %d Hz', async (rate) => {
    const script = `d.index = pd.Index(t / ${rate}, name="time")\nd.to_csv("x.csv")\nkeep(read(index_col=0))`;
    const { recording, codes } = await expectSame(script);
    expect(Math.abs(rate / recording.sampleRate! - 1)).toBeLessThan(1e-10);
    expect(codes).toEqual([]);
  });

  it('reads an array with the column numbers and the index that to_csv adds', async () => {
    const script = 'pd.DataFrame(d.to_numpy()).to_csv("x.csv")\nkeep(read(index_col=0))';
    await expectSame(script, ['0', '1', '2']);
  });

  it('reads no header', async () => {
    const script = 'd.to_csv("x.csv", index=False, header=False)\nkeep(read(header=None))';
    await expectSame(script, [null, null, null]);
  });
});
