import { mkdirSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { inflateRawSync } from 'node:zlib';

export interface ZipEntry {
  /** With forward slashes. */
  path: string;
  /** Bytes it takes in the archive. */
  packed: number;
  bytes: Buffer;
}

const centralHead = 0x02014b50;
const endHead = 0x06054b50;

/** Every file of a plain zip archive (stored or deflated, no encryption, below 4 GiB). */
export function zipEntries(archive: Buffer): ZipEntry[] {
  const end = archive.lastIndexOf('PK\x05\x06', undefined, 'latin1');
  if (end < 0 || archive.readUInt32LE(end) !== endHead) throw new Error('no zip archive');
  const count = archive.readUInt16LE(end + 10);
  const entries: ZipEntry[] = [];
  let at = archive.readUInt32LE(end + 16);
  for (let i = 0; i < count; i++) {
    if (archive.readUInt32LE(at) !== centralHead) throw new Error(`no entry at ${at}`);
    const method = archive.readUInt16LE(at + 10);
    const packed = archive.readUInt32LE(at + 20);
    const size = archive.readUInt32LE(at + 24);
    const [name, extra, comment] = [28, 30, 32].map((offset) => archive.readUInt16LE(at + offset));
    const local = archive.readUInt32LE(at + 42);
    const path = archive.toString('utf8', at + 46, at + 46 + name);
    const start = local + 30 + archive.readUInt16LE(local + 26) + archive.readUInt16LE(local + 28);
    const raw = archive.subarray(start, start + packed);
    const bytes = method === 0 ? raw : inflateRawSync(raw);
    if (bytes.length !== size) throw new Error(`${path} has ${bytes.length} bytes, not ${size}`);
    entries.push({ path, packed, bytes });
    at += 46 + name + extra + comment;
  }
  return entries;
}

/** Unpacks our own archive; a path that would leave the folder is refused all the same. */
export function unzip(archive: Buffer, folder: string): void {
  for (const { path, bytes } of zipEntries(archive)) {
    if (path.split('/').includes('..') || path.startsWith('/')) throw new Error(`${path} leaves the folder`);
    const target = join(folder, path);
    mkdirSync(dirname(target), { recursive: true });
    writeFileSync(target, bytes);
  }
}
