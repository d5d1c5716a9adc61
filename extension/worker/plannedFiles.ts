import { resolveInside } from '../../core/document/paths';
import type { DesignFile } from '../../core/files/designFiles';
import { fileChange, markBytes } from '../../core/files/fileChange';
import type { Host } from '../../core/pipeline/host';
import type { PlannedFile } from '../../core/protocol/views';

/**
 * Files as they would be written against what is on disk. The same inputs give the same bytes, so that files that are
 * unchanged are those of this very document and these recordings.
 * @param folder of the document, from the root
 */
export async function plannedFiles(
  host: Host,
  folder: string,
  files: readonly DesignFile[],
): Promise<PlannedFile[]> {
  const planned: PlannedFile[] = [];
  for (const { path, bytes } of files) {
    planned.push({
      path,
      change: await changeOf(host, resolveInside(folder, path), bytes),
      size: bytes.length,
    });
  }
  return planned;
}

async function changeOf(host: Host, path: string | null, bytes: Uint8Array): Promise<PlannedFile['change']> {
  const source = path === null ? 'outside' : await host.open(path);
  if (source === 'missing') return 'new';
  if (typeof source === 'string') return 'foreign';
  const looked = Math.max(markBytes, bytes.length + 1);
  return fileChange(await source.read(0, Math.min(source.size, looked)), bytes);
}
