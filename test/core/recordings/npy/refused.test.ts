import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { openNpy } from '../../../../core/recordings/npy/openNpy';
import { needs, python } from '../../../support/programs';
import { joined, little, strictSource } from '../../../support/wavBytes';

// The format: NumPy Enhancement Proposal 1.

const samples = new Uint8Array(Float64Array.of(1.5, -2.5, 3.5, 4.5, 5.5, 6.5).buffer);
const npy = (header: string, version = 1, content = samples) =>
  joined('\x93NUMPY', little(1, version, 0), little(version === 1 ? 2 : 4, header.length), header, content);
const open = (bytes: Uint8Array) => openNpy(strictSource(bytes), 'a.npy');

async function refusal(bytes: Uint8Array) {
  const { recording, findings } = await open(bytes);
  expect(recording).toBeNull();
  expect(findings.length).toBeGreaterThan(0);
  for (const found of findings) expect(found).toMatchObject({ severity: 'blocker', file: 'a.npy' });
  return { code: findings[0].code, what: String(findings[0].values.what) };
}

const there = needs('scipy');

/** What NumPy expressions give, the code of the refusal and what it says. */
const arrays: [expression: string, code: string, said: string][] = [
  ['numpy.zeros(9, "c8")', 'unsupported-dtype', 'c8'],
  ['numpy.zeros(9, "c16")', 'unsupported-dtype', 'c16'],
  ['numpy.zeros(9, "i8")', 'unsupported-dtype', 'i8'],
  ['numpy.zeros(9, "u8")', 'unsupported-dtype', 'u8'],
  ['numpy.zeros(9, "f2")', 'unsupported-dtype', 'f2'],
  ['numpy.zeros(9, bool)', 'unsupported-dtype', 'b1'],
  ['numpy.zeros(9, "S5")', 'unsupported-dtype', 'S5'],
  ['numpy.zeros(9, "U5")', 'unsupported-dtype', 'U5'],
  ['numpy.zeros(9, "M8[ns]")', 'unsupported-dtype', 'M8[ns]'],
  ['numpy.array([1, "a", None] * 3, dtype=object)', 'unsupported-dtype', '|O'],
  ['numpy.zeros(9, [("x", "f8"), ("y", "<i4", (2,))])', 'unsupported-dtype', 'structured'],
  ['numpy.zeros(9, [("größe €", "f8")])', 'unsupported-dtype', 'structured'],
  ['numpy.zeros((4, 3, 2))', 'unsupported-dtype', '3 dimensions'],
  ['numpy.float64(3)', 'unsupported-dtype', '0 dimensions'],
  ['numpy.zeros(0)', 'too-short', ''],
  ['numpy.zeros(1)', 'too-short', ''],
  ['numpy.zeros((1, 1))', 'too-short', ''],
  ['numpy.zeros((5, 0))', 'unreadable-header', '0 channels'],
  ['numpy.zeros((0, 5))', 'unreadable-header', '0 channels'],
  ['numpy.zeros((1026, 1025), "i1")', 'unreadable-header', '1025 channels'],
];

/** Saves them all and prints the files in base 64. */
const script = `
import base64, io, json, numpy, sys
for expression in json.loads(sys.argv[1]):
    out = io.BytesIO()
    numpy.save(out, eval(expression))
    print(base64.b64encode(out.getvalue()).decode())`;

describe.skipIf(!there)('arrays of NumPy that are not read', () => {
  const expressions = JSON.stringify(arrays.map(([expression]) => expression));
  const args = ['-W', 'ignore', '-c', script, expressions];
  const saved = there
    ? execFileSync(python, args, { maxBuffer: 1 << 24 })
        .toString()
        .split('\n')
    : [];

  it.each(arrays.map((row, n) => [...row, n] as const))('%s', async (_, code, said, n) => {
    const found = await refusal(new Uint8Array(Buffer.from(saved[n], 'base64')));
    expect(found.code).toBe(code);
    expect(found.what).toContain(said);
  });
});

describe('headers that others write', () => {
  it.each([
    ['by the rules', "{'descr': '<f8', 'fortran_order': False, 'shape': (3, 2), }   \n"],
    ['in another order, without blanks', "{'shape':(3,2),'fortran_order':False,'descr':'<f8'}"],
    ['with double quotes', '{"descr": "<f8", "fortran_order": False, "shape": (3, 2)}'],
    ['by Python 2', "{'descr': '<f8', 'fortran_order': False, 'shape': (3L, 2L), }\n"],
    ['with one more key', "{'descr': '<f8', 'more': [1, None], 'fortran_order': False, 'shape': (3, 2)}"],
    ['with the type of the machine', "{'descr': '=f8', 'fortran_order': False, 'shape': (3, 2)}"],
  ])('%s', async (_, header) => {
    for (const version of [1, 2, 3]) {
      const { recording, findings } = await open(npy(header, version));
      expect(findings).toEqual([]);
      const planes = await recording?.read([0, 1], 0, 3);
      expect(planes?.map((plane) => Array.from(plane))).toEqual([
        [1.5, 3.5, 5.5],
        [-2.5, 4.5, 6.5],
      ]);
    }
  });
});

describe('the length of a header', () => {
  const header = "{'descr': '<f8', 'fortran_order': False, 'shape': (6,)}";

  it('may be all of 64 KiB', async () => {
    const { recording } = await open(npy(header.padEnd(65536), 2));
    expect((await recording?.read([0], 4, 6))?.[0]).toEqual(Float64Array.of(5.5, 6.5));
  });

  it('may not be more', async () => {
    expect((await refusal(npy(header.padEnd(65537), 2))).what).toContain('65537');
  });
});

describe('the letters of a header', () => {
  const header = "{'descr': 'größe', 'fortran_order': False, 'shape': (6,)}";
  const utf8 = Buffer.from(header).toString('latin1');
  it.each([
    [1, header],
    [2, header],
    [3, utf8],
  ])('are those of version %i', async (version, text) => {
    expect((await refusal(npy(text, version))).what).toContain('größe');
  });
});

describe('headers that cannot be read', () => {
  const rest = "'fortran_order': False, 'shape': (3, 2)";
  it.each([
    ['no type', `{${rest}}`, 'unsupported-dtype'],
    ['an unknown type', `{'descr': '<q8', ${rest}}`, 'unsupported-dtype'],
    ['the name of a method for a type', `{'descr': 'constructor', ${rest}}`, 'unsupported-dtype'],
    ['no order', "{'descr': '<f8', 'shape': (3, 2)}", 'unreadable-header'],
    ['a number for an order', "{'descr': '<f8', 'fortran_order': 0, 'shape': (3, 2)}", 'unreadable-header'],
    ['no shape', "{'descr': '<f8', 'fortran_order': False}", 'unreadable-header'],
    ['a number for a shape', "{'descr': '<f8', 'fortran_order': False, 'shape': 6}", 'unreadable-header'],
    ['a negative axis', "{'descr': '<f8', 'fortran_order': False, 'shape': (-6,)}", 'unreadable-header'],
    ['half an axis', "{'descr': '<f8', 'fortran_order': False, 'shape': (1.5, 2)}", 'unreadable-header'],
    ['no end', `{'descr': '<f8', ${rest}`, 'unreadable-header'],
    ['a call', "dict(descr='<f8')", 'unreadable-header'],
    ['a list', "['<f8', False, (3, 2)]", 'unreadable-header'],
    ['nothing', '', 'unreadable-header'],
    ['a depth that no header has', `${'['.repeat(5000)}`, 'unreadable-header'],
  ])('%s', async (_, header, code) => {
    expect((await refusal(npy(header))).code).toBe(code);
  });

  it.each([
    ['version 0', npy('{}', 0)],
    ['version 4', npy('{}', 4)],
    ['only the magic', joined('\x93NUMPY')],
    ['a header longer than the file', npy('{}').slice(0, 12).fill(9, 8, 9)],
    ['a header of 4 GiB', joined('\x93NUMPY\x02\0', little(4, 0xffffffff), '{}')],
  ])('%s', async (_, bytes) => {
    expect((await refusal(bytes)).code).toBe('unreadable-header');
  });
});
