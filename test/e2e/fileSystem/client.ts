import type { Uri } from 'vscode';

/** A reply that says why it failed, by the name of a constructor of `FileSystemError`. */
export class Refused extends Error {
  constructor(
    readonly code: string,
    path: string,
  ) {
    super(`${code}: ${path}`);
  }
}

export interface Entry {
  /** As `vscode.FileType`. */
  type: number;
  size: number;
  ctime: number;
  mtime: number;
}

export type Client = ReturnType<typeof newClient>;

/** The file calls of the server that this extension came from. */
export function newClient(extension: Uri) {
  const origin = `${extension.scheme}://${extension.authority}`;

  async function ask(call: string, parameters: Record<string, string>, body?: Uint8Array): Promise<Response> {
    const query = new URLSearchParams(parameters);
    const reply = await fetch(`${origin}/files/${call}?${query}`, { method: 'POST', body });
    if (!reply.ok) throw new Refused(await reply.text(), parameters.path);
    return reply;
  }

  return {
    stat: async (path: string) => (await (await ask('stat', { path })).json()) as Entry,
    list: async (path: string) => (await (await ask('list', { path })).json()) as [string, number][],
    /** Every file below the folder, with a stamp that changes when the file does, and every folder with an empty one. */
    tree: async (path: string) => (await (await ask('tree', { path })).json()) as Record<string, string>,
    read: async (path: string) => new Uint8Array(await (await ask('read', { path })).arrayBuffer()),
    write: async (path: string, bytes: Uint8Array, options: { create: boolean; overwrite: boolean }) => {
      await ask('write', { path, create: `${options.create}`, overwrite: `${options.overwrite}` }, bytes);
    },
    rename: async (path: string, to: string, overwrite: boolean) => {
      await ask('rename', { path, to, overwrite: `${overwrite}` });
    },
    remove: async (path: string, recursive: boolean) => {
      await ask('remove', { path, recursive: `${recursive}` });
    },
    makeFolder: async (path: string) => {
      await ask('makeFolder', { path });
    },
  };
}
