import { type Job, jobs, type Word } from '../document/pairingDocument';
import { finding, Refusal } from '../findings/finding';

/** What is needed of a `NAME.taps.json` to check it and to apply it. */
export interface TapsFile {
  document: { file: string; sha256: string };
  job: Job;
  /** Hz. */
  sampleRate: number;
  inputs: string[];
  desired: string;
  /** Δ in samples. */
  delay: number;
  recordings: { file: string; sha256: string }[];
  /** One row an input, newest-first. */
  coefficients: Float64Array[];
  means: { inputs: number[]; desired: number };
  heldOutNmseDb: number | null;
  arithmetic: {
    word: Word;
    fractionBits: number | null;
    values: Float64Array[];
    heldOutNmseDb: number | null;
  };
  /** SHA-256 of the other files written, by their path from this file's folder. */
  files: Record<string, string>;
}

/**
 * Reads a taps file.
 * @throws Refusal `not-taps` where a key is missing or of another kind than expected
 */
export function readTaps(text: string, file: string): TapsFile {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    throw refusal(file, 'it is not JSON');
  }
  const root = new Reader(value, '', file);
  root.key('taps').oneOf([1]);
  const arithmetic = root.key('arithmetic');
  const taps: TapsFile = {
    document: {
      file: root.key('document').key('file').text(),
      sha256: root.key('document').key('sha256').text(),
    },
    job: root.key('job').oneOf(jobs),
    sampleRate: root.key('sampleRate').number(),
    inputs: root.key('inputs').list((item) => item.text()),
    desired: root.key('desired').text(),
    delay: root.key('filter').key('delay').number(),
    recordings: root
      .key('recordings')
      .list((item) => ({ file: item.key('file').text(), sha256: item.key('sha256').text() })),
    coefficients: root.key('coefficients').rows(),
    means: {
      inputs: root
        .key('means')
        .key('inputs')
        .list((item) => item.number()),
      desired: root.key('means').key('desired').number(),
    },
    heldOutNmseDb:
      root.key('heldOut').value === null ? null : root.key('heldOut').key('nmseDb').numberOrNull(),
    arithmetic: {
      word: arithmetic.key('word').oneOf([8, 12, 16, 24, 32, 'float32', 'float64'] as const),
      fractionBits: arithmetic.key('fractionBits').numberOrNull(),
      values: arithmetic.key('values').rows(),
      heldOutNmseDb: arithmetic.key('heldOutNmseDb').numberOrNull(),
    },
    files: root.key('files').texts(),
  };
  checkShapes(taps, file);
  return taps;
}

function checkShapes({ coefficients, arithmetic, inputs, means, delay }: TapsFile, file: string): void {
  const length = coefficients[0]?.length ?? 0;
  const even = (rows: Float64Array[]) =>
    rows.length === inputs.length && rows.every((row) => row.length === length);
  if (
    length === 0 ||
    !even(coefficients) ||
    !even(arithmetic.values) ||
    means.inputs.length !== inputs.length
  ) {
    throw refusal(
      file,
      'inputs, means, coefficients and values do not have the same numbers of rows and taps',
    );
  }
  if (!Number.isInteger(delay))
    throw refusal(file, `"filter.delay" is ${delay} when expected a whole number`);
}

function refusal(file: string, why: string): Refusal {
  return new Refusal([finding('not-taps', { why }, { file })]);
}

/** A value of the file and the keys that lead to it, for complaints. */
class Reader {
  constructor(
    readonly value: unknown,
    private readonly path: string,
    private readonly file: string,
  ) {}

  key(name: string): Reader {
    const inside =
      typeof this.value === 'object' && this.value !== null && Object.hasOwn(this.value, name)
        ? (this.value as Record<string, unknown>)[name]
        : undefined;
    return new Reader(inside, this.path === '' ? name : `${this.path}.${name}`, this.file);
  }

  text(): string {
    return typeof this.value === 'string' ? this.value : this.fail('a text');
  }

  number(): number {
    return typeof this.value === 'number' ? this.value : this.fail('a number');
  }

  numberOrNull(): number | null {
    return this.value === null ? null : this.number();
  }

  oneOf<T>(choices: readonly T[]): T {
    const found = choices.find((choice) => choice === this.value);
    return found ?? this.fail(choices.length === 1 ? `${choices[0]}` : `one of ${choices.join(', ')}`);
  }

  list<T>(item: (reader: Reader) => T): T[] {
    if (!Array.isArray(this.value)) return this.fail('a list');
    return this.value.map((entry, i) => item(new Reader(entry, `${this.path}[${i}]`, this.file)));
  }

  rows(): Float64Array[] {
    return this.list((row) => Float64Array.from(row.list((item) => item.number())));
  }

  texts(): Record<string, string> {
    if (typeof this.value !== 'object' || this.value === null || Array.isArray(this.value))
      return this.fail('an object');
    return Object.fromEntries(Object.keys(this.value).map((name) => [name, this.key(name).text()]));
  }

  private fail(expected: string): never {
    throw refusal(
      this.file,
      `"${this.path}" is ${this.value === undefined ? 'missing' : JSON.stringify(this.value)?.slice(0, 60)} when expected ${expected}`,
    );
  }
}
