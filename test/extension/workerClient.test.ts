import { describe, expect, it } from 'vitest';
import type { FromWorker, HostCalls, WorkerCalls } from '../../core/protocol/messages';
import { type Frame, link } from '../../core/protocol/rpc';
import type { WorkerPort } from '../../extension/platform';
import { WorkerClient } from '../../extension/workerClient';

type Theirs = Pick<WorkerCalls, 'stop' | 'forget'>;

/** Workers that answer `stop`, remember what they were to forget, and die when told. */
function newWorkers() {
  const started: { die(why: string): void; tell(notice: FromWorker): void; ended: boolean }[] = [];
  const forgotten: string[] = [];
  let answers = true;
  const start = (): WorkerPort => {
    let toHost: (message: Frame) => void = () => {};
    let toWorker: (message: Frame) => void = () => {};
    let died: (why: string) => void = () => {};
    const inside = link<HostCalls, Theirs>(
      {
        post: (message) => toHost(message),
        listen(receive) {
          toWorker = receive;
        },
      },
      {
        stop: () => (answers ? Promise.resolve(null) : new Promise(() => {})),
        async forget({ session }) {
          forgotten.push(session);
          return null;
        },
      },
    );
    const worker = { die: (why: string) => died(why), tell: (n: FromWorker) => inside.tell(n), ended: false };
    started.push(worker);
    return {
      post: (message) => toWorker(message),
      listen(receive) {
        toHost = receive;
      },
      onDeath(heard) {
        died = heard;
      },
      terminate() {
        worker.ended = true;
      },
    };
  };
  const hang = () => {
    answers = false;
  };
  return { start, started, forgotten, hang };
}

const own: HostCalls = { stat: async () => 'missing', read: async () => new Uint8Array(0) };
const ears = () => {
  const heard: FromWorker[] = [];
  const losses: string[] = [];
  return { heard, losses, hear: (n: FromWorker) => heard.push(n), lost: (why: string) => losses.push(why) };
};
const idle = (session: string): FromWorker => ({ type: 'idle', session, generation: 1, stopped: false });

describe("the host's end of the worker", () => {
  it('starts it with the first call and gives each session its own notices', async () => {
    const { start, started } = newWorkers();
    const client = new WorkerClient(start, own, () => {});
    const [a, b] = [ears(), ears()];
    client.join('a', a);
    client.join('b', b);
    expect(started.length).toBe(0);
    await client.call.stop({ session: 'a' });
    started[0].tell(idle('b'));
    expect(started.length).toBe(1);
    expect([a.heard.length, b.heard.length]).toEqual([0, 1]);
  });

  it('fails what waits when the worker dies, tells every session, and starts another', async () => {
    const { start, started, hang } = newWorkers();
    const deaths: string[] = [];
    const client = new WorkerClient(start, own, (why) => deaths.push(why));
    const a = ears();
    client.join('a', a);
    hang();
    const waits = client.call.stop({ session: 'a' });
    started[0].die('out of memory');
    await expect(waits).rejects.toThrow('out of memory');
    expect([a.losses, deaths]).toEqual([['out of memory'], ['out of memory']]);
    expect(started[0].ended).toBe(true);
    void client.call.stop({ session: 'a' });
    expect(started.length).toBe(2);
    started[0].tell(idle('a'));
    started[0].die('once more');
    expect([a.heard.length, a.losses.length]).toEqual([0, 1]);
  });

  it('has a session forgotten when it is left, and starts no worker for that', async () => {
    const { start, started, forgotten } = newWorkers();
    const client = new WorkerClient(start, own, () => {});
    client.join('a', ears());
    client.leave('a');
    expect(started.length).toBe(0);
    client.join('b', ears());
    await client.call.stop({ session: 'b' });
    client.leave('b');
    expect(forgotten).toEqual(['b']);
  });

  it('ends it at the end', async () => {
    const { start, started } = newWorkers();
    const client = new WorkerClient(start, own, () => {});
    await client.call.stop({ session: 'a' });
    client.dispose();
    expect(started[0].ended).toBe(true);
    expect(() => client.call).toThrow('ended');
  });
});
