/** Bytes of a file, read by range, so that no file need be in memory whole. */
export interface ByteSource {
  /** Size in bytes when the source was opened. */
  readonly size: number;
  /** Changes whenever the file does; left out where that cannot be told, so that nothing read from it may be kept. */
  readonly stamp?: string;
  /**
   * The bytes `[offset, offset + length)`, fewer only where the file ends before.
   * The array belongs to the caller until the next call of `read`, which may reuse its memory.
   */
  read(offset: number, length: number): Promise<Uint8Array>;
}

/** A source over bytes that are in memory already. */
export function memorySource(bytes: Uint8Array): ByteSource {
  return {
    size: bytes.length,
    read: async (offset, length) => bytes.subarray(offset, Math.min(bytes.length, offset + length)),
  };
}
