import { type ChildProcess, spawn } from 'node:child_process';
import { join } from 'node:path';
import { createInterface, type Interface } from 'node:readline';
import { python } from '../support/programs';

/** Variables that make OpenBLAS choose slow kernels or threads: the reference runs at its best. */
const slowing = ['OPENBLAS_CORETYPE', 'OPENBLAS_NUM_THREADS', 'OMP_NUM_THREADS', 'MKL_NUM_THREADS'];

export function fastEnvironment(): NodeJS.ProcessEnv {
  const environment = { ...process.env };
  for (const name of slowing) delete environment[name];
  return environment;
}

/** The folder of these scripts, from the project's root, where npm runs the benchmark. */
export const scripts = join('test', 'speed');

let child: ChildProcess | null = null;
let lines: Interface | null = null;

/** Has the reference do a row once; returns its seconds. The process stays and keeps the row's data. */
export async function runReference(name: string, folder: string): Promise<number> {
  if (child === null || lines === null) {
    child = spawn(python, [join(scripts, 'reference.py'), folder], {
      stdio: ['pipe', 'pipe', 'inherit'],
      env: fastEnvironment(),
    });
    if (child.stdout === null) throw new Error('no output of the reference');
    lines = createInterface({ input: child.stdout });
  }
  const own = child;
  const answer = new Promise<string>((resolve, reject) => {
    const ended = () => reject(new Error(`the reference ended during ${name}`));
    own.once('exit', ended);
    lines?.once('line', (line) => {
      own.off('exit', ended);
      resolve(line);
    });
  });
  own.stdin?.write(`${name}\n`);
  return Number(await answer);
}

/** Ends the reference, so that its memory is free. */
export function endReference(): void {
  child?.removeAllListeners('exit');
  child?.kill();
  child = null;
  lines = null;
}
