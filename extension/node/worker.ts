import { parentPort } from 'node:worker_threads';
import type { Frame } from '../../core/protocol/rpc';
import { serve } from '../worker/service';
import { localFiles } from './localFiles';
import { newSha256 } from './nodeHost';

/** The worker on a Node host. */
if (parentPort !== null) {
  const port = parentPort;
  serve(
    {
      post: (message, transfer) => port.postMessage(message, transfer),
      listen: (receive) => void port.on('message', (message: Frame) => receive(message)),
    },
    { localFiles, newSha256 },
  );
}
