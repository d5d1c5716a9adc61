import { join } from 'node:path';
import { type Job, runChild } from './child';
import { longestInput } from './life';
import { runFuzz } from './runFuzz';
import type { Tally } from './tally';

// `npm run fuzz -- [inputs] [seed] [first]`: hostile inputs for every reader, in a child process that is this file again.

/** Children at most that make an input smaller. */
const mostAttempts = 12;

const grouped = (value: number) => value.toLocaleString('en');

function shown({ inputs, bytes, peak, slowest }: Tally, seconds: number): string {
  const rate = Math.round(inputs / seconds);
  const slow = `${slowest.milliseconds.toFixed(0)} ms for input ${slowest.number} of ${grouped(slowest.bytes)} bytes`;
  return `${grouped(rate)} inputs/s, ${(bytes / 1e6).toFixed(0)} MB, peak memory ${peak.toFixed(0)} MiB, slowest ${slow}`;
}

async function main(): Promise<void> {
  if (process.argv[2] === 'child') {
    // Whoever started this is gone: nobody would hear of a failure.
    process.on('disconnect', () => process.exit());
    await runChild(JSON.parse(process.argv[3]) as Job);
    process.disconnect();
    return;
  }
  const [inputs = 1_000_000, seed = Date.now() % 1_000_000_000, first = 0] = process.argv
    .slice(2)
    .map(Number);
  console.log(`seed ${seed}, inputs ${grouped(first)} to ${grouped(first + inputs - 1)}`);
  const start = performance.now();
  const seconds = () => (performance.now() - start) / 1000;
  let told = 0;
  const surroundings = {
    bundle: process.argv[1],
    folder: join('out', 'fuzz'),
    patience: longestInput,
    attempts: mostAttempts,
  };
  const run = { seed, from: first, to: first + inputs };
  const { tally, failures, restarts } = await runFuzz(run, surroundings, (sofar, failed) => {
    if (sofar.inputs < told + inputs / 20) return;
    told = sofar.inputs;
    console.log(`${grouped(sofar.inputs)} inputs, ${failed.length} failures, ${shown(sofar, seconds())}`);
  });
  for (const name of Object.keys(tally.codes).sort())
    console.log(`${grouped(tally.codes[name]).padStart(11)}  ${name}`);
  for (const { number, made, fault, file } of failures) {
    console.log(`\nFAILURE seed ${seed}, input ${number} (${made})\n${file}\n${fault}`);
  }
  console.log(`\nseed ${seed}, ${seconds().toFixed(0)} s, ${shown(tally, seconds())}`);
  if (restarts > 0) console.log(`${restarts} times memory was not let go between inputs`);
  console.log(`${grouped(inputs)} inputs, ${grouped(failures.length)} failures`);
  process.exitCode = failures.length + restarts > 0 ? 1 : 0;
}

void main();
