import { describe, expect, it } from 'vitest';
import type { Envelope, EnvelopeRequest } from '../../../core/protocol/messages';
import type { LanesData } from '../../../webview/plots/data';
import { newLaneSource } from '../../../webview/plots/laneSource';

const samples = 10_000;
const take = { name: 'a', samples, tracks: [], fit: [], heldOut: [], disturbanceOnly: [] };
const data: LanesData = {
  take,
  takeNumber: 3,
  sampleRate: 1000,
  lanes: [{ lane: 'desired', label: 'desired', role: 'desired', min: -1, max: 1 }],
  stamp: 1,
};

function answer({ from, to, columns, lanes }: EnvelopeRequest): Envelope {
  const step = Math.max(1, Math.ceil((to - from) / columns));
  const count = Math.ceil((to - from) / step);
  return {
    from,
    step,
    lanes: lanes.map((lane) => ({ lane, low: new Float64Array(count), high: new Float64Array(count) })),
  };
}

function setUp(reply: (request: EnvelopeRequest) => Promise<Envelope>) {
  const asked: EnvelopeRequest[] = [];
  const heard: (string | null)[] = [];
  const source = newLaneSource(
    (request) => {
      asked.push(request);
      return reply(request);
    },
    (callback) => setTimeout(callback, 0),
    (trouble) => heard.push(trouble),
  );
  source.start(data, false);
  const settle = () => new Promise((done) => setTimeout(done, 15));
  return { source, asked, heard, settle };
}

describe('envelopes at hand', () => {
  it('keep a coarse one of the whole take beside a fine one of what is in view', async () => {
    const { source, asked, settle } = setUp(async (request) => answer(request));
    source.need({ from: 0, to: samples }, 500);
    await settle();
    expect(asked).toEqual([{ take: 3, lanes: ['desired'], from: 0, to: samples, columns: 500 }]);
    source.need({ from: 4000, to: 4400 }, 500);
    await settle();
    expect(source.fine()?.from).toBe(3800);
    expect(source.coarse()?.step).toBe(20);
    source.need({ from: 4100, to: 4500 }, 500);
    source.need({ from: 0, to: samples }, 500);
    source.need({ from: 4100, to: 4500 }, 500);
    await settle();
    expect(asked.length).toBe(3);
  });

  it('are forgotten when the signals change', async () => {
    const { source, settle } = setUp(async (request) => answer(request));
    source.need({ from: 0, to: samples }, 500);
    source.start({ ...data, stamp: 2 }, false);
    await settle();
    expect(source.fine()).toBeNull();
    expect(source.coarse()).toBeNull();
  });

  it('show on while those of the new signals are under way, and no longer', async () => {
    let fails = false;
    const { source, asked, settle } = setUp(async (request) => {
      if (fails) throw new Error('gone');
      return answer(request);
    });
    const all = { from: 0, to: samples };
    source.need(all, 500);
    await settle();
    const old = source.fine();
    source.start({ ...data, stamp: 2 }, true);
    expect(source.fine()).toBe(old);
    source.need(all, 500);
    await settle();
    expect(asked.length).toBe(2);
    expect(source.fine()).not.toBe(old);
    expect(source.coarse()).toBe(source.fine());
    fails = true;
    source.start({ ...data, stamp: 3 }, true);
    source.need(all, 500);
    await settle();
    expect(source.fine()).toBeNull();
    expect(source.coarse()).toBeNull();
  });

  it('say why they could not be had, and are asked for again when next needed', async () => {
    const { source, asked, heard, settle } = setUp(() => Promise.reject(new Error('the worker is gone')));
    source.need({ from: 0, to: samples }, 500);
    await settle();
    expect(heard).toEqual(['the worker is gone']);
    source.need({ from: 0, to: samples }, 500);
    await settle();
    expect(asked.length).toBe(2);
  });
});
