import type { PageCalls, ToPage } from '../core/protocol/messages';
import { type Frame, type Link, link } from '../core/protocol/rpc';

interface Workbench {
  postMessage(message: unknown, transfer?: ArrayBuffer[]): void;
  getState(): unknown;
  setState(state: unknown): void;
}

declare function acquireVsCodeApi(): Workbench;

/** The way to the extension host. */
export function joinHost(hear: (message: ToPage) => void): { host: Link<PageCalls>; workbench: Workbench } {
  const workbench = acquireVsCodeApi();
  const port = {
    post: (message: Frame, transfer?: ArrayBuffer[]) => workbench.postMessage(message, transfer),
    listen(receive: (message: Frame) => void) {
      window.addEventListener('message', ({ data }) => {
        if (typeof data === 'object' && data !== null && typeof data.rpc === 'string') receive(data as Frame);
      });
    },
  };
  return { host: link<PageCalls>(port, {}, hear as (notice: never) => void), workbench };
}
