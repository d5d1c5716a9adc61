import type { Interval } from '../core/pair/intervals';

/** What the workbench keeps of the page while it is hidden, and gives back. */
export interface KeptState {
  scroll: number;
  /** Names of the parts that are open or closed against their habit. */
  open: Record<string, boolean>;
  take: number;
  /** What is in view of each waveform, by its name. */
  views: Record<string, Interval>;
}

export interface Keeper {
  state: KeptState;
  change(change: Partial<KeptState>): void;
}

/** Keeps the state by `set`, not more often than every 200 ms. */
export function newKeeper(saved: unknown, set: (state: KeptState) => void): Keeper {
  const state: KeptState = { scroll: 0, open: {}, take: 0, views: {} };
  if (typeof saved === 'object' && saved !== null) Object.assign(state, saved);
  let waiting = false;
  return {
    state,
    change(change) {
      Object.assign(state, change);
      if (waiting) return;
      waiting = true;
      setTimeout(() => {
        waiting = false;
        set({ ...state });
      }, 200);
    },
  };
}
