import { beltScenario } from './beltScenario';
import { heldOutErrors, nmseDb } from './heldOutError';
import type { Scenario } from './scenario';
import { tubingScenario } from './tubingScenario';
import { valveScenario } from './valveScenario';

/** The three sample pairings. */
export function benchScenarios(): Scenario[] {
  return [beltScenario(), valveScenario(), tubingScenario()];
}

/** All that is made of them: the recordings, and `ideal.json` with what a perfect design would reach. */
export function benchFiles(scenarios: Scenario[]): Map<string, Uint8Array> {
  const ideals = Object.fromEntries(scenarios.map((scenario) => [scenario.document, ideal(scenario)]));
  const files = new Map(scenarios.flatMap((scenario) => [...scenario.files]));
  return files.set('ideal.json', new TextEncoder().encode(`${JSON.stringify(ideals, null, 2)}\n`));
}

function ideal({ takes, idealRows, delay, how }: Scenario) {
  const errors = heldOutErrors(takes, idealRows, delay);
  return {
    idealNmseDb: twoDigits(nmseDb(errors)),
    takes: takes.map(({ name }, t) => ({ name, idealNmseDb: twoDigits(nmseDb([errors[t]])) })),
    how,
  };
}

function twoDigits(decibels: number): number {
  return Number(decibels.toFixed(2));
}
