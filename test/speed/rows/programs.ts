import { spawnSync } from 'node:child_process';
import { fastEnvironment } from '../python';
import { timed } from '../row';

let peak = 0;

/** Runs a program to its end; remembers its peak memory, as GNU time tells it. */
export function runTimed(command: string, args: string[], folder: string): Promise<number> {
  return timed(() => {
    const { status, stderr } = spawnSync('/usr/bin/time', ['-f', '%M', command, ...args], {
      cwd: folder,
      encoding: 'utf8',
      env: fastEnvironment(),
    });
    if (status !== 0) throw new Error(stderr);
    peak = Number(stderr.trim().split('\n').at(-1)) / 1024;
  });
}

/** Peak memory of the last program, in MiB. */
export function peakOf(): number {
  return peak;
}
