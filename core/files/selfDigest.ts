import { type NewSha256, sha256OfText } from '../bytes/sha256';

const none = '0'.repeat(64);
const key = /"self": "([0-9a-f]{64})"/;

/** What the key `self` holds until the text is whole. */
export const openSelfDigest = none;

/** Fills the key `self` of a JSON text with the SHA-256 of the text in which it is all zeros. */
export function closeSelfDigest(text: string, newSha256: NewSha256): string {
  return text.replace(`"self": "${none}"`, `"self": "${sha256OfText(newSha256, text)}"`);
}

/** Whether a text is as {@link closeSelfDigest} left it, whatever its line ends. */
export function selfDigestHolds(text: string, newSha256: NewSha256): boolean {
  const match = key.exec(text);
  if (match === null) return false;
  const opened = text.replace(/\r\n/g, '\n').replace(key, `"self": "${none}"`);
  return sha256OfText(newSha256, opened) === match[1];
}
