import { compareDesigns, type DesignChange } from '../comparison/compareDesigns';
import { resolveInside } from '../document/paths';
import type { DesignResult } from './designResult';
import type { Host } from './host';

/**
 * How a result differs from the taps file that is there, before it is overwritten.
 * @param folder of the document, from the root
 * @param path of the taps file from that folder
 * @returns null where there is none that can be read, or its taps are the same
 */
export async function changeAgainst(
  host: Host,
  folder: string,
  path: string,
  result: DesignResult,
): Promise<DesignChange | null> {
  const whole = resolveInside(folder, path);
  const source = whole === null ? 'outside' : await host.open(whole);
  if (typeof source === 'string') return null;
  const text = new TextDecoder().decode(await source.read(0, source.size));
  return compareDesigns(text, path, result);
}
