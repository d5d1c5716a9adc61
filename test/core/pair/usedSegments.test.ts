import { describe, expect, it } from 'vitest';
import type { Interval } from '../../../core/pair/intervals';
import type { Take } from '../../../core/pair/take';
import { usedSegments } from '../../../core/pair/usedSegments';
import { recordingOf, takeOf } from '../../support/takes';

/** The definition, n by n: every sample exists and none lies in a gap between two listed intervals. */
function byDefinition(take: Take, wanted: Interval[], M: number, delay: number): number[] {
  const listed = [...take.fit, ...take.heldOut];
  const inList = (i: number) => listed.some(({ from, to }) => i >= from && i < to);
  const first = Math.min(...listed.map(({ from }) => from));
  const last = Math.max(...listed.map(({ to }) => to));
  const usable = (i: number, samples: number) =>
    i >= 0 && i < samples && (inList(i) || i < first || i >= last);
  const x = Math.min(...take.inputs.map((track) => track.recording.samples));
  const d = take.desired.recording.samples;
  const used: number[] = [];
  for (const { from, to } of wanted) {
    for (let n = from; n < to; n++) {
      let good = usable(n - delay, d);
      for (let k = 0; k < M; k++) good &&= usable(n - k, x);
      if (good) used.push(n);
    }
  }
  return used;
}

function flat(segments: Interval[]): number[] {
  return segments.flatMap(({ from, to }) => Array.from({ length: to - from }, (_, i) => from + i));
}

const signal = new Float64Array(100);
const layouts: [string, Partial<Take>][] = [
  ['whole', { fit: [{ from: 0, to: 100 }] }],
  ['from the middle', { fit: [{ from: 30, to: 90 }] }],
  ['fit and held-out that touch', { fit: [{ from: 10, to: 60 }], heldOut: [{ from: 60, to: 95 }] }],
  [
    'a bad stretch left out',
    {
      fit: [
        { from: 5, to: 30 },
        { from: 40, to: 60 },
      ],
      heldOut: [{ from: 70, to: 100 }],
    },
  ],
  ['held-out first', { fit: [{ from: 50, to: 100 }], heldOut: [{ from: 0, to: 45 }] }],
];

describe('usedSegments', () => {
  it.each(layouts)('follows the definition: %s', (_, layout) => {
    const take = takeOf([signal], signal, layout);
    for (const M of [1, 2, 7, 16]) {
      for (const delay of [-20, -3, 0, 1, 6, 15, 40]) {
        for (const wanted of [take.fit, take.heldOut]) {
          expect(flat(usedSegments(take, wanted, M, delay)), `M ${M}, delay ${delay}`).toEqual(
            byDefinition(take, wanted, M, delay),
          );
        }
      }
    }
  });

  it('asks every signal for its own length', () => {
    const take: Take = {
      ...takeOf([signal], signal),
      desired: { recording: recordingOf([new Float64Array(80)]), channel: 0 },
      fit: [{ from: 0, to: 80 }],
    };
    expect(usedSegments(take, take.fit, 5, 10)).toEqual([{ from: 10, to: 80 }]);
    expect(usedSegments(take, take.fit, 5, -10)).toEqual([{ from: 4, to: 70 }]);
  });
});
