/** Node alone has it. */
declare const setImmediate: ((callback: () => void) => unknown) | undefined;

/**
 * Lets the event loop handle whatever waits, without the pause of a millisecond (four, once nested, in browsers) that a
 * timer takes at least.
 */
export const giveWay: () => Promise<void> =
  typeof setImmediate === 'function'
    ? () =>
        new Promise((resolve) => {
          setImmediate(resolve);
        })
    : byMessages();

/** A message to oneself comes after those that wait already. */
function byMessages(): () => Promise<void> {
  const { port1, port2 } = new MessageChannel();
  const waiting: (() => void)[] = [];
  port1.onmessage = () => waiting.shift()?.();
  return () =>
    new Promise((resolve) => {
      waiting.push(resolve);
      port2.postMessage(null);
    });
}
