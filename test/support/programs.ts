import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';

/** How each outside program is found; Debian's packages of the same names bring them. */
const probes = {
  sox: () => runs('sox', ['--version']),
  ffmpeg: () => runs('ffmpeg', ['-version']),
  scipy: () => runs('/usr/bin/python3', ['-c', 'import scipy.signal']),
  pandas: () => runs('/usr/bin/python3', ['-c', 'import pandas']),
  gcc: () => runs('gcc', ['--version']),
  'g++': () => runs('g++', ['--version']),
  rustc: () => runs('rustc', ['--version']),
  alsa: () => existsSync('/usr/share/sounds/alsa/Front_Center.wav'),
} as const;

export type Program = keyof typeof probes;

/** Programs that a CI machine need not have. */
const optional: readonly Program[] = ['rustc'];

function runs(command: string, args: string[]): boolean {
  return spawnSync(command, args, { stdio: 'ignore' }).status === 0;
}

/**
 * True where the program is there. Where it is missing the tests that need it are left out, in so many words;
 * on a CI machine that is a failure.
 */
export function needs(program: Program): boolean {
  if (probes[program]()) return true;
  if (process.env.CI && !optional.includes(program))
    throw new Error(`${program} is missing, and this is a CI machine`);
  console.warn(`left out: tests that need ${program}, which is not installed here`);
  return false;
}

/** The Python that Debian's packages belong to. */
export const python = '/usr/bin/python3';
