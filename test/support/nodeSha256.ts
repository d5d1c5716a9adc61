import { createHash } from 'node:crypto';
import type { NewSha256 } from '../../core/bytes/sha256';

/** SHA-256 by Node's crypto module. */
export const nodeSha256: NewSha256 = () => {
  const hash = createHash('sha256');
  return {
    update(bytes) {
      hash.update(bytes);
    },
    hex: () => hash.digest('hex'),
  };
};
