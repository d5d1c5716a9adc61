import { type ResourceLimits, Worker } from 'node:worker_threads';
import type { Frame } from '../../core/protocol/rpc';
import type { WorkerPort } from '../platform';

/**
 * Starts the bundled worker in a thread of its own.
 * @param resourceLimits of its memory, in MiB; where it needs more it dies alone. Without them those of the process
 */
export function nodeWorker(script: string, resourceLimits: ResourceLimits = {}): WorkerPort {
  const worker = new Worker(script, { name: 'tapwright', resourceLimits });
  let asked = false;
  return {
    post: (message, transfer) => worker.postMessage(message, transfer ?? []),
    listen: (receive) => worker.on('message', (message: Frame) => receive(message)),
    onDeath(heard) {
      let why: string | null = null;
      worker.on('error', (error) => {
        why = error instanceof Error ? (error.stack ?? error.message) : String(error);
      });
      worker.on('exit', (code) => {
        if (!asked) heard(why ?? `the worker ended with code ${code}`);
      });
    },
    terminate() {
      asked = true;
      void worker.terminate();
    },
  };
}
