import { memorySource } from '../../core/bytes/byteSource';
import { newPace } from '../../core/pace';
import type { Host } from '../../core/pipeline/host';
import { keepNothing } from '../../core/pipeline/keep';
import { nodeSha256 } from './nodeSha256';

/** A host whose files are in memory, by their path from the root. */
export function memoryHost(files: Readonly<Record<string, string | Uint8Array>>): Host {
  return {
    newSha256: nodeSha256,
    keep: keepNothing,
    pace: newPace(),
    async open(path) {
      if (!Object.hasOwn(files, path)) return 'missing';
      const content = files[path];
      return memorySource(typeof content === 'string' ? new TextEncoder().encode(content) : content);
    },
  };
}

/** Columns of numbers as a text recording that keeps every digit. */
export function csvOf(columns: Readonly<Record<string, Float64Array>>): string {
  const names = Object.keys(columns);
  const rows = Array.from(columns[names[0]], (_, n) => names.map((name) => columns[name][n]).join(','));
  return `${names.join(',')}\n${rows.join('\n')}\n`;
}
