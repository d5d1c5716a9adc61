/**
 * Short work that cannot wait for the end of long work, and must not run beside it since both read the same files: it
 * runs between two blocks of the long work, or at once where there is none.
 */
export interface Urgent {
  run<T>(work: () => Promise<T>): Promise<T>;
  /** Long work begins, once short work that goes on is done, and ends. */
  begin(): Promise<void>;
  end(): Promise<void>;
  /** Awaited by the long work with each of its turns. */
  drain(): Promise<void>;
}

export function newUrgent(): Urgent {
  const waiting: (() => Promise<void>)[] = [];
  let busy = false;
  let draining: Promise<void> | null = null;

  const drainAll = async () => {
    for (let next = waiting.shift(); next !== undefined; next = waiting.shift()) await next();
  };
  const drain = () => {
    draining ??= drainAll().finally(() => {
      draining = null;
    });
    return draining;
  };
  return {
    run: (work) =>
      new Promise((resolve, reject) => {
        waiting.push(() => work().then(resolve, reject));
        if (!busy) void drain();
      }),
    async begin() {
      busy = true;
      await draining;
    },
    async end() {
      busy = false;
      await drain();
    },
    drain,
  };
}
