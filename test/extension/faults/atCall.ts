import { spawnSync } from 'node:child_process';
import fs from 'node:fs';
import files, { type FileHandle } from 'node:fs/promises';

// Loaded before the command line: makes something happen at one of its calls of the file system, which are the real ones.
// Of this script's own address come:
//   of      "writes" or "reads": which calls are counted
//   at      number of the call before which it happens, from 1
//   signal  what the process is sent, or
//   run     a JavaScript text that another process is given to run first

const given = new URL(import.meta.url).searchParams;
const at = Number(given.get('at'));
const [run, signal] = [given.get('run'), given.get('signal') as NodeJS.Signals | null];
let calls = 0;

/** @param half done first where the process is to die in the middle of a call */
function count(half = () => {}): void {
  if (++calls !== at) return;
  if (run !== null) {
    const { status, stderr } = spawnSync(process.execPath, ['-e', run], { encoding: 'utf8' });
    if (status !== 0) throw new Error(stderr);
  } else if (signal !== null) {
    half();
    process.kill(process.pid, signal);
    // A signal that takes a moment must not be outrun.
    Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 200);
  }
}

/** Counts the calls of methods. */
function watch<T>(
  object: T,
  names: readonly (keyof T)[],
  half?: (name: keyof T, args: unknown[]) => void,
): void {
  for (const name of names) {
    const real = object[name] as (...args: unknown[]) => unknown;
    const counted = (...args: unknown[]) => {
      count(() => half?.(name, args));
      return real.apply(object, args);
    };
    object[name] = counted as T[keyof T];
  }
}

function watchHandle(handle: FileHandle): FileHandle {
  watch(handle, ['writeFile', 'sync', 'close'], (name, [bytes]) => {
    if (name === 'writeFile' && bytes instanceof Uint8Array)
      fs.writeSync(handle.fd, bytes, 0, bytes.length >> 1);
  });
  return handle;
}

if (given.get('of') === 'reads') watch(fs, ['readSync']);
else {
  watch(files, ['mkdir', 'rename', 'rm']);
  const { open } = files;
  files.open = async (path, flags, ...rest) => {
    const writes = /[wa+]/.test(`${flags ?? 'r'}`);
    if (writes) count();
    const handle = await open(path, flags, ...rest);
    return writes ? watchHandle(handle) : handle;
  };
}
