import { sha256 } from '@noble/hashes/sha2';
import { bytesToHex } from '@noble/hashes/utils';
import type { Surroundings } from '../worker/service';

/** What a browser has: files come from the extension host, digests from a library, since the browser's own take whole files. */
export const browser: Surroundings = {
  localFiles: null,
  newSha256() {
    const hash = sha256.create();
    return { update: (bytes) => void hash.update(bytes), hex: () => bytesToHex(hash.digest()) };
  },
};
