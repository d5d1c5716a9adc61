import { normals } from '../../support/random';
import { encoded } from '../../support/textBytes';
import { benchLines } from './benchFiles';
import { type Seed, textSeed } from './seed';

const values = normals(21, 600);

/** Rows of three numbers below whatever stands above them. */
function rows(above: string, count: number, row: (n: number, numbers: string[]) => string): string {
  const lines = Array.from({ length: count }, (_, n) =>
    row(
      n,
      [values[3 * n], values[3 * n + 1], values[3 * n + 2]].map((value) => value.toFixed(5)),
    ),
  );
  return `${above}${lines.join('\n')}\n`;
}

/** Texts of several dialects: separators, decimal signs, headers, units, times, comments, encodings. */
export function textSeeds(): Seed[] {
  const plain = rows('a,b,c\n', 80, (_, numbers) => numbers.join(','));
  const comma = rows('Zeit;Kraft;Weg\n[ms];[N];[mm]\n', 90, (n, numbers) =>
    [n * 0.5, ...numbers.slice(0, 2)].join(';').replaceAll('.', ','),
  );
  return [
    textSeed('slow.csv', benchLines('slow.csv', 120)),
    textSeed('valve.csv', benchLines('valve.csv', 120)),
    textSeed('plain', plain),
    textSeed('decimal comma', comma),
    textSeed(
      'tabs',
      rows('', 100, (n, numbers) => [n, ...numbers].join('\t')),
    ),
    textSeed(
      'blanks',
      rows('# rig 4\n% run 2\n\n', 60, (_, numbers) => `  ${numbers.join('   ')}`),
    ),
    textSeed(
      'timestamps',
      rows('time,a,b,c\r\n', 50, (n, numbers) =>
        [`2024-03-31 01:59:${String(10 + Math.floor(n / 2))}.${n % 2}00`, ...numbers].join(','),
      ),
    ),
    textSeed(
      'quoted',
      rows('"t (s)","x, raw","y ""2"""\n', 40, (n, numbers) => `"${n / 100}","${numbers[0]}",${numbers[1]}`),
    ),
    textSeed(
      'one column',
      `${Array.from(values.subarray(0, 200), (value) => value.toExponential(8)).join('\n')}`,
    ),
    textSeed(
      'index',
      rows(',a,b,c\n', 70, (n, numbers) => [n, ...numbers].join(',')),
    ),
    { name: 'UTF-16 LE', bytes: encoded(plain, 'utf-16le', true) },
    { name: 'UTF-16 BE without mark', bytes: encoded(plain, 'utf-16be') },
    { name: 'UTF-8 with mark', bytes: encoded(comma, 'utf-8', true) },
  ];
}
