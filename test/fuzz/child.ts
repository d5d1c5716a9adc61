import { openSync, readFileSync, writeSync } from 'node:fs';
import { type FuzzInput, type MakeInput, newMaker } from './makeInput';
import { type Planted, planted } from './planted';
import { alike, shrink } from './shrink';
import { countCodes, newTally, type Tally } from './tally';
import { tryInput } from './tryInput';

/** What a child process is to do; comes as JSON on its command line. */
export interface Job {
  seed: number;
  from: number;
  to: number;
  /** File in which the child says, before each attempt, which input it is at and how many attempts there were. */
  progress: string;
  /** MiB that the process may ever hold beside what it held before the first input. */
  memory: number;
  plant: { at: number; what: Planted } | null;
  /** An input from a file in place of those of the seed, alone. */
  instead: { path: string; input: Omit<FuzzInput, 'bytes'> } | null;
}

export type FromChild =
  | { kind: 'tally'; tally: Tally }
  | { kind: 'failure'; number: number; fault: string; input: Omit<FuzzInput, 'bytes'>; smaller: string }
  | { kind: 'memory'; number: number; peak: number };

/** Inputs between two reports. */
const reportEvery = 1000;

/** Inputs between two looks at the largest memory, which cost more than many an input. */
export const peakEvery = 8;

/** A measure of the MiB that this process held at most, beside what it holds now. */
function newPeak(): () => number {
  const before = process.memoryUsage.rss() / 2 ** 20;
  return () => process.resourceUsage().maxRSS / 1024 - before;
}

/** Tries inputs one after the other, reports failures, and ends early where the process holds too much memory. */
export async function runChild(job: Job): Promise<void> {
  const beat = heart(job.progress);
  const make = job.instead === null ? newMaker(job.seed) : fromFile(job.instead);
  const peak = newPeak();
  let tally = newTally();
  for (let number = job.from; number < job.to; number++) {
    beat(number);
    const input = make(number);
    const start = performance.now();
    const attempt = async (bytes: Uint8Array) => {
      if (job.plant?.at === number) planted[job.plant.what]();
      return tryInput({ ...input, bytes });
    };
    let fault: string | null = null;
    try {
      countCodes(tally, input.reader, await attempt(input.bytes));
    } catch (error) {
      fault = faultIn(error);
    }
    const milliseconds = performance.now() - start;
    if (fault !== null) await send(await failureOf(input, number, fault, attempt, () => beat(number)));
    tally.inputs++;
    tally.bytes += input.bytes.length;
    if (number % peakEvery === 0 || number + 1 === job.to) tally.peak = Math.max(tally.peak, peak());
    if (milliseconds > tally.slowest.milliseconds) {
      tally.slowest = { number, milliseconds, bytes: input.bytes.length };
    }
    const full = tally.peak > job.memory;
    if (full || tally.inputs === reportEvery || number + 1 === job.to) {
      await send({ kind: 'tally', tally });
      tally = newTally();
    }
    if (full) return send({ kind: 'memory', number, peak: peak() });
  }
}

/** Writes the number of the input and of the attempt, so that whoever watches sees that something goes on. */
function heart(path: string): (number: number) => void {
  const file = openSync(path, 'w');
  const values = new Float64Array(2);
  return (number) => {
    values[0] = number;
    values[1]++;
    writeSync(file, values, 0, values.byteLength, 0);
  };
}

function fromFile({ path, input }: NonNullable<Job['instead']>): MakeInput {
  const bytes = new Uint8Array(readFileSync(path));
  return () => ({ ...input, bytes });
}

function faultIn(error: unknown): string {
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}

async function failureOf(
  { bytes, ...input }: FuzzInput,
  number: number,
  fault: string,
  attempt: (bytes: Uint8Array) => Promise<unknown>,
  beat: () => void,
): Promise<FromChild> {
  const smaller = await shrink(bytes, async (less) => {
    beat();
    try {
      await attempt(less);
      return false;
    } catch (error) {
      return alike(faultIn(error)) === alike(fault);
    }
  });
  return { kind: 'failure', number, fault, input, smaller: Buffer.from(smaller).toString('base64') };
}

function send(message: FromChild): Promise<void> {
  return new Promise((resolve) => process.send!(message, () => resolve()));
}
