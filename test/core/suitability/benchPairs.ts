import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { memorySource } from '../../../core/bytes/byteSource';
import type { PairingDocument } from '../../../core/document/pairingDocument';
import { readDocument } from '../../../core/document/readDocument';
import { measureMoments } from '../../../core/pair/moments';
import { resolveTakes } from '../../../core/pair/resolveTakes';
import type { Means } from '../../../core/pair/signals';
import type { Take } from '../../../core/pair/take';
import { openRecording } from '../../../core/recordings/openRecording';
import type { Recording } from '../../../core/recordings/recording';
import { pace } from '../../support/takes';

const folder = fileURLToPath(new URL('../../../media/bench/', import.meta.url));

export const benchDocuments = ['belt.pairing.json', 'valve.pairing.json', 'tubing.pairing.json'];

/** A pairing of the sample bench as the inspection gets it. */
export async function benchPair(
  name: string,
): Promise<{ document: PairingDocument; takes: Take[]; means: Means }> {
  const document = readDocument(readFileSync(folder + name, 'utf8')).document!;
  const recordings = new Map<string, Recording>();
  for (const { file } of document.takes.flatMap(({ inputs, desired }) => [...inputs, desired])) {
    if (recordings.has(file)) continue;
    const source = memorySource(new Uint8Array(readFileSync(folder + file)));
    recordings.set(file, (await openRecording(source, file, pace)).recording!);
  }
  const { takes } = resolveTakes(document, recordings);
  const { means } = await measureMoments(takes, document.prepare.removeMean, pace);
  return { document, takes, means };
}
