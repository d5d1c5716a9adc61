import type { Frame } from '../../core/protocol/rpc';
import { serve } from '../worker/service';
import { browser } from './surroundings';

/** What a dedicated worker's global scope has, as far as it is used here. */
interface WorkerScope {
  postMessage(message: unknown, transfer: ArrayBuffer[]): void;
  addEventListener(type: 'message', listener: (event: { data: Frame }) => void): void;
}

const scope = globalThis as unknown as WorkerScope;

/** The worker in a browser. */
serve(
  {
    post: (message, transfer = []) => scope.postMessage(message, transfer),
    listen: (receive) => scope.addEventListener('message', ({ data }) => receive(data)),
  },
  browser,
);
