import type { Uri } from 'vscode';
import type { Port } from '../core/protocol/rpc';
import type { Disk } from './files/disk';

/** The worker as the host sees it. */
export interface WorkerPort extends Port {
  /** Called once, when the worker ends without being asked to, with the reason. */
  onDeath(heard: (why: string) => void): void;
  terminate(): void;
}

/** The little by which a Node host and a host in the browser differ. */
export interface Platform {
  /** @param warn told where the worker is not what it should be */
  startWorker(warn: (text: string) => void): WorkerPort;
  /** Absolute path where the worker can read the folder itself, by ranges; null: only through the host's file system. */
  localFolder(uri: Uri): string | null;
  /** For writing from a document's folder, whose root is given; null: through the host's file system. */
  disk(root: Uri, folder: Uri): Disk | null;
}
