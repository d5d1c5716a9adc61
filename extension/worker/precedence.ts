/** Which of several computing sessions goes on: the one that was asked last, since that is the one someone looks at. */
export interface Precedence {
  begin(session: string): void;
  end(session: string): void;
  /** True while a session that was asked later is at work; one that was not begun gives way to all. */
  isHeldUp(session: string): boolean;
}

export function newPrecedence(): Precedence {
  let last = 0;
  const asked = new Map<string, number>();
  return {
    begin(session) {
      asked.set(session, ++last);
    },
    end(session) {
      asked.delete(session);
    },
    isHeldUp(session) {
      const own = asked.get(session) ?? 0;
      return [...asked].some(([other, when]) => other !== session && when > own);
    },
  };
}
