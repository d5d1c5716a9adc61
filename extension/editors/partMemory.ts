import type { ToPage } from '../../core/protocol/messages';
import type { Packed } from '../../core/protocol/pack';
import type { Part } from '../../core/protocol/views';

export type PartNotice = Extract<ToPage, { type: 'part' }>;

interface Kept {
  generation: number;
  view: Packed | null;
  failed: boolean;
}

/** The last of each part, for a page that comes later. */
export class PartMemory {
  private readonly parts = new Map<Part, Kept>();

  /** Notes a part; one without a view stands for the view of the generation before. */
  keep({ part, generation, view, failed = false }: PartNotice): void {
    const before = this.parts.get(part);
    if (before !== undefined && generation < before.generation) return;
    this.parts.set(part, { generation, view: view ?? before?.view ?? null, failed });
  }

  /** Whether this or a later generation's is known, be it that it cannot be had. */
  has(part: Part, generation: number): boolean {
    return (this.parts.get(part)?.generation ?? -1) >= generation;
  }

  /** What brings a new page to where the others are. */
  replay(): PartNotice[] {
    return [...this.parts].flatMap(([part, { generation, view, failed }]) => {
      const notices: PartNotice[] = view === null ? [] : [{ type: 'part', part, generation, view }];
      // The view is told all the same: a later notice may stand for it.
      if (failed) notices.push({ type: 'part', part, generation, view: null, failed });
      return notices;
    });
  }
}
