import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { type FromChild, type Job, peakEvery } from './child';
import { type End, live, type Surroundings } from './life';
import { type FuzzInput, newMaker } from './makeInput';
import { shrink } from './shrink';
import { addTally, newTally, type Tally } from './tally';

/** Inputs `[from, to)` of a seed. */
export interface Run {
  seed: number;
  from: number;
  to: number;
  /** MiB that inputs may take. */
  memory?: number;
  /** A fault put in on purpose. */
  plant?: Job['plant'];
}

export interface Failure {
  seed: number;
  number: number;
  reader: string;
  made: string;
  fault: string;
  /** The input made smaller, in {@link Surroundings.folder}. */
  file: string;
}

export interface Outcome {
  tally: Tally;
  failures: Failure[];
  /** Children that ended early at an input that does no harm alone: what came before it was not let go. */
  restarts: number;
}

/** MiB that inputs of up to a MiB may take, those before them included as far as they are not collected yet. */
export const mostMemory = 200;

/**
 * Runs inputs in child processes, one after the other: a child that hangs is killed, one that crashes is replaced, and
 * the input it was at is tried again alone. Failing inputs are made smaller and written beside a description.
 * @param progress called with what is known so far
 */
export async function runFuzz(
  { seed, from, to, memory = mostMemory, plant = null }: Run,
  surroundings: Surroundings,
  progress: (tally: Tally, failures: readonly Failure[]) => void = () => {},
): Promise<Outcome> {
  mkdirSync(surroundings.folder, { recursive: true });
  const outcome: Outcome = { tally: newTally(), failures: [], restarts: 0 };
  const job = { seed, memory, plant, instead: null };
  const keep = (
    number: number,
    { reader, made }: Omit<FuzzInput, 'bytes'>,
    fault: string,
    bytes: Uint8Array,
  ) => {
    const file = join(surroundings.folder, `${seed}-${number}.${reader}`);
    writeFileSync(file, bytes);
    outcome.failures.push({ seed, number, reader, made, fault, file });
    writeFileSync(`${file}.txt`, `seed ${seed}, input ${number}\n${made}\n${fault}\n`);
  };
  const hear = (message: FromChild) => {
    if (message.kind === 'tally') addTally(outcome.tally, message.tally);
    if (message.kind === 'failure')
      keep(message.number, message.input, message.fault, Buffer.from(message.smaller, 'base64'));
    progress(outcome.tally, outcome.failures);
  };
  for (let next = from; next < to; ) {
    const end = await live({ ...job, from: next, to }, surroundings, hear);
    if (end.kind === 'done') break;
    if (end.number < next) throw new Error(`a child did not start: ${end.fault}`);
    const found = outcome.failures.length;
    for (const number of suspects(end, next)) {
      const one = { ...job, from: number, to: number + 1 };
      const alone = await live(one, surroundings, () => {});
      if (alone.kind === 'done') continue;
      const { bytes, ...input } = newMaker(seed)(number);
      keep(number, input, alone.fault, await smallerBy(one, input, bytes, alone, surroundings));
    }
    if (outcome.failures.length === found) outcome.restarts++;
    next = end.number + 1;
  }
  return outcome;
}

/** Inputs that may have ended a child: memory is not looked at after each. */
function suspects({ kind, number }: Exclude<End, { kind: 'done' }>, from: number): number[] {
  const first = kind === 'memory' ? Math.max(from, number - peakEvery + 1) : number;
  return Array.from({ length: number - first + 1 }, (_, k) => first + k);
}

/** A smaller input with which a child ends in the same way. */
function smallerBy(
  job: Omit<Job, 'progress'>,
  input: Omit<FuzzInput, 'bytes'>,
  bytes: Uint8Array,
  { kind }: End,
  surroundings: Surroundings,
): Promise<Uint8Array> {
  const path = join(surroundings.folder, `attempt-${process.pid}`);
  const fails = async (less: Uint8Array) => {
    writeFileSync(path, less);
    const end = await live({ ...job, instead: { path, input } }, surroundings, () => {});
    return end.kind === kind;
  };
  return shrink(bytes, fails, surroundings.attempts);
}
