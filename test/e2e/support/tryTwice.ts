import type { SecondTries } from './secondTries';

/**
 * Runs a flow, and where it fails once more. A browser on a busy machine may fail once in a run; twice is no accident.
 * @param run one try, from its very start
 * @param afterFailure clears away what a failed try left; what it returns is added to the complaint
 * @throws Error when both tries fail, or when another flow of this run needed its second try already
 */
export async function tryTwice(
  flow: string,
  run: () => Promise<void>,
  afterFailure: () => Promise<string>,
  tries: SecondTries,
): Promise<void> {
  let first: string;
  try {
    await run();
    return;
  } catch (error) {
    first = `${describe(error)}\n${await afterFailure()}`;
  }
  try {
    await run();
  } catch (error) {
    const last = `${describe(error)}\n${await afterFailure()}`;
    throw new Error(`${flow} failed twice.\nFirst: ${first}\nThen: ${last}`);
  }
  const all = tries.add(flow);
  console.warn(`passed on the second try: ${flow}. First: ${first}`);
  if (all.length > 1)
    throw new Error(`more than one flow needed a second try: ${all.join('; ')}. First: ${first}`);
}

function describe(error: unknown): string {
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}
