import type { ByteSource } from '../bytes/byteSource';
import type { Pace } from '../pace';
import { openNpy } from './npy/openNpy';
import type { Opened } from './recording';
import { openText } from './text/openText';
import { openWav } from './wav/openWav';

/**
 * Opens a recording by its content, whatever its name: RIFF, RF64, BW64 or RIFX is WAV, `\x93NUMPY` is NPY, anything
 * else is read as text, which finds out if it is none. A file that cannot be used comes back as findings.
 * @param file the name that findings show
 */
export async function openRecording(source: ByteSource, file: string, pace: Pace): Promise<Opened> {
  const kind = await binaryKind(source);
  if (kind === 'wav') return openWav(source, file);
  return kind === 'npy' ? openNpy(source, file) : openText(source, file, pace);
}

/** Which of the binary formats a file starts as; null: to be read as text. */
export async function binaryKind(source: ByteSource): Promise<'wav' | 'npy' | null> {
  const start = String.fromCharCode(...(await source.read(0, Math.min(source.size, 12))));
  if (/^(RIFF|RF64|BW64|RIFX)/.test(start)) return 'wav';
  return start.startsWith('\x93NUMPY') ? 'npy' : null;
}
