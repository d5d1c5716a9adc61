import Ajv2020 from 'ajv/dist/2020';
import { describe, expect, it } from 'vitest';
import { keywords } from '../../../core/document/keywords';
import schema from '../../../media/pairing.schema.json';
import { type Entry, minimal, problems, read, readClean, take } from './documents';

type Schema = { [key: string]: unknown };

const ajv = new Ajv2020({
  allErrors: true,
  strict: true,
  allowUnionTypes: true,
  strictTypes: false,
  strictRequired: false,
});
const valid = ajv.compile(schema);

function resolved(node: Schema): Schema {
  const { $ref, ...own } = node;
  if (typeof $ref !== 'string') return node;
  const target = $ref
    .split('/')
    .slice(1)
    .reduce((at, key) => at[key] as Schema, schema as Schema);
  return { ...resolved(target), ...own };
}

/** Every key of the schema with the path to it, through lists, references and alternatives. */
function keysOf(
  node: Schema,
  path: (string | number)[] = [],
): { path: (string | number)[]; schema: Schema }[] {
  const here = resolved(node);
  const alternatives = (here.anyOf ?? []) as Schema[];
  const properties = Object.entries((here.properties ?? {}) as Record<string, Schema>);
  return [
    ...properties.flatMap(([key, inner]) => [
      { path: [...path, key], schema: resolved(inner) },
      ...keysOf(inner, [...path, key]),
    ]),
    ...(here.items ? keysOf(here.items as Schema, [...path, 0]) : []),
    ...alternatives.flatMap((inner) => keysOf(inner, path)),
  ];
}

const keys = keysOf(schema);

/** A document in full, so that every object that can be there is. */
const full = minimal({
  $schema: 'x',
  title: 'Belt',
  sampleRate: 1,
  takes: [
    take({
      name: 'a',
      fit: [{ from: 0, to: 1, samples: true }],
      heldOut: [{ from: 1, to: 2, samples: false }],
      disturbanceOnly: [{ from: 1, to: 2, samples: false }],
    }),
  ],
  prepare: { removeMean: true, band: { from: 0, to: 1 } },
  filter: {
    length: 1,
    delay: 0,
    regularisation: 0,
    windowing: 'covariance',
    symmetry: 'even',
    fixedGain: { input: 1, frequency: 0, gain: 1 },
  },
  arithmetic: {
    word: 8,
    fractionBits: 1,
    rounding: 'nearest',
    accumulator: 32,
    accumulatorOverflow: 'wrap',
    overflow: 'wrap',
    input: { word: 8, fullScale: [1] },
    output: { word: 8, fullScale: [1] },
    cyclesPerMac: 1,
  },
  write: {
    folder: 'x',
    symbol: 'x',
    languages: ['c'],
    order: 'newest-first',
    testVectors: 1,
    attributes: { cBefore: '', cAfter: '', rust: '' },
  },
  limits: { heldOutNmse: 0, quantisationLoss: 0 },
});

/** The paths of all keys of a value. */
function pathsOf(value: unknown, path: (string | number)[] = []): string[] {
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => {
    const inside = [...path, Array.isArray(value) ? Number(key) : key];
    return [...(Array.isArray(value) ? [] : [inside.join('.')]), ...pathsOf(inner, inside)];
  });
}

describe('the keys of the schema', () => {
  const known = new Set(keys.map(({ path }) => path.join('.')));

  it('are those of the reader', () => {
    const ofReader = new Set([...pathsOf(readClean(full)), 'pairing', '$schema']);
    // One interval may stand for a list of it.
    const withoutLists = [...known].filter((path) => !/(fit|heldOut|disturbanceOnly)\.[a-z]/.test(path));
    expect(withoutLists.sort()).toEqual([...ofReader].sort());
  });

  it('are all in the full document, which both accept', () => {
    expect(pathsOf(full).every((path) => known.has(path))).toBe(true);
    expect(valid(full)).toBe(true);
    readClean(full);
  });

  it('have a sentence each', () => {
    for (const { path, schema: node } of keys) {
      expect(String(node.description), path.join('.')).toMatch(/^[^ ].{5,}\.$/);
      if (!['pairing', '$schema'].includes(String(path[0]))) expect(node.title, path.join('.')).toBeDefined();
    }
  });
});

describe('the defaults of the schema', () => {
  const defaults = readClean(
    minimal({ takes: [{ inputs: [{ file: 'a.wav' }], desired: { file: 'a.wav' } }] }),
  );
  const interval = readClean(minimal({ takes: [take({ fit: [{ from: 0, to: 1 }] })] })).takes[0].fit![0];
  const gain = { frequency: 1, gain: 2 };
  const held = readClean(minimal({ filter: { fixedGain: gain } })).filter.fixedGain!;
  const found = keys.filter(({ schema: node }) => 'default' in node);

  it.each(found.map(({ path, schema: node }) => [path.join('.'), path, node.default]))(
    '%s',
    (_, path: (string | number)[], value) => {
      if (path.at(-1) === 'samples') expect(interval.samples).toBe(value);
      else if (path[1] === 'fixedGain' && path.length > 2) expect(held.input).toBe(value);
      else expect(path.reduce<unknown>((at, key) => (at as Entry)[key], defaults)).toEqual(value);
    },
  );

  it('are there for every key that may be left out, but those that depend on others', () => {
    const without = keys.filter(({ schema: node }) => !('default' in node) && !('properties' in node));
    expect(
      [...new Set(without.map(({ path }) => path.join('.')))].filter((path) => !/\.(from|to)$/.test(path)),
    ).toEqual([
      '$schema',
      'pairing',
      'job',
      'takes',
      'takes.0.name',
      'takes.0.inputs',
      'takes.0.inputs.0.file',
      'takes.0.desired.file',
      'filter.fixedGain.frequency',
      'filter.fixedGain.gain',
      'write.symbol',
    ]);
  });
});

const withTake = (changes: Entry) => minimal({ takes: [take(changes)] });
const withTrack = (desired: unknown) => withTake({ desired });
const hidden = ['\0', '\n', '\u007f', '\u009f', '\u2028', '\u202e', '\u2069'];

/** Values to try at each place, some of which are good there. */
const values: unknown[] = [
  ...[
    null,
    true,
    false,
    [],
    {},
    '',
    ' ',
    'x',
    '1',
    'c',
    'saturate',
    'nearest',
    'float32',
    'cancel',
    '.',
    '..',
  ],
  ...[
    0, 1, -1, 0.5, 2, 7, 8, 16, 24, 32, 33, 62, 63, 64, 65, 1000, 65_536, 65_537, 1e6, 1e7, 1e9, -1e9, 1e10,
  ],
  ...[1e12, 1e13, 1e30, 1e31, 1e-300, 9007199254740991, 9007199254740992],
  ...[
    [1],
    [0],
    [1, 1],
    ['c'],
    ['c', 'c'],
    ['c', 'c-source', 'rs', 'csv', 'npy'],
    ['go'],
    [{}],
    [{ from: 0, to: 1 }],
  ],
  ...[
    { from: 0, to: 1 },
    { from: -1, to: 1 },
    { from: 0.5, to: 1, samples: true },
    { from: 0 },
    { file: 'a' },
  ],
];

function changed(path: (string | number)[], value: unknown): Entry {
  const copy = structuredClone(full);
  const parent = path.slice(0, -1).reduce<Entry>((at, key) => at[key] as Entry, copy);
  parent[path.at(-1)!] = value;
  return copy;
}

/** What the schema cannot say. */
const beyondSchema = new Set([
  'fixed-gain-odd',
  'fixed-gain-input',
  'fraction-bits-too-many',
  'full-scale-count',
  'range-empty',
  'range-reversed',
]);

function readerAccepts(document: Entry): boolean {
  return read(document).findings.every(
    ({ code, severity }) => severity !== 'blocker' || beyondSchema.has(code),
  );
}

describe('schema and reader judge alike', () => {
  it('every value at every place', () => {
    const judged = { good: 0, bad: 0 };
    const paths = new Map(keys.map(({ path }) => [path.join('.'), path]));
    for (const path of paths.values()) {
      // Single intervals are tried below.
      if (
        typeof path.at(-2) === 'string' &&
        ['fit', 'heldOut', 'disturbanceOnly'].includes(String(path.at(-2)))
      )
        continue;
      for (const value of values) {
        const document = changed(path, value);
        const accepted = readerAccepts(document);
        expect(valid(document), `${path.join('.')} ${JSON.stringify(value)} ${problems(document)}`).toBe(
          accepted,
        );
        judged[accepted ? 'good' : 'bad']++;
      }
    }
    expect(judged.good).toBeGreaterThan(300);
    expect(judged.bad).toBeGreaterThan(1000);
  });

  it.each<[string, Entry[]]>([
    ['keys left out', ['pairing', 'job', 'takes', 'title'].map((key) => ({ ...full, [key]: undefined }))],
    [
      'unknown keys',
      [minimal({ x: 1 }), withTake({ x: 1 }), withTrack({ file: 'a', x: 1 }), minimal({ filter: { x: 1 } })],
    ],
    ['takes', [minimal({ takes: Array.from({ length: 1001 }, () => take()) }), minimal({ takes: [{}] })]],
    ['inputs', [64, 65].map((n) => withTake({ inputs: Array.from({ length: n }, () => ({ file: 'a' })) }))],
    [
      'titles',
      [200, 201].flatMap((n) => [minimal({ title: 'x'.repeat(n) }), minimal({ title: '🏭'.repeat(n) })]),
    ],
    [
      'hidden characters',
      hidden.flatMap((c) => [minimal({ title: c }), withTake({ name: c }), withTrack({ file: `a${c}` })]),
    ],
    [
      'files',
      [
        'a',
        './a',
        '../a',
        '/a',
        '//a',
        'C:a',
        'c:\\a',
        'http://a',
        'a:b',
        '1:b',
        './a:b',
        'a\\b',
        'a/',
        'a/.',
        'a/..',
        '...',
      ].map((file) => withTrack({ file })),
    ],
    [
      'folders',
      ['.', '..', 'a/', '/a', 'C:', 'a:b', 'a\\b', '\\', 'ä ö'].map((folder) =>
        minimal({ write: { folder } }),
      ),
    ],
    [
      'symbols',
      [
        'x',
        'X_1',
        '1x',
        '_x',
        'x_',
        'x__y',
        'é',
        'a b',
        'a\n',
        'x'.repeat(63),
        'x'.repeat(64),
        ...keywords,
      ].map((symbol) => minimal({ write: { symbol } })),
    ],
    ['channels', ['a\nb', '', 0, 1, 1.5, null].map((channel) => withTrack({ file: 'a', channel }))],
    [
      'intervals',
      [
        { from: 0, to: 1 },
        { from: 0.5, to: 1.5 },
        { from: 0.5, to: 1.5, samples: true },
        { from: 0, to: 1, samples: true },
        { from: 0, to: 1.5, samples: true },
        { from: -1, to: 1 },
        { from: 0 },
        { to: 1 },
        { from: '0', to: 1 },
        { from: 0, to: 1, samples: 1 },
        [],
        null,
        Array.from({ length: 1001 }, () => ({ from: 0, to: 1 })),
      ].flatMap((interval) => [
        withTake({ fit: interval }),
        withTake({ heldOut: interval }),
        withTake({ disturbanceOnly: interval }),
      ]),
    ],
    [
      'words together',
      [undefined, 8, 'float32'].flatMap((word) =>
        [undefined, 12, 'float64', 'x'].flatMap((signal) => [
          minimal({ arithmetic: { word, input: { word: signal } } }),
          minimal({ arithmetic: { word, output: { word: signal } } }),
        ]),
      ),
    ],
    ['numbers as text', [minimal({ filter: { length: '64' } }), minimal({ sampleRate: '8000' })]],
  ])('%s', (_, documents) => {
    for (const given of documents) {
      const document = JSON.parse(JSON.stringify(given)) as Entry;
      expect(valid(document), `${JSON.stringify(document).slice(0, 300)} ${problems(document)}`).toBe(
        readerAccepts(document),
      );
    }
  });
});
