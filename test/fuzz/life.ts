import { fork } from 'node:child_process';
import { readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import type { FromChild, Job } from './child';

/** How a child process ended, and the input it was at where that was not the end of its work. */
export type End = { kind: 'done' } | { kind: 'hang' | 'crash' | 'memory'; number: number; fault: string };

/** A child that has been at one input for so long is ended. */
export const longestInput = 10_000;

/** A child that has not begun after so long, its files made, is ended too. */
const longestStart = 60_000;

/** V8's heap ends before the machine's memory does; its young part is small, as what waits to be collected is not held. */
const limits = ['--max-old-space-size=176', '--max-semi-space-size=4'];

/** Everything about running a child but its inputs. */
export interface Surroundings {
  /** The bundle that is this program. */
  bundle: string;
  /** Where files are put. */
  folder: string;
  /** Milliseconds an input may take. */
  patience: number;
  /** Children at most that make an input smaller which hangs or crashes. */
  attempts: number;
}

let lives = 0;

/** What {@link beatOf} gives before the first input, as one text. */
const notBegun = '-1,0';

/** Runs a child to its end, or ends it where it hangs. */
export function live(
  job: Omit<Job, 'progress'>,
  { bundle, folder, patience }: Omit<Surroundings, 'attempts'>,
  hear: (message: FromChild) => void,
): Promise<End> {
  const progress = join(folder, `progress-${process.pid}-${lives++}`);
  const child = fork(bundle, ['child', JSON.stringify({ ...job, progress } satisfies Job)], {
    execArgv: limits,
    stdio: ['ignore', 'inherit', 'pipe', 'ipc'],
  });
  let complaint = '';
  child.stderr?.on('data', (data) => {
    complaint = `${complaint}${data}`.slice(0, 2000);
  });
  let end: End | null = null;
  child.on('message', (message: FromChild) => {
    hear(message);
    if (message.kind !== 'memory') return;
    const fault = `inputs took ${Math.round(message.peak)} MiB`;
    end = { kind: 'memory', number: message.number, fault };
  });
  let seen = notBegun;
  let since = performance.now();
  const watch = setInterval(() => {
    const now = beatOf(progress).join();
    if (now !== seen) {
      seen = now;
      since = performance.now();
    } else if (performance.now() - since > (seen === notBegun ? longestStart : patience) && end === null) {
      end = { kind: 'hang', number: beatOf(progress)[0], fault: `no end after ${patience} ms` };
      child.kill('SIGKILL');
    }
  }, patience / 20);
  return new Promise((resolve, reject) => {
    child.on('error', reject);
    child.on('close', (code, signal) => {
      clearInterval(watch);
      const [number] = beatOf(progress);
      rmSync(progress, { force: true });
      const crash: End = { kind: 'crash', number, fault: `ended with ${code ?? signal}: ${complaint}` };
      resolve(end ?? (code === 0 ? { kind: 'done' } : crash));
    });
  });
}

/** Number of the input that a child is at, and of the attempt. */
function beatOf(progress: string): [number: number, attempt: number] {
  try {
    const bytes = readFileSync(progress);
    return bytes.length < 16 ? [-1, 0] : [bytes.readDoubleLE(0), bytes.readDoubleLE(8)];
  } catch {
    return [-1, 0];
  }
}
