import type { Frame, Port } from '../../core/protocol/rpc';
import type { WorkerPort } from '../platform';
import { hostedService } from './hostedService';

/** The few names of the browser that starting a worker needs. */
interface BrowserWorker {
  postMessage(message: unknown, transfer: ArrayBuffer[]): void;
  terminate(): void;
  onmessage: ((event: { data: Frame }) => void) | null;
  onerror: ((event: { message?: string; preventDefault?(): void }) => void) | null;
}
declare const Worker: (new (url: string, options: { name: string }) => BrowserWorker) | undefined;

/**
 * Starts the bundled worker from its text: a worker's script must come from the host's own origin, and the extension's
 * files do not. The first messages wait until it has been fetched. Where no worker can be started the script runs in the
 * host itself; some hosts refuse a worker only after it was made, so that messages are kept until it has answered.
 * @param address of the script
 */
export function webWorker(address: string, warn: (text: string) => void): WorkerPort {
  const unanswered: Parameters<Port['post']>[] = [];
  let running: WorkerPort | null = null;
  let answered = false;
  let receive: (message: Frame) => void = () => {};
  let died: (why: string) => void = () => {};
  let ended = false;

  const run = (port: WorkerPort, failed: (why: string) => void) => {
    running = port;
    port.listen((message) => {
      answered = true;
      unanswered.length = 0;
      receive(message);
    });
    port.onDeath(failed);
    for (const message of unanswered) port.post(...message);
  };
  const begin = async () => {
    const script = await fetchText(address);
    if (ended) return;
    const instead = (why: unknown) => {
      warn(`no worker can be started here, computing in the extension host: ${why}`);
      run(hostedService(script), (reason) => died(reason));
    };
    let worker: WorkerPort;
    try {
      worker = inWorker(script);
    } catch (error) {
      return instead(error);
    }
    run(worker, (why) => {
      if (ended) return;
      worker.terminate();
      if (answered) died(why);
      else instead(why);
    });
  };
  begin().catch((error) => {
    if (!ended) died(String(error));
  });

  return {
    post(...message) {
      if (!answered) unanswered.push(message);
      running?.post(...message);
    },
    listen(heard) {
      receive = heard;
    },
    onDeath(heard) {
      died = heard;
    },
    terminate() {
      ended = true;
      running?.terminate();
    },
  };
}

async function fetchText(address: string): Promise<string> {
  const response = await fetch(address);
  if (!response.ok) throw new Error(`got status ${response.status} for the worker's script`);
  return response.text();
}

/** @throws where the host has no workers */
function inWorker(script: string): WorkerPort {
  const url = URL.createObjectURL(new Blob([script], { type: 'text/javascript' }));
  const worker = newWorker(url);
  let replied = false;
  return {
    post: (message, transfer = []) => worker.postMessage(message, transfer),
    listen(receive) {
      worker.onmessage = ({ data }) => {
        // Revoked before its first reply the script may not have been read yet.
        if (!replied) URL.revokeObjectURL(url);
        replied = true;
        receive(data);
      };
    },
    onDeath(heard) {
      worker.onerror = (event) => {
        event.preventDefault?.();
        heard(event.message ?? 'the worker failed');
      };
    },
    terminate: () => worker.terminate(),
  };
}

function newWorker(url: string): BrowserWorker {
  try {
    if (typeof Worker === 'undefined') throw new Error('there are no nested workers');
    return new Worker(url, { name: 'tapwright' });
  } catch (error) {
    URL.revokeObjectURL(url);
    throw error;
  }
}
