import type { DesignChange } from '../comparison/compareDesigns';
import { roundedDecibels } from '../figures/decibels';
import type { Json } from './jsonText';

/** The change against the files that were there, as `--json` prints it. */
export function changeJson(change: DesignChange): Json {
  const { largest, response, values, length, delay, recordingsChanged } = change;
  return {
    largest: { ...largest },
    relative: change.relative,
    response: {
      differenceDb: roundedDecibels(response.differenceDb),
      differenceAt: response.differenceAt,
      magnitudeDb: roundedDecibels(response.magnitudeDb),
      magnitudeAt: response.magnitudeAt,
    },
    values: values && { ...values },
    length: { ...length },
    delay: { ...delay },
    heldOutNmseDb: figures(change.heldOutNmseDb),
    targetNmseDb: figures(change.targetNmseDb),
    documentChanged: change.documentChanged,
    recordingsChanged: [...recordingsChanged],
  };
}

function figures({ before, after }: DesignChange['heldOutNmseDb']): Json {
  return { before: roundedDecibels(before), after: roundedDecibels(after) };
}
