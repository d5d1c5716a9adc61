/**
 * Decodes one channel of interleaved frames.
 * @param bytes of whole frames
 * @param frameBytes bytes of a frame
 * @param offset of the channel's sample in a frame
 * @param into receives one sample a frame, from `at` on
 */
export type Decoder = (
  bytes: Uint8Array,
  frameBytes: number,
  offset: number,
  into: Float64Array,
  at: number,
) => void;
