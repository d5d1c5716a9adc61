import type { ByteSource } from '../../bytes/byteSource';
import { type Finding, finding } from '../../findings/finding';
import { viewOf } from '../viewOf';

/** Where a chunk's content is. */
export interface Chunk {
  id: string;
  from: number;
  /** Bytes that are there; at most what is declared. */
  size: number;
  /** Bytes that the header declares. */
  declared: number;
}

export interface Chunks {
  format: Chunk | null;
  data: Chunk | null;
  findings: Finding[];
}

/**
 * Sizes that writers to a pipe leave, who cannot go back and fill them in: the largest of 32 or 31 bits, or what whole
 * frames and the header leave of it (common practice).
 */
function standsForUnknown(declared: number): boolean {
  return (
    (declared >= 0x7fff0000 && declared <= 0x7fffffff) || (declared >= 0xffff0000 && declared <= 0xffffffff)
  );
}

/** Chunks looked at before the file is given up: no writer makes more before its data. */
const mostChunks = 10_000;

/**
 * Walks the chunks of a RIFF (Microsoft & IBM 1991), RF64 or BW64 file (EBU Tech 3306, ITU-R BS.2088) up to and past the
 * data. Sizes are clamped to the bytes that are there. A data chunk that declares 0 bytes, or a size that stands for one
 * not known, reaches to the end of the file.
 */
export async function findChunks(source: ByteSource, file: string): Promise<Chunks> {
  const found: Chunks = { format: null, data: null, findings: [] };
  let wideDataSize: number | null = null;
  for (let at = 12, seen = 0; at + 8 <= source.size && seen < mostChunks; seen++) {
    const head = viewOf(await source.read(at, 8));
    const id = idOf(head);
    let declared = head.getUint32(4, true);
    const from = at + 8;
    if (id === 'ds64' && declared >= 16 && source.size - from >= 16)
      wideDataSize = wide(viewOf(await source.read(from, 16)), 8);
    if (id === 'data') {
      if (declared === 0xffffffff && wideDataSize !== null) declared = wideDataSize;
      found.data = dataChunk(source, file, from, declared, found.findings);
      // Chunks after the data matter only where the format is still missing.
      if (found.format !== null) return found;
      at = from + found.data.size + (found.data.size % 2);
      continue;
    }
    const size = Math.min(declared, source.size - from);
    if (id === 'fmt ' && found.format === null) found.format = { id, from, size, declared };
    at = from + declared + (declared % 2);
  }
  return found;
}

function dataChunk(
  source: ByteSource,
  file: string,
  from: number,
  declared: number,
  findings: Finding[],
): Chunk {
  const there = source.size - from;
  const open =
    declared === 0xffffffff ||
    (declared > there && standsForUnknown(declared)) ||
    (declared === 0 && there > 0);
  if (open) {
    findings.push(finding('open-data', { declared, there }, { file }));
    return { id: 'data', from, size: there, declared: there };
  }
  if (declared > there) findings.push(finding('truncated', { declared, there }, { file }));
  return { id: 'data', from, size: Math.min(declared, there), declared };
}

function idOf(view: DataView): string {
  return String.fromCharCode(view.getUint8(0), view.getUint8(1), view.getUint8(2), view.getUint8(3));
}

/** A 64-bit size; beyond 2^53 it is larger than any file and the rounding does not matter. */
function wide(view: DataView, offset: number): number {
  return view.getUint32(offset + 4, true) * 4294967296 + view.getUint32(offset, true);
}
