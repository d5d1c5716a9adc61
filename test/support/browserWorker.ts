import type { Page } from 'playwright-core';
import type { Frame } from '../../core/protocol/rpc';
import type { WorkerPort } from '../../extension/platform';

/**
 * Starts a worker's script in a browser's page and relays messages in both directions as texts, with bytes in base64. Of
 * notices only what they are about comes back, since their series are for pictures.
 */
export async function browserWorker(page: Page, script: string): Promise<WorkerPort> {
  let receive: (message: Frame) => void = () => {};
  let died: (why: string) => void = () => {};
  await page.route('http://worker.test/**', (route) =>
    route.fulfill({ contentType: 'text/html', body: '<!doctype html><title>worker</title>' }),
  );
  await page.goto('http://worker.test/');
  await page.exposeFunction('heard', (text: string) => receive(decoded(text)));
  await page.exposeFunction('died', (why: string) => died(why));
  await page.evaluate(relay);
  await page.evaluate(`start(${JSON.stringify(script)})`);
  const send = (text: string) => page.evaluate(`post(${JSON.stringify(text)})`);
  return {
    post(message) {
      send(encoded(message)).catch((error) => died(String(error)));
    },
    listen(heard) {
      receive = heard;
    },
    onDeath(heard) {
      died = heard;
    },
    terminate() {
      // Its page is closed.
    },
  };
}

const encoded = (message: unknown): string =>
  JSON.stringify(message, (_key, value) =>
    value instanceof Uint8Array ? { base64: Buffer.from(value).toString('base64') } : value,
  );

const decoded = (text: string): Frame =>
  JSON.parse(text, (_key, value) =>
    typeof value?.base64 === 'string' ? new Uint8Array(Buffer.from(value.base64, 'base64')) : value,
  );

/** The page's half. */
const relay = `
  let worker;
  const inText = (bytes) => {
    let text = '';
    for (let i = 0; i < bytes.length; i += 8192) text += String.fromCharCode(...bytes.subarray(i, i + 8192));
    return btoa(text);
  };
  const encoded = (message) => JSON.stringify(message, (key, value) => {
    if (value instanceof Uint8Array) return { base64: inText(value) };
    return value instanceof ArrayBuffer ? { byteLength: value.byteLength } : value;
  });
  const decoded = (text) => JSON.parse(text, (key, value) =>
    value && typeof value.base64 === 'string'
      ? Uint8Array.from(atob(value.base64), (sign) => sign.charCodeAt(0))
      : value);
  globalThis.start = (script) => {
    worker = new Worker(URL.createObjectURL(new Blob([script], { type: 'text/javascript' })));
    worker.onmessage = ({ data }) => heard(encoded(data));
    worker.onerror = (event) => died(event.message || 'the worker failed');
  };
  globalThis.post = (text) => worker.postMessage(decoded(text));
`;
