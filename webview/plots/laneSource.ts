import type { Envelope, EnvelopeRequest } from '../../core/protocol/messages';
import type { LanesData } from './data';
import { coverage, suits, wantedEnvelope } from './envelopeColumns';
import { newLastWins } from './lastWins';
import type { View } from './sampleView';

/** The envelopes at hand: a coarse one of the whole take, and a fine one of about what is in view. */
export interface LaneSource {
  fine(): Envelope | null;
  coarse(): Envelope | null;
  /** Other signals. `keep`: of the same lanes and take, so that the old ones show until the new ones are there. */
  start(data: LanesData | null, keep: boolean): void;
  /** Asks for what a view of `width` pixels needs, unless it is at hand. */
  need(view: View, width: number): void;
}

/** @param heard something new is at hand; null, or why it could not be had */
export function newLaneSource(
  ask: (request: EnvelopeRequest) => Promise<Envelope>,
  frame: (callback: () => void) => void,
  heard: (trouble: string | null) => void,
): LaneSource {
  let data: LanesData | null = null;
  let fine: Envelope | null = null;
  let coarse: Envelope | null = null;
  /** What is at hand belongs to the signals before. */
  let old = false;
  /** What `fine` answers. */
  let answered = '';
  const clear = () => {
    fine = null;
    coarse = null;
    old = false;
  };
  const requests = newLastWins(
    ask,
    frame,
    (request) => JSON.stringify(request) !== answered,
    (envelope, request) => {
      if (old) clear();
      fine = envelope;
      answered = JSON.stringify(request);
      const { from, to } = coverage(envelope);
      if (data !== null && from <= 0 && to >= data.take.samples) coarse = envelope;
      heard(null);
    },
    (error) => {
      if (old) clear();
      heard(error instanceof Error ? error.message : String(error));
    },
  );
  return {
    fine: () => fine,
    coarse: () => coarse,
    start(next, keep) {
      data = next;
      answered = '';
      requests.drop();
      if (keep) old = fine !== null;
      else clear();
    },
    need(view, width) {
      if (data === null || data.lanes.length === 0 || width <= 0) return;
      const { samples } = data.take;
      if (!old && suits(fine, view, samples, width)) return;
      const lanes = data.lanes.map(({ lane }) => lane);
      requests.want({ take: data.takeNumber, lanes, ...wantedEnvelope(view, samples, width) });
    },
  };
}
