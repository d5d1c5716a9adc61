import type { WrittenView } from '../../core/protocol/messages';
import type { PairingIndex } from './pairingIndex';
import type { Entry } from './standing';

/** What is kept from one session of the editor to the next, by the document's address. */
export type Memory = Record<string, WrittenView>;

interface Surroundings {
  index: PairingIndex;
  /** Null: nothing has changed since what the entry has seen. */
  look(entry: Entry): Promise<WrittenView | null>;
  /** An entry has been looked at. */
  looked(entry: Entry, changed: boolean): void;
  failed(entry: Entry, error: unknown): void;
}

/**
 * Looks at pairings one after the other, so that it is never in the way of other work. A pairing that is asked for again
 * while it is being looked at is looked at once more.
 */
export class Lookout {
  private readonly waiting = new Set<string>();
  private running: Promise<void> | null = null;

  constructor(private readonly around: Surroundings) {}

  ask(documents: Iterable<string>): void {
    for (const document of documents) this.waiting.add(document);
    this.running ??= this.run().finally(() => {
      this.running = null;
    });
  }

  /** Resolves once nothing waits. */
  async settled(): Promise<void> {
    while (this.running !== null) await this.running;
  }

  private async run(): Promise<void> {
    // Those who ask in the same moment are answered together.
    await Promise.resolve();
    for (const document of this.waiting) {
      this.waiting.delete(document);
      const entry = this.around.index.get(document);
      if (entry !== undefined) await this.look(entry);
    }
  }

  private async look(entry: Entry): Promise<void> {
    const { index, look, looked, failed } = this.around;
    try {
      const view = await look(entry);
      const present = index.get(entry.document);
      if (present === undefined) return;
      if (present !== entry) {
        // A check came meanwhile: looked at once more, so that nothing of it is lost.
        this.waiting.add(entry.document);
        return;
      }
      if (view === null) return looked(entry, false);
      const now = { ...entry, view, checked: null };
      index.put(now);
      looked(now, true);
    } catch (error) {
      failed(entry, error);
    }
  }
}

/** What to keep of all entries. */
export function memoryOf(entries: readonly Entry[]): Memory {
  return Object.fromEntries(
    entries.flatMap(({ document, view }) => (view === null ? [] : [[document, view]])),
  );
}
