import type { ByteSource } from '../bytes/byteSource';
import { Refusal, refuse } from '../findings/finding';
import type { Opened } from './recording';

/**
 * Opens a recording so that what is wrong with it comes back as findings, a file that shrinks meanwhile included.
 * @param open may throw a Refusal; the source it gets throws one where bytes are gone
 */
export async function openSafely(
  source: ByteSource,
  file: string,
  open: (source: ByteSource) => Promise<Opened>,
): Promise<Opened> {
  const whole: ByteSource = {
    size: source.size,
    async read(offset, length) {
      const bytes = await source.read(offset, length);
      if (bytes.length < Math.min(length, source.size - offset)) refuse('file-changed', {}, { file });
      return bytes;
    },
  };
  try {
    return await open(whole);
  } catch (error) {
    if (error instanceof Refusal) return { recording: null, findings: [...error.findings] };
    throw error;
  }
}
