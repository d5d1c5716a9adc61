/** An SHA-256 computation (FIPS 180-4) in progress. Hosts bring their own. */
export interface Sha256 {
  update(bytes: Uint8Array): void;
  /** The digest as 64 lower-case hexadecimal digits; nothing may be added after. */
  hex(): string;
}

export type NewSha256 = () => Sha256;

/** Digest of a text's UTF-8 bytes. */
export function sha256OfText(newSha256: NewSha256, text: string): string {
  const sha = newSha256();
  sha.update(new TextEncoder().encode(text));
  return sha.hex();
}
