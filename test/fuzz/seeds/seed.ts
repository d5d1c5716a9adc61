/** A good file that inputs are made from. */
export interface Seed {
  name: string;
  bytes: Uint8Array;
}

/** A seed that is a text. */
export function textSeed(name: string, text: string): Seed {
  return { name, bytes: new TextEncoder().encode(text) };
}
