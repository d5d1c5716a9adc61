import type { HostCalls } from '../../core/protocol/messages';
import { fileTypes, leadsOverLink } from './linkCheck';

/** The part of `workspace.fs` that reading needs, by addresses as texts. */
export interface FolderReader {
  stat(address: string): PromiseLike<{ type: number; size: number; mtime: number }>;
  list(address: string): PromiseLike<readonly (readonly [string, number])[]>;
  read(address: string): PromiseLike<Uint8Array>;
  /** The address of a path below one. */
  join(address: string, path: string): string;
  missing(error: unknown): boolean;
}

/** Bytes at most of a file that must be read whole. */
export const largestWhole = 64 * 1024 * 1024;

/** Milliseconds that a folder's listing is used again: a document asks for several files at once. */
const listingLasts = 1000;

/** Answers the worker for roots that it cannot read itself. */
export function hostCalls(reader: FolderReader, now: () => number = Date.now): HostCalls {
  const listings = new Map<string, { at: number; entries: ReturnType<FolderReader['list']> }>();
  const list = (address: string) => {
    const known = listings.get(address);
    if (known !== undefined && now() - known.at < listingLasts) return known.entries;
    const entries = reader.list(address);
    if (listings.size > 50) listings.clear();
    listings.set(address, { at: now(), entries });
    return entries;
  };
  /** Also asked before reading: what was a file may be a link by then. */
  const leaves = async (uri: string, path: string): Promise<boolean> =>
    path.split(/[\\/]/).includes('..') || leadsOverLink((folder) => list(reader.join(uri, folder)), path);
  return {
    async stat({ uri, path }) {
      if (await leaves(uri, path)) return 'outside';
      try {
        const { type, size, mtime } = await reader.stat(reader.join(uri, path));
        if ((type & fileTypes.link) !== 0) return 'outside';
        if ((type & fileTypes.file) === 0) return 'not-a-file';
        if (size > largestWhole) return 'too-large';
        return { size, stamp: `${mtime} ${size}` };
      } catch (error) {
        return reader.missing(error) ? 'missing' : 'unreadable';
      }
    },
    async read({ uri, path }) {
      if (await leaves(uri, path)) throw new Error(`${path} leaves its root`);
      const bytes = await reader.read(reader.join(uri, path));
      // On a Node host this is a Buffer, perhaps of a shared pool.
      return new Uint8Array(bytes);
    },
  };
}
