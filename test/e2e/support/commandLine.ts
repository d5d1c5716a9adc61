import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { tapwright } from '../../support/cli';
import type { BenchFolder } from './benchFolder';

export interface Designed {
  /** As the taps file has it, dB. */
  heldOutDb: number;
  /** Every file that the command line wrote, by its path from the folder. */
  files: Map<string, Buffer>;
}

/** What `tapwright design` makes of the files as they are on disk now, in a copy of their folder. */
export function designByCommandLine(files: BenchFolder, pairing: string): Designed {
  const folder = mkdtempSync(join(tmpdir(), 'tapwright-design-'));
  try {
    cpSync(files.path, folder, { recursive: true });
    rmSync(join(folder, 'generated'), { recursive: true, force: true });
    const run = tapwright(folder, 'design', pairing);
    // 1: written, but a limit of the document is not kept.
    if (run.status !== 0 && run.status !== 1)
      throw new Error(`tapwright design ended with ${run.status}: ${run.out}${run.err}`);
    const written = new Map<string, Buffer>();
    for (const entry of readdirSync(join(folder, 'generated'), { recursive: true, withFileTypes: true })) {
      const path = join(entry.parentPath, entry.name);
      if (entry.isFile()) written.set(path.slice(folder.length + 1), readFileSync(path));
    }
    const taps = [...written.keys()].find((path) => path.endsWith('.taps.json'));
    const { heldOut } = JSON.parse(written.get(taps ?? '')?.toString() ?? '{}');
    return { heldOutDb: heldOut.nmseDb, files: written };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
