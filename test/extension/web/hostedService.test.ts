import { describe, expect, it } from 'vitest';
import { link } from '../../../core/protocol/rpc';
import { hostedService } from '../../../extension/web/hostedService';

// A worker's script in miniature, as the bundler writes one: it answers a call with the bytes it got.
const script = `(() => {
  const scope = globalThis;
  scope.addEventListener('message', ({ data }) => {
    if (data.rpc !== 'call') return;
    data.request.bytes[0]++;
    scope.postMessage({ rpc: 'reply', id: data.id, ok: data.request.bytes }, [data.request.bytes.buffer]);
  });
})();`;

interface Calls {
  count(request: { bytes: Uint8Array }): Promise<Uint8Array>;
}

describe("a worker's script that runs in the host", () => {
  it('gets copies and answers over the same channel', async () => {
    const { call } = link<{ count: Calls['count'] }>(hostedService(script), {});
    const bytes = Uint8Array.of(1, 2);
    expect(await call.count({ bytes })).toEqual(Uint8Array.of(2, 2));
    expect(bytes).toEqual(Uint8Array.of(1, 2));
  });

  it('does not leave its names in the host', () => {
    hostedService(script);
    expect('addEventListener' in globalThis).toBe(false);
  });

  it('says nothing once it was ended', async () => {
    const port = hostedService(script);
    const { call } = link<{ count: Calls['count'] }>(port, {});
    let answered = false;
    void call.count({ bytes: Uint8Array.of(1) }).then(() => {
      answered = true;
    });
    port.terminate();
    await new Promise((resolve) => setTimeout(resolve, 30));
    expect(answered).toBe(false);
  });
});
