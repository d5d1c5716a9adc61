import type { Host } from '../../core/pipeline/host';
import { recordingDigest } from '../../core/recordings/recordingDigest';

/**
 * Those of the paths that hold the recording of a digest. Files of its size are looked at first; where none is it the
 * others are, since a text whose line ends were changed has another size.
 */
export async function sameRecordings(
  { open, newSha256, pace }: Host,
  { paths, sha256, size }: { paths: readonly string[]; sha256: string; size: number | null },
): Promise<string[]> {
  const others: string[] = [];
  const found: string[] = [];
  const look = async (path: string, wanted: number | null) => {
    const source = await open(path);
    if (typeof source === 'string') return;
    if (wanted !== null && source.size !== wanted) others.push(path);
    else if ((await recordingDigest(source, newSha256, pace)) === sha256) found.push(path);
  };
  for (const path of paths) await look(path, size);
  if (found.length > 0) return found;
  for (const path of others) await look(path, null);
  return found;
}
