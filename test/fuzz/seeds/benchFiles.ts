import { readFileSync } from 'node:fs';
import { join } from 'node:path';

/** A file of the sample bench, or as much of its start as is asked for. Runs start in the project's folder. */
export function benchFile(name: string, most = Number.POSITIVE_INFINITY): Uint8Array {
  const bytes = readFileSync(join('media', 'bench', name));
  return new Uint8Array(bytes.subarray(0, Math.min(bytes.length, most)));
}

/** Whole lines from the start of a text of the sample bench. */
export function benchLines(name: string, lines: number): string {
  const text = new TextDecoder().decode(benchFile(name, 256 * 1024));
  return `${text.split('\n').slice(0, lines).join('\n')}\n`;
}
