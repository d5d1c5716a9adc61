import {
  cpSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { project } from './places';

const sample = join(project, 'media', 'bench');

/** A copy of the sample bench on disk, in a temporary folder of its own. */
export class BenchFolder {
  /** The opened folder. */
  readonly path: string;

  /** @param root stands for `/` in the workbench */
  private constructor(readonly root: string) {
    this.path = join(root, 'bench');
  }

  static ofSampleBench(): BenchFolder {
    const folder = new BenchFolder(mkdtempSync(join(tmpdir(), 'tapwright-e2e-')));
    cpSync(sample, folder.path, { recursive: true });
    return folder;
  }

  /** Paths are from the opened folder. */
  exists(path: string): boolean {
    return existsSync(join(this.path, path));
  }

  read(path: string): string {
    return readFileSync(join(this.path, path), 'utf8');
  }

  bytes(path: string): Uint8Array {
    return readFileSync(join(this.path, path));
  }

  write(path: string, content: string | Uint8Array): void {
    mkdirSync(dirname(join(this.path, path)), { recursive: true });
    writeFileSync(join(this.path, path), content);
  }

  /** Every file, also in folders. */
  list(folder = '.'): string[] {
    return readdirSync(join(this.path, folder), { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile())
      .map((entry) => join(entry.parentPath, entry.name).slice(this.path.length + 1))
      .sort();
  }

  /** Back to the sample bench; a file that did not change is not touched. */
  restore(): void {
    const wanted = readdirSync(sample);
    for (const name of readdirSync(this.root)) {
      if (name !== 'bench') rmSync(join(this.root, name), { recursive: true });
    }
    for (const name of readdirSync(this.path)) {
      if (!wanted.includes(name)) rmSync(join(this.path, name), { recursive: true });
    }
    for (const name of wanted) {
      const bytes = readFileSync(join(sample, name));
      if (!this.exists(name) || !bytes.equals(this.bytes(name))) this.write(name, bytes);
    }
  }

  remove(): void {
    rmSync(this.root, { recursive: true, force: true });
  }
}
