import { describe, expect, it } from 'vitest';
import { newLastWins } from '../../../webview/plots/lastWins';

function setUp(needed: (request: number) => boolean = () => true) {
  const frames: (() => void)[] = [];
  const asked: { request: number; resolve(reply: string): void; reject(error: Error): void }[] = [];
  const heard: string[] = [];
  const requests = newLastWins<number, string>(
    (request) => new Promise((resolve, reject) => asked.push({ request, resolve, reject })),
    (callback) => frames.push(callback),
    needed,
    (reply) => heard.push(reply),
    (error) => heard.push(String(error)),
  );
  const frame = async () => {
    for (const callback of frames.splice(0)) callback();
    await new Promise((done) => setTimeout(done, 0));
  };
  return { requests, asked, heard, frame, frames };
}

describe('requests of which the last wins', () => {
  it('are asked once a frame, one at a time, the last of those wanted meanwhile', async () => {
    const { requests, asked, heard, frame } = setUp();
    for (const request of [1, 2, 3]) requests.want(request);
    await frame();
    expect(asked.map(({ request }) => request)).toEqual([3]);
    for (const request of [4, 5, 6]) {
      requests.want(request);
      await frame();
    }
    expect(asked.length).toBe(1);
    asked[0].resolve('three');
    await frame();
    await frame();
    expect(asked.map(({ request }) => request)).toEqual([3, 6]);
    expect(heard).toEqual(['three']);
  });

  it('go on after a failure', async () => {
    const { requests, asked, heard, frame } = setUp();
    requests.want(1);
    await frame();
    requests.want(2);
    asked[0].reject(new Error('gone'));
    await frame();
    await frame();
    expect(heard).toEqual(['Error: gone']);
    expect(asked.length).toBe(2);
  });

  it('are not heard once dropped, and do not hold up what comes after', async () => {
    const { requests, asked, heard, frame } = setUp();
    requests.want(1);
    await frame();
    requests.drop();
    requests.want(2);
    await frame();
    expect(asked.map(({ request }) => request)).toEqual([1, 2]);
    asked[0].resolve('old');
    asked[1].resolve('new');
    await frame();
    expect(heard).toEqual(['new']);
  });

  it('are left out where they are no longer needed when their turn comes', async () => {
    const { requests, asked, frame } = setUp((request) => request !== 2);
    requests.want(2);
    await frame();
    requests.want(3);
    await frame();
    expect(asked.map(({ request }) => request)).toEqual([3]);
  });
});
