import type { ByteSource } from '../../bytes/byteSource';
import { refuse } from '../../findings/finding';
import { planesFor } from '../framedReader';
import { eachLine } from './eachLine';
import type { RowParser } from './rowParser';

/** Rows of a block, whose place in the file is remembered. */
const blockRows = 4096;

/** Numbers kept in memory; a text with more of them is read again where its rows are asked for. */
const mostKept = 1 << 24;

/** The rows of a text that has been read through once. */
export interface RowStore {
  /** Adds the row that starts at an offset of the source. */
  add(row: Float64Array, offset: number): void;
  /** Rows added. */
  readonly rows: number;
  /** What `pick` makes of each of the last rows' lines, some thousands at most. */
  lastLines(pick: (line: string) => string): Promise<string[]>;
  /** Rows `[from, to)` of the columns asked for. @throws Refusal `file-changed` */
  read(
    columns: readonly number[],
    from: number,
    to: number,
    into?: readonly Float64Array[],
  ): Promise<Float64Array[]>;
}

/**
 * Keeps up to 2^24 numbers; beyond that only where every 4,096th row starts.
 * @param width numbers of a row
 * @param kept numbers kept at most; tests make it small
 */
export function newRowStore(
  source: ByteSource,
  file: string,
  width: number,
  parse: RowParser,
  kept = mostKept,
): RowStore {
  let rows = 0;
  let blocks: Float64Array[] | null = [];
  const offsets: number[] = [];

  async function readAgain(from: number, to: number, visit: (row: Float64Array, at: number) => void) {
    const row = new Float64Array(width);
    let at = Math.floor(from / blockRows) * blockRows;
    await eachLine(source, offsets[at / blockRows], file, (bytes, start, end) => {
      const kind = parse(bytes, start, end, row);
      if (kind === 'blank') return true;
      if (kind !== 'row') refuse('file-changed', {}, { file });
      if (at >= from) visit(row, at);
      return ++at < to;
    });
    if (at < to) refuse('file-changed', {}, { file });
  }

  return {
    add(row, offset) {
      const at = rows % blockRows;
      if (at === 0) offsets.push(offset);
      if (blocks !== null && (rows + 1) * width > kept) blocks = null;
      if (blocks !== null) {
        if (at === 0) blocks.push(new Float64Array(blockRows * width));
        blocks[blocks.length - 1].set(row, at * width);
      }
      rows++;
    },
    get rows() {
      return rows;
    },
    async lastLines(pick) {
      const found: string[] = [];
      const row = new Float64Array(width);
      const from = offsets[Math.max(0, offsets.length - 2)];
      await eachLine(source, from, file, (bytes, start, end) => {
        const line = bytes.subarray(start, end);
        if (parse(bytes, start, end, row) === 'row') found.push(pick(new TextDecoder().decode(line)));
        return true;
      });
      return found;
    },
    async read(columns, from, to, into) {
      const planes = planesFor(columns.length, to - from, into);
      const take = (row: Float64Array, at: number, start = 0) => {
        for (let c = 0; c < columns.length; c++) planes[c][at - from] = row[start + columns[c]];
      };
      if (to <= from) return planes;
      if (blocks === null) await readAgain(from, to, take);
      else
        for (let n = from; n < to; n++) take(blocks[Math.floor(n / blockRows)], n, (n % blockRows) * width);
      return planes;
    },
  };
}
