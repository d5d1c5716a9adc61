import { existsSync, statSync } from 'node:fs';
import { lstat, mkdir, readdir, readFile, rename, rm, stat, writeFile } from 'node:fs/promises';
import { dirname, join, posix } from 'node:path';

/** Why a call failed, by the name of the workbench's own error. */
export class CallRefused extends Error {}

export type FolderCall = (parameters: URLSearchParams, body: Buffer) => Promise<unknown>;

const kinds = { file: 1, folder: 2, link: 64 } as const;

/** What the test file system asks, over a real folder that stands for `/`; nothing outside it is reached. */
export function folderCalls(root: string): Record<string, FolderCall> {
  const place = (parameters: URLSearchParams, name = 'path') =>
    join(root, posix.normalize(`/${parameters.get(name)}`));
  return {
    stat: async (parameters) => {
      const found = await stat(place(parameters));
      return { type: kindOf(found), size: found.size, ctime: found.ctimeMs, mtime: found.mtimeMs };
    },
    list: async (parameters) => {
      const folder = place(parameters);
      const names = await readdir(folder);
      return Promise.all(
        names.map(async (name) => {
          const linked = (await lstat(join(folder, name))).isSymbolicLink();
          const target = await stat(join(folder, name)).catch(() => null);
          return [name, (target === null ? 0 : kindOf(target)) | (linked ? kinds.link : 0)];
        }),
      );
    },
    tree: async (parameters) => stamps(place(parameters), posix.normalize(`/${parameters.get('path')}`)),
    read: async (parameters) => readFile(place(parameters)),
    write: async (parameters, body) => {
      const path = place(parameters);
      const exists = existsSync(path);
      if (!exists && parameters.get('create') !== 'true') throw new CallRefused('FileNotFound');
      if (exists && statSync(path).isDirectory()) throw new CallRefused('FileIsADirectory');
      if (exists && parameters.get('overwrite') !== 'true') throw new CallRefused('FileExists');
      await mkdir(dirname(path), { recursive: true });
      await writeFile(path, body);
      return null;
    },
    rename: async (parameters) => {
      const to = place(parameters, 'to');
      if (existsSync(to) && parameters.get('overwrite') !== 'true') throw new CallRefused('FileExists');
      await rename(place(parameters), to);
      return null;
    },
    remove: async (parameters) => {
      await rm(place(parameters), { recursive: parameters.get('recursive') === 'true' });
      return null;
    },
    makeFolder: async (parameters) => {
      await mkdir(place(parameters), { recursive: true });
      return null;
    },
  };
}

/** Name of the workbench's error for an error of `node:fs`. */
export function refusalOf(error: unknown): string {
  if (error instanceof CallRefused) return error.message;
  const names: Record<string, string> = {
    ENOENT: 'FileNotFound',
    EEXIST: 'FileExists',
    EISDIR: 'FileIsADirectory',
    ENOTDIR: 'FileNotADirectory',
    EACCES: 'NoPermissions',
  };
  const code = (error as NodeJS.ErrnoException).code ?? '';
  return names[code] ?? String(error);
}

function kindOf(found: { isDirectory(): boolean }): number {
  return found.isDirectory() ? kinds.folder : kinds.file;
}

async function stamps(folder: string, shown: string): Promise<Record<string, string>> {
  const files: Record<string, string> = {};
  for (const entry of await readdir(folder, { withFileTypes: true, recursive: true })) {
    const path = join(entry.parentPath, entry.name);
    const found = await stat(path).catch(() => null);
    if (found === null) continue;
    // A folder's own time changes with its content; that is told by the content.
    const stamp = found.isDirectory() ? '' : `${found.mtimeMs} ${found.size}`;
    files[posix.join(shown, path.slice(folder.length))] = stamp;
  }
  return files;
}
