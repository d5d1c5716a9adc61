import { setTimeout as after } from 'node:timers/promises';

/** Far longer than anything takes by itself: the suite shares two cores with all other tests. */
export const patience = 45_000;

/**
 * Asks again and again until the answer is neither null, undefined nor false.
 * @param what names the condition in the complaint
 * @throws Error when patience ends, with the last error of `ask`
 */
export async function until<T>(
  what: string,
  ask: () => Promise<T | null | undefined | false> | T | null | undefined | false,
  within = patience,
): Promise<T> {
  const end = Date.now() + within;
  let trouble = '';
  for (;;) {
    try {
      const answer = await ask();
      if (answer !== null && answer !== undefined && answer !== false) return answer;
    } catch (error) {
      trouble = `; last: ${error instanceof Error ? error.message : error}`;
    }
    if (Date.now() > end) throw new Error(`waited ${within / 1000} s for ${what}${trouble}`);
    await after(50);
  }
}
