import { type NewFile, type Written, writeAll } from '../files/writeAll';
import { nodeDisk } from './nodeDisk';

/**
 * Writes all files or none on the local disk.
 * @param root absolute folder that nothing may leave
 * @param folder absolute folder of the document
 */
export function writeFiles(root: string, folder: string, files: readonly NewFile[]): Promise<Written> {
  return writeAll(nodeDisk(root, folder), files);
}
