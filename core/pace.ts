import { giveWay } from './giveWay';

/** Thrown where the user stopped a computation. */
export class Stopped extends Error {
  constructor() {
    super('stopped');
    this.name = 'Stopped';
  }
}

/** Lets long loops be watched and stopped: they await `step` once a block. */
export interface Pace {
  /**
   * Reports progress and, every 20 ms, gives the host a turn.
   * @param what the stage in words, for example `statistics`
   * @throws Stopped where the computation was stopped
   */
  step(what: string, done: number, total: number): Promise<void>;
}

const turn = 20;

/**
 * A pace that yields to the event loop every 20 ms.
 * @param stopped asked once a step
 * @param report called with every step
 * @param between awaited with every turn: work of others that cannot wait for the end
 */
export function newPace(
  stopped: () => boolean = () => false,
  report: (what: string, done: number, total: number) => void = () => {},
  between: () => Promise<void> = async () => {},
): Pace {
  let last = performance.now();
  return {
    async step(what, done, total) {
      report(what, done, total);
      if (performance.now() - last >= turn) {
        await giveWay();
        await between();
        last = performance.now();
      }
      if (stopped()) throw new Stopped();
    },
  };
}
