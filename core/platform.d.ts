// The few names of the platform that core/ uses; every host (Node, browser, worker) has them.

declare class TextDecoder {
  constructor(label?: string, options?: { fatal?: boolean; ignoreBOM?: boolean });
  decode(input?: Uint8Array, options?: { stream?: boolean }): string;
}

declare class TextEncoder {
  encode(input?: string): Uint8Array;
}

declare const performance: { now(): number };

declare class MessageChannel {
  readonly port1: { onmessage: (() => void) | null };
  readonly port2: { postMessage(message: null): void };
}
