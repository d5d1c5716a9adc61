import type { Pace } from '../pace';
import type { ByteSource } from './byteSource';
import type { NewSha256 } from './sha256';

const block = 1 << 20;
const lineFeed = 10;
const carriageReturn = 13;

/**
 * SHA-256 of a file's bytes, read by blocks.
 * @param lineEndsIgnored whether CR LF and a lone CR count as LF, so that texts that differ only in their line ends have
 *   one digest; that of a text with LF is the digest of its bytes
 */
export async function digestSource(
  source: ByteSource,
  newSha256: NewSha256,
  lineEndsIgnored: boolean,
  pace: Pace,
): Promise<string> {
  const sha = newSha256();
  const unify = newLineEndUnifier();
  for (let offset = 0; offset < source.size; ) {
    const bytes = await source.read(offset, Math.min(block, source.size - offset));
    // The file has become shorter since it was opened.
    if (bytes.length === 0) break;
    sha.update(lineEndsIgnored ? unify(bytes) : bytes);
    offset += bytes.length;
    await pace.step('digest', offset, source.size);
  }
  return sha.hex();
}

/** Turns CR LF and CR into LF, block after block: a CR is written as LF at once, and an LF that follows it is dropped. */
function newLineEndUnifier(): (bytes: Uint8Array) => Uint8Array {
  let afterReturn = false;
  return (bytes) => {
    if (!afterReturn && !bytes.includes(carriageReturn)) return bytes;
    const out = new Uint8Array(bytes.length);
    let length = 0;
    for (let k = 0; k < bytes.length; k++) {
      const byte = bytes[k];
      if (byte === carriageReturn) out[length++] = lineFeed;
      else if (byte !== lineFeed || !afterReturn) out[length++] = byte;
      afterReturn = byte === carriageReturn;
    }
    return out.subarray(0, length);
  };
}
