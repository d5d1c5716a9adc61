import type { At, Check } from '../checks/check';
import { describe } from '../checks/describe';
import { objectOf } from '../checks/keys';
import { wholeIn } from '../checks/numbers';
import { filePath } from '../checks/relativePath';
import { text } from '../checks/texts';
import type { TrackEntry } from '../pairingDocument';

/** One channel of a file; the first where none is named. */
export const track: Check<TrackEntry> = objectOf((keys) => {
  const file = keys.required('file', filePath);
  const channel = keys.optional('channel', nameOrNumber, 1);
  return file === undefined ? undefined : { file, channel };
});

const fromOne = wholeIn(1, Number.MAX_SAFE_INTEGER);

function nameOrNumber(value: unknown, at: At): string | number | undefined {
  if (typeof value === 'string') return text(value, at);
  if (typeof value === 'number') return fromOne(value, at);
  return at.report('not-a-channel', { got: describe(value) });
}
