import type { At, Check } from '../checks/check';
import { orNull } from '../checks/check';
import { objectOf } from '../checks/keys';
import { listOf } from '../checks/lists';
import { label } from '../checks/texts';
import type { TakeEntry, TrackEntry } from '../pairingDocument';
import { intervals } from './intervals';
import { track } from './track';

/** Takes of a document at most. */
const mostTakes = 1000;

/** Inputs of a take at most. */
export const mostInputs = 64;

/** The takes: their names differ, and each has as many inputs as the first. */
export const takes: Check<TakeEntry[]> = (value, at) =>
  listOf(takeAfter({ names: new Map(), inputs: null }), 1, mostTakes)(value, at);

/** What the takes before have settled. */
interface Earlier {
  /** Number of the take, from 1, by its name. */
  names: Map<string, number>;
  inputs: number | null;
}

function takeAfter(earlier: Earlier) {
  return (value: unknown, at: At, index: number): TakeEntry | undefined =>
    objectOf<TakeEntry>((keys) => {
      const name = keys.optional('name', label, `take ${index + 1}`);
      const inputs = keys.required('inputs', listOf(track, 1, mostInputs));
      const desired = keys.required('desired', track);
      const fit = keys.optional('fit', orNull(intervals(1)), null);
      const heldOut = keys.optional('heldOut', orNull(intervals(0)), null);
      const disturbanceOnly = keys.optional('disturbanceOnly', intervals(0), []);
      checkName(name, index + 1, earlier, at);
      if (inputs !== undefined) checkInputs(inputs, earlier, at);
      return inputs && desired && { name, inputs, desired, fit, heldOut, disturbanceOnly };
    })(value, at);
}

function checkName(name: string, number: number, earlier: Earlier, at: At): void {
  const first = earlier.names.get(name);
  if (first === undefined) earlier.names.set(name, number);
  else at.inside('name').report('take-name-twice', { name, first, second: number });
}

function checkInputs(inputs: TrackEntry[], earlier: Earlier, at: At): void {
  earlier.inputs ??= inputs.length;
  if (inputs.length !== earlier.inputs) {
    at.inside('inputs').report('input-count-differs', { got: inputs.length, expected: earlier.inputs });
  }
}
