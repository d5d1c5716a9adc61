import type { Check, ItemCheck } from './check';
import { describe } from './describe';

/** A list of `min` to `max` items, each of which passes the check. A longer list is not looked into. */
export function listOf<T>(item: ItemCheck<T>, min: number, max: number): Check<T[]> {
  return (value, at) => {
    if (!Array.isArray(value)) return at.report('not-a-list', { got: describe(value) });
    if (value.length < min) return at.report('list-too-short', { got: value.length, min });
    if (value.length > max) return at.report('list-too-long', { got: value.length, max });
    const items = value.map((entry, index) => item(entry, at.inside(index), index));
    return items.every((entry) => entry !== undefined) ? items : undefined;
  };
}

/** A list without repetitions. */
export function distinct<T extends string | number>(list: Check<T[]>): Check<T[]> {
  return (value, at) => {
    const items = list(value, at);
    items?.forEach((item, index) => {
      if (items.indexOf(item) < index) at.inside(index).report('listed-twice', { got: item });
    });
    return items;
  };
}
