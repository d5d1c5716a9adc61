/** Why an operation on files failed, by a short code such as `ENOSPC` or `NoPermissions`. Anything else thrown is a bug. */
export class DiskError extends Error {
  constructor(
    readonly code: string,
    /** As the one who asked named it, where that is known. */
    readonly path: string | null = null,
  ) {
    super(code);
    this.name = 'DiskError';
  }
}

/** The few operations that writing needs. Paths lead from the document's folder, with forward slashes. */
export interface Disk {
  /** Whether the path's real place lies in the root, links followed as far as the disk can tell. */
  staysInside(path: string): Promise<boolean>;
  /** `other`: something that is no file. */
  stat(path: string): Promise<'missing' | 'file' | 'other'>;
  read(path: string): Promise<Uint8Array>;
  makeFolder(path: string): Promise<void>;
  /** A path beside the given one, for a file that is to take its place. */
  beside(path: string): string;
  /** Removes what writers that were killed left beside a path, as far as the disk can tell that they are gone. */
  tidy(path: string): Promise<void>;
  /** Writes a whole file, and as far as the disk can do so makes sure that it lasts. */
  write(path: string, bytes: Uint8Array): Promise<void>;
  /** Puts a file in the place of another, which is old or new and never between as far as the disk can do so. */
  rename(from: string, to: string): Promise<void>;
  /** No complaint where there is none. */
  remove(path: string): Promise<void>;
}
