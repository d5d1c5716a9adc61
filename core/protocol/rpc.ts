/** Requests, replies and notices over any channel of messages; the same code serves page, host and worker. */

export type Frame =
  | { rpc: 'call'; id: number; method: string; request: unknown }
  | { rpc: 'reply'; id: number; ok: unknown }
  | { rpc: 'reply'; id: number; error: string }
  | { rpc: 'tell'; notice: unknown };

/** One end of a channel. */
export interface Port {
  post(message: Frame, transfer?: ArrayBuffer[]): void;
  /** Called once. */
  listen(receive: (message: Frame) => void): void;
}

// biome-ignore lint/suspicious/noExplicitAny: any function of one argument
export type Calls<T> = { [M in keyof T]: (request: any) => Promise<any> };

/** The other end as functions. */
export type Remote<T extends Calls<T>> = {
  [M in keyof T]: (request: Parameters<T[M]>[0]) => ReturnType<T[M]>;
};

export interface Link<Theirs extends Calls<Theirs>> {
  call: Remote<Theirs>;
  /** Sends a notice that nobody answers. */
  tell(notice: unknown, transfer?: ArrayBuffer[]): void;
  /** Ends every waiting call with this error: the other end is gone. */
  fail(why: string): void;
}

/**
 * Joins both directions over a port. A handler that throws reaches its caller as an error with the same message.
 * @param own what the other end may call
 * @param hear gets the notices
 */
export function link<Theirs extends Calls<Theirs>, Own extends Calls<Own> = Record<never, never>>(
  port: Port,
  own: Own,
  hear: (notice: never) => void = () => {},
): Link<Theirs> {
  let last = 0;
  let gone: string | null = null;
  const waiting = new Map<number, { resolve: (value: unknown) => void; reject: (error: Error) => void }>();
  port.listen((message) => {
    if (message.rpc === 'tell') hear(message.notice as never);
    else if (message.rpc === 'call') void answer(port, own, message);
    else {
      const asked = waiting.get(message.id);
      waiting.delete(message.id);
      if ('error' in message) asked?.reject(new Error(message.error));
      else asked?.resolve(message.ok);
    }
  });
  const call = (method: string, request: unknown) =>
    new Promise<unknown>((resolve, reject) => {
      if (gone !== null) return reject(new Error(gone));
      const id = ++last;
      waiting.set(id, { resolve, reject });
      port.post({ rpc: 'call', id, method, request });
    });
  return {
    call: new Proxy({} as Remote<Theirs>, {
      get: (_target, method) => (request: unknown) => call(String(method), request),
    }),
    tell: (notice, transfer) => port.post({ rpc: 'tell', notice }, transfer),
    fail(why) {
      gone = why;
      for (const { reject } of waiting.values()) reject(new Error(why));
      waiting.clear();
    },
  };
}

async function answer<Own extends Calls<Own>>(
  port: Port,
  own: Own,
  { id, method, request }: Extract<Frame, { rpc: 'call' }>,
): Promise<void> {
  try {
    if (!Object.hasOwn(own, method)) throw new Error(`nobody answers ${method}`);
    port.post({ rpc: 'reply', id, ok: await own[method as keyof Own](request) });
  } catch (error) {
    port.post({ rpc: 'reply', id, error: error instanceof Error ? error.message : String(error) });
  }
}
