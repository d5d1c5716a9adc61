import type { ByteSource } from '../../core/bytes/byteSource';
import type { OpenFailure } from '../../core/pipeline/host';

/** The files below a root, by their paths from it. Files stay open, and are the same source while their stamp stands. */
export interface RootFiles {
  open(path: string): Promise<ByteSource | OpenFailure>;
  /** Closes every file that was opened. */
  close(): Promise<void>;
}

/** What a place offers to read files with. */
export interface FileReader {
  /** A stamp that changes whenever the file does, or why it cannot be read. */
  stamp(path: string): Promise<{ stamp: string } | OpenFailure>;
  open(path: string, stamp: string): Promise<(ByteSource & { close?(): Promise<void> }) | OpenFailure>;
}

/** Keeps files open and opens them again when their stamp has changed. */
export function keptFiles(reader: FileReader): RootFiles {
  const files = new Map<string, ByteSource & { close?(): Promise<void> }>();
  return {
    async open(path) {
      const about = await reader.stamp(path);
      const kept = files.get(path);
      if (typeof about !== 'string' && kept?.stamp === about.stamp) return kept;
      files.delete(path);
      await kept?.close?.();
      if (typeof about === 'string') return about;
      const source = await reader.open(path, about.stamp);
      if (typeof source !== 'string') files.set(path, source);
      return source;
    },
    async close() {
      const all = [...files.values()];
      files.clear();
      await Promise.all(all.map((file) => file.close?.()));
    },
  };
}
