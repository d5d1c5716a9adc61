import type { ByteSource } from '../bytes/byteSource';
import type { NewSha256 } from '../bytes/sha256';
import type { FindingCode } from '../findings/sentences';
import type { Pace } from '../pace';
import type { Keep } from './keep';

/** Why a file could not be opened. */
export type OpenFailure = 'missing' | 'outside' | 'not-a-file' | 'unreadable' | 'too-large';

/** The finding about a recording that each is. */
export const failureCodes = {
  missing: 'missing-file',
  outside: 'outside-root',
  'not-a-file': 'not-a-file',
  unreadable: 'unreadable-file',
  'too-large': 'file-too-large',
} as const satisfies Record<OpenFailure, FindingCode>;

/** What the core needs of the place it runs in. */
export interface Host {
  /** Opens a file by its path from the root, with forward slashes. */
  open(path: string): Promise<ByteSource | OpenFailure>;
  newSha256: NewSha256;
  pace: Pace;
  keep: Keep;
}

/** What the stages that compute need of it. */
export type Work = Pick<Host, 'pace' | 'keep'>;
