import { locateFinding } from '../document/locate';
import { visible } from '../figures/visible';
import type { Finding } from '../findings/finding';
import { placeInWords, placeParts, say, sentenceOf } from '../findings/say';
import type { FindingView } from '../protocol/views';

/**
 * A finding as the page shows it.
 * @param text of the document; null where there is none to look places up in
 */
export function findingView(found: Finding, text: string | null): FindingView {
  const inDocument = text !== null && (found.path !== undefined || found.file === undefined);
  return {
    code: found.code,
    severity: found.severity,
    text: visible(say(found)),
    place: visible(placeInWords(found)),
    sentence: sentenceOf(found),
    placeParts: placeParts(found),
    file: found.file ?? null,
    take: found.take ?? null,
    channel: found.channel ?? null,
    span:
      found.from === undefined || found.code === 'interval-past-end'
        ? null
        : { from: found.from, to: found.to ?? found.from + 1 },
    path: found.path === undefined ? null : [...found.path],
    position: inDocument ? locateFinding(text, found) : null,
  };
}
