import type { Frame, Port } from '../../core/protocol/rpc';
import type { WorkerPort } from '../platform';

/**
 * Runs the worker's script in the host itself, where no worker can be started: the same bundle, with a stand-in for a
 * worker's global scope. Its long loops give way by themselves.
 * @param script the text of a classic worker script that names its scope `globalThis`
 */
export function hostedService(script: string): WorkerPort {
  let open = true;
  const ours: End = { receive: [] };
  const theirs: End = { receive: [] };
  // A message is copied on its way and arrives later, as between threads.
  const send = (to: End, message: Frame, transfer: ArrayBuffer[] = []) => {
    const copy = structuredClone(message, { transfer });
    setTimeout(() => {
      if (open) for (const receive of to.receive) receive(copy);
    }, 0);
  };
  const port: Port = {
    post: (message, transfer) => send(theirs, message, transfer),
    listen: (receive) => void ours.receive.push(receive),
  };
  const scope = Object.create(globalThis, {
    postMessage: { value: (message: Frame, transfer: ArrayBuffer[]) => send(ours, message, transfer) },
    addEventListener: {
      value: (_type: 'message', heard: (event: { data: Frame }) => void) =>
        void theirs.receive.push((data) => heard({ data })),
    },
  });
  // The host loads the extension itself in the same way, so that it is allowed wherever this runs.
  new Function('globalThis', script)(scope);
  return {
    ...port,
    onDeath() {
      // It lives and dies with the host.
    },
    terminate() {
      open = false;
    },
  };
}

interface End {
  receive: ((message: Frame) => void)[];
}
