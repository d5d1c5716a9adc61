import type { NewSha256 } from '../bytes/sha256';
import { designNote } from '../note/designNote';
import { choicePicture } from '../note/pictures/choice';
import { coherencePicture } from '../note/pictures/coherence';
import { impulsePicture } from '../note/pictures/impulse';
import { magnitudePicture } from '../note/pictures/magnitude';
import { spectraPicture } from '../note/pictures/spectra';
import type { DesignResult } from '../pipeline/designResult';
import { cFilterHeader, cFilterSource } from './cFilter';
import { csvTaps } from './csvTaps';
import { cTaps } from './cTaps';
import { cVectors } from './cVectors';
import { documentStem } from './documentStem';
import { type Mark, madeFromDigest, markLine } from './generatedMark';
import { npyTaps } from './npyTaps';
import { rustTaps } from './rustTaps';
import { rustVectors } from './rustVectors';
import { closeSelfDigest } from './selfDigest';
import { tapsJson } from './tapsJson';

/** A file to be written. */
export interface DesignFile {
  /** Relative to the document's folder, with `/` between parts. */
  path: string;
  bytes: Uint8Array;
}

/**
 * All files of a design, the same bytes for the same result on every platform. `NAME.taps.json` is the last and lists the
 * digests of the others by their paths from its own folder, and its own.
 */
export function designFiles(result: DesignResult, newSha256: NewSha256): DesignFile[] {
  const stem = documentStem(result.documentFile);
  const mark: Mark = {
    document: result.documentFile,
    digest: madeFromDigest(
      newSha256,
      result.documentSha256,
      result.recordings.map(({ sha256 }) => sha256),
    ),
  };
  const others = [...sources(result, mark), ...note(result, mark, stem)];
  const digests: Record<string, string> = {};
  for (const { path, bytes } of others) {
    const sha = newSha256();
    sha.update(bytes);
    digests[path] = sha.hex();
  }
  const all = [
    ...others,
    text(`${stem}.taps.json`, closeSelfDigest(tapsJson(result, mark, digests), newSha256)),
  ];
  const folder = result.document.write.folder.replace(/^(\.\/+)+/, '').replace(/\/+$/, '');
  return folder === '' || folder === '.'
    ? all
    : all.map(({ path, bytes }) => ({ path: `${folder}/${path}`, bytes }));
}

/** The coefficients in the languages asked for, and test vectors where the language has them. */
function sources(result: DesignResult, mark: Mark): DesignFile[] {
  const { symbol, languages } = result.document.write;
  const files: DesignFile[] = [];
  const vectors = result.vectors.expected.length > 0;
  if (languages.includes('c') || languages.includes('c-source')) {
    files.push(text(`${symbol}_taps.h`, cTaps(result, mark)));
    if (vectors) files.push(text(`${symbol}_vectors.h`, cVectors(result, mark)));
  }
  if (languages.includes('c-source')) {
    files.push(text(`${symbol}_filter.h`, cFilterHeader(result, mark)));
    files.push(text(`${symbol}_filter.c`, cFilterSource(result, mark)));
  }
  if (languages.includes('rs')) {
    files.push(text(`${symbol}_taps.rs`, rustTaps(result, mark)));
    if (vectors) files.push(text(`${symbol}_vectors.rs`, rustVectors(result, mark)));
  }
  if (languages.includes('csv')) files.push(text(`${symbol}_taps.csv`, csvTaps(result, mark)));
  if (languages.includes('npy')) files.push({ path: `${symbol}_taps.npy`, bytes: npyTaps(result, mark) });
  return files;
}

function note(result: DesignResult, mark: Mark, stem: string): DesignFile[] {
  const line = markLine(mark, 'markup');
  const coherence = coherencePicture(result, line);
  const choice = choicePicture(result, line);
  return [
    text(`${stem}.note.md`, designNote(result, mark, stem)),
    text(`${stem}.note/impulse.svg`, impulsePicture(result, line)),
    text(`${stem}.note/magnitude.svg`, magnitudePicture(result, line)),
    text(`${stem}.note/spectra.svg`, spectraPicture(result, line)),
    ...(choice === null ? [] : [text(`${stem}.note/choice.svg`, choice)]),
    ...(coherence === null ? [] : [text(`${stem}.note/coherence.svg`, coherence)]),
  ];
}

function text(path: string, content: string): DesignFile {
  return { path, bytes: new TextEncoder().encode(content) };
}
