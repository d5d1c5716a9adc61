import * as vscode from 'vscode';
import { type Disk, DiskError } from './disk';
import { fileTypes, leadsOverLink } from './linkCheck';
import { pathBelow } from './relativePath';

let lastTemporary = 0;

/**
 * The workbench's file systems, for writing where the local disk is not to be had. They have no way to make sure that
 * bytes last beyond a loss of power. The workbench deletes what a rename would replace, which closes its editors and
 * leaves a moment without the file, or for good where the rename then fails. So a file that is there already is written
 * over, as saving it in an editor would; by then its new bytes are known to find room.
 * @param root nothing may leave it
 * @param folder the document's
 */
export function workspaceDisk(root: vscode.Uri, folder: vscode.Uri): Disk {
  const { fs } = vscode.workspace;
  const at = (path: string) => vscode.Uri.joinPath(folder, path);
  const told = async <T>(path: string, work: Thenable<T>): Promise<T> => {
    try {
      return await work;
    } catch (error) {
      throw error instanceof vscode.FileSystemError ? new DiskError(error.code, path) : error;
    }
  };
  const disk: Disk = {
    async staysInside(path) {
      const fromRoot = pathBelow(root.path, at(path).path);
      if (fromRoot === null) return false;
      return !(await leadsOverLink((below) => fs.readDirectory(vscode.Uri.joinPath(root, below)), fromRoot));
    },
    async stat(path) {
      try {
        const { type } = await fs.stat(at(path));
        return (type & fileTypes.file) !== 0 ? 'file' : 'other';
      } catch (error) {
        if (error instanceof vscode.FileSystemError && error.code === 'FileNotFound') return 'missing';
        return told(path, Promise.reject(error));
      }
    },
    read: async (path) => new Uint8Array(await told(path, fs.readFile(at(path)))),
    makeFolder: (path) => told(path, fs.createDirectory(at(path))),
    beside: (path) => `${path}.${++lastTemporary}.tmp`,
    // Nothing tells whether another window is at work; names are used again, so that little is left.
    async tidy() {},
    write: (path, bytes) => told(path, fs.writeFile(at(path), bytes)),
    async rename(from, to) {
      if ((await disk.stat(to)) === 'missing') return told(to, fs.rename(at(from), at(to)));
      await disk.write(to, await disk.read(from));
      await disk.remove(from);
    },
    async remove(path) {
      try {
        await fs.delete(at(path), { useTrash: false });
      } catch {
        // There is none, or it cannot be helped: the next run writes over it.
      }
    },
  };
  return disk;
}
