// The few names of the platform that core/ uses; every host (Node, browser, worker) has them.

declare class TextDecoder {
  constructor(label?: string, options?: { fatal?: boolean; ignoreBOM?: boolean });
  decode(input?: Uint8Array, options?: { stream?: boolean }): string;
}

declare class TextEncoder {
  encode(input?: string): Uint8Array;
}

declare function setTimeout(callback: () => void, milliseconds?: number): unknown;

declare const performance: { now(): number };
