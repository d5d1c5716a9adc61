import type { Dice } from '../dice';
import { hostileSizes } from '../hostile';
import { npyHeader, npyOf } from '../seeds/arrays';
import type { Change } from './bytes';
import { latin1, literalOf } from './literal';

const descrs = [
  "'<f8'",
  "'<f4'",
  "'>f8'",
  "'=f4'",
  "'|f4'",
  "'<i1'",
  "'|i1'",
  "'<i2'",
  "'>i4'",
  "'|u1'",
  "'<u2'",
  "'>u4'",
  "'<f2'",
  "'<f16'",
  "'<c8'",
  "'<i8'",
  "'|b1'",
  "'|O'",
  "'|S5'",
  "'<U3'",
  "'<M8[ns]'",
  "'f8'",
  "''",
  "'<'",
  "'<constructor'",
  "[('a', '<f4')]",
  'None',
  '8',
  '{}',
  "u'<f8'",
  '"<f8"',
  "'<f8\\''",
  "'<f8",
  `'${'<f8'.repeat(500)}'`,
];

const shapes = [
  '(0,)',
  '(1,)',
  '(2,)',
  '()',
  '(0, 0)',
  '(0, 5)',
  '(5, 0)',
  '(1, 1)',
  '(2, 2)',
  '(2, 1)',
  '(1, 2)',
  '(3, 4, 5)',
  '(-1, 4)',
  '(1024, 1)',
  '(1, 1024)',
  '(1025, 1025)',
  '(1024, 1024)',
  '(1024, 1025)',
  '(1000000, 1024)',
  '(5L,)',
  '[10, 2]',
  '(10)',
  '10',
  '(1e3,)',
  '(1.5,)',
  '(None,)',
  '(True, False)',
  '((1, 2), 3)',
  "('5',)",
  '(1,,2)',
  '(1 2)',
  '(1',
  '(999999999999999,)',
  '(9999999999999999,)',
  '(00010, 2)',
  '(+1, 2)',
];

const orders = ['True', 'False', 'None', '0', "'True'", 'true', 'Truely', '()'];

/** Header, samples and version of an NPY file that may be broken already. */
function piecesOf(bytes: Uint8Array): { header: string; samples: Uint8Array; version: number } {
  const version = bytes[6] ?? 1;
  const from = version === 1 ? 10 : 12;
  const end = bytes.indexOf(10, from) + 1 || Math.min(bytes.length, from + 118);
  return { header: latin1(bytes.subarray(from, end)), samples: bytes.slice(end), version };
}

function ofHeader(change: (header: string, dice: Dice) => string): Change<Uint8Array> {
  return (bytes, dice) => {
    const { header, samples, version } = piecesOf(bytes);
    return npyOf(change(header, dice), samples, version);
  };
}

export const arrayChanges: Record<string, Change<Uint8Array>> = {
  descr: ofHeader((header, dice) =>
    header.replace(/'descr': ('[^']*'|[^,]*)/, () => `'descr': ${dice.one(descrs)}`),
  ),
  shape: ofHeader((header, dice) =>
    header.replace(
      /'shape': (\([^)]*\)|[^,]*)/,
      () => `'shape': ${dice.onceIn(3) ? sizes(dice) : dice.one(shapes)}`,
    ),
  ),
  order: ofHeader((header, dice) => header.replace(/True|False/, () => dice.one(orders))),
  key: ofHeader((header, dice) =>
    header.replace(dice.one(["'descr'", "'shape'", "'fortran_order'"]), () =>
      dice.one(["'__proto__'", "'shape'", "'descr'", "''", 'None', "'x': 1, 'shape'", "u'descr'"]),
    ),
  ),
  literal: ofHeader((_, dice) => `${literalOf(dice)}\n`),
  'all anew'(bytes, dice) {
    const { samples } = piecesOf(bytes);
    const header = npyHeader(
      dice.one(descrs.slice(0, 12)),
      dice.one(['True', 'False']),
      fitting(samples.length, dice),
    );
    return npyOf(header, samples, dice.one([1, 1, 2, 3]));
  },
  version: (bytes, dice) => {
    const { header, samples } = piecesOf(bytes);
    return npyOf(header, samples, dice.one([0, 1, 2, 3, 4, 255]));
  },
  'header length': (bytes, dice) => {
    const { header, samples, version } = piecesOf(bytes);
    return npyOf(
      header,
      samples,
      version,
      dice.one([...hostileSizes, header.length - 1, header.length + 1, samples.length]),
    );
  },
  padding: ofHeader((header, dice) => `${header}${' '.repeat(dice.onceIn(8) ? 65_500 : dice.size(300))}`),
};

function sizes(dice: Dice): string {
  return dice.onceIn(3)
    ? `(${dice.one(hostileSizes)},)`
    : `(${dice.one(hostileSizes)}, ${dice.one(hostileSizes)})`;
}

/** A shape of about as many bytes as there are. */
function fitting(bytes: number, dice: Dice): string {
  const columns = 1 + dice.size(1100);
  const rows = Math.floor(bytes / columns / dice.one([1, 2, 4, 8]));
  return dice.onceIn(2) ? `(${rows}, ${columns})` : `(${columns}, ${rows})`;
}
