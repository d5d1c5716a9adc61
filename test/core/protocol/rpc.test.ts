import { describe, expect, it } from 'vitest';
import { type Frame, link, type Port } from '../../../core/protocol/rpc';

interface Near {
  double(value: number): Promise<number>;
  fail(why: string): Promise<null>;
}
interface Far {
  name(none: null): Promise<string>;
}

/** Two ports joined in memory; messages are copied, as a real channel does. */
function pair(): [Port, Port] {
  const listeners: ((message: Frame) => void)[] = [];
  const port = (own: number): Port => ({
    post: (message) => void Promise.resolve().then(() => listeners[1 - own](structuredClone(message))),
    listen: (receive) => {
      listeners[own] = receive;
    },
  });
  return [port(0), port(1)];
}

function joined() {
  const [a, b] = pair();
  const heard: unknown[] = [];
  const near: Near = {
    double: async (value) => 2 * value,
    fail: async (why) => {
      throw new Error(why);
    },
  };
  const far: Far = { name: async () => 'far' };
  const atFar = link<Near, Far>(a, far);
  const atNear = link<Far, Near>(b, near, (notice: unknown) => void heard.push(notice));
  return { atFar, atNear, heard };
}

describe('link', () => {
  it('answers calls in both directions at the same time', async () => {
    const { atFar, atNear } = joined();
    expect(await Promise.all([atFar.call.double(4), atNear.call.name(null), atFar.call.double(5)])).toEqual([
      8,
      'far',
      10,
    ]);
  });

  it('brings an error of the other end to the caller', async () => {
    await expect(joined().atFar.call.fail('no such thing')).rejects.toThrow('no such thing');
  });

  it('answers a method that is not there with an error, also one of every object', async () => {
    const { call } = joined().atFar as unknown as {
      call: Record<'missing' | 'valueOf', (value: null) => unknown>;
    };
    await expect(call.missing(null)).rejects.toThrow('nobody answers missing');
    await expect(call.valueOf(null)).rejects.toThrow('nobody answers valueOf');
  });

  it('brings notices in order', async () => {
    const { atFar, heard } = joined();
    atFar.tell({ n: 1 });
    atFar.tell({ n: 2 });
    await atFar.call.double(1);
    expect(heard).toEqual([{ n: 1 }, { n: 2 }]);
  });

  it('ends waiting and later calls where the other end is gone', async () => {
    const [a] = pair();
    const alone = link<Near>({ post: () => {}, listen: a.listen }, {});
    const waiting = alone.call.double(1);
    alone.fail('the worker has ended');
    await expect(waiting).rejects.toThrow('the worker has ended');
    await expect(alone.call.double(2)).rejects.toThrow('the worker has ended');
  });
});
