import * as vscode from 'vscode';
import { type Disk, DiskError } from './disk';
import { fileTypes, leadsOverLink } from './linkCheck';
import { pathBelow } from './relativePath';

let lastTemporary = 0;

/**
 * The workbench's file systems, for writing where the local disk is not to be had. They have no way to make sure that
 * bytes last beyond a loss of power; a rename puts the whole file in place all the same.
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
  return {
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
    write: (path, bytes) => told(path, fs.writeFile(at(path), bytes)),
    rename: (from, to) => told(to, fs.rename(at(from), at(to), { overwrite: true })),
    async remove(path) {
      try {
        await fs.delete(at(path), { useTrash: false });
      } catch {
        // There is none, or it cannot be helped: the next run writes over it.
      }
    },
  };
}
