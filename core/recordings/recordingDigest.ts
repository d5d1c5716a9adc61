import type { ByteSource } from '../bytes/byteSource';
import { digestSource } from '../bytes/digest';
import type { NewSha256 } from '../bytes/sha256';
import type { Pace } from '../pace';
import { binaryKind } from './openRecording';
import { textSource } from './text/encoding';

/** SHA-256 of a recording as a design states it, without reading what the recording says. */
export async function recordingDigest(source: ByteSource, newSha256: NewSha256, pace: Pace): Promise<string> {
  const text = (await binaryKind(source)) === null;
  return digestSource(source, newSha256, text && !(await textSource(source)).utf16, pace);
}
