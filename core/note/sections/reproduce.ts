import { visible } from '../../figures/visible';
import type { DesignResult } from '../../pipeline/designResult';
import { name, section, table } from '../markdown';

/** The commands that make these files again, and the digests of what they were made from. */
export function reproduce(result: DesignResult, digest: string): string {
  const file = shellWord(result.documentFile);
  return section(
    'How to reproduce',
    result.recordings.some((recording) => recording.file.startsWith('../'))
      ? 'From the folder that holds the pairing document and the recordings, with the path of the document from there:'
      : 'In the folder of the pairing document:',
    `\`\`\`sh\ntapwright design ${file}\ntapwright check ${file}\n\`\`\``,
    'The first command writes the same bytes again on every platform; the second writes nothing and exits with 0 where files, document and recordings still belong together.',
    table(
      ['what', 'SHA-256'],
      [
        [`${name(result.documentFile)} (its meaning; layout does not count)`, result.documentSha256],
        ...result.recordings.map(({ file: recording, sha256 }) => [name(recording), sha256]),
        ['all of these, as in the first line of every file', digest],
      ],
    ),
    'These files carry no date and no name: the commit that adds them and its review do.',
  );
}

/** A file name as one word of a POSIX shell. */
function shellWord(text: string): string {
  const seen = visible(text);
  return /^[A-Za-z0-9._][A-Za-z0-9._/-]*$/.test(seen) ? seen : `'${seen.replace(/'/g, `'\\''`)}'`;
}
