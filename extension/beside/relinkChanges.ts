import { readDocument } from '../../core/document/readDocument';
import { mentionsIn } from '../../core/pipeline/openRecordings';
import type { Change } from '../../core/protocol/messages';

/**
 * The changes that let every mention of a recording in a document name another file.
 * @param text of the document; one that cannot be read has none
 */
export function relinkChanges(text: string, from: string, to: string): Change[] {
  const { document } = readDocument(text);
  const mentions = document === null ? [] : (mentionsIn(document).get(from) ?? []);
  return mentions.map(({ path }) => ({ path: [...path, 'file'], value: to }));
}
