/** Asks for something at most once a frame and one at a time; of what is wanted meanwhile only the last is asked. */
export interface LastWins<Request> {
  want(request: Request): void;
  /** What is under way or wanted is not heard any more. */
  drop(): void;
}

/**
 * @param ask starts a request
 * @param frame calls back at the next frame
 * @param needed whether a request is still worth asking when its turn comes
 */
export function newLastWins<Request, Reply>(
  ask: (request: Request) => Promise<Reply>,
  frame: (callback: () => void) => void,
  needed: (request: Request) => boolean,
  heard: (reply: Reply, request: Request) => void,
  failed: (error: unknown) => void,
): LastWins<Request> {
  let wanted: { request: Request } | null = null;
  let asking = false;
  let framed = false;
  let round = 0;
  const next = () => {
    if (framed || asking || wanted === null) return;
    framed = true;
    frame(() => {
      framed = false;
      if (wanted === null || asking) return;
      const { request } = wanted;
      const mine = round;
      wanted = null;
      if (!needed(request)) return;
      asking = true;
      const over = (then: () => void) => {
        // Of an earlier round: another request may be under way already.
        if (mine !== round) return;
        asking = false;
        then();
        next();
      };
      ask(request).then(
        (reply) => over(() => heard(reply, request)),
        (error) => over(() => failed(error)),
      );
    });
  };
  return {
    want(request) {
      wanted = { request };
      next();
    },
    drop() {
      round++;
      wanted = null;
      asking = false;
    },
  };
}
