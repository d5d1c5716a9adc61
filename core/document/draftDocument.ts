import { type Json, jsonText } from '../files/jsonText';
import { withDefaults } from './checks/keys';
import { controlCharacters, longestLabel } from './checks/texts';
import { documentVersion, type Job, type TrackEntry } from './pairingDocument';
import { defaultTitle } from './readDocument';
import { arithmetic } from './sections/arithmetic';
import { filter } from './sections/filter';
import { prepare } from './sections/prepare';
import { write } from './sections/write';

/** What a new document is drawn from. */
export interface Draft {
  /** Any text; what a title cannot hold is left out. */
  title: string;
  job: Job;
  inputs: TrackEntry[];
  desired: TrackEntry;
  /** Hz, to write into the document; null where the files carry it. */
  sampleRate: number | null;
  /** Samples that all tracks have. */
  samples: number;
  /** Hz, of the recordings; null where nobody knows it, and intervals are in samples. */
  rate: number | null;
  /** Taps of each input. */
  length: number;
}

/**
 * The text of a new pairing document: one take, fitted over the first two thirds and held out over the last, and every
 * default that an engineer may want to turn written out. It has no findings if the tracks' paths have none.
 */
export function draftDocument(draft: Draft): string {
  const { job, inputs, desired, sampleRate, length } = draft;
  const title = cleanTitle(draft.title);
  // What only few will turn stays out of a new document.
  const { symmetry, ...shape } = withDefaults(filter(job, inputs.length), { length });
  const { cyclesPerMac, ...numbers } = withDefaults(arithmetic(inputs.length));
  const { attributes, ...written } = withDefaults(write(title));
  return jsonText({
    pairing: documentVersion,
    title,
    job,
    ...(sampleRate === null ? {} : { sampleRate }),
    takes: [{ name: 'take 1', inputs: inputs.map(track), desired: track(desired), ...split(draft) }],
    prepare: given(withDefaults(prepare)),
    filter: given(shape),
    arithmetic: given(numbers),
    write: given(written),
  });
}

function cleanTitle(title: string): string {
  const oneLine = title.replace(new RegExp(controlCharacters, 'gu'), ' ').trim();
  return [...oneLine].slice(0, longestLabel).join('').trim() || defaultTitle;
}

/** A first part with a colon would read as a URI scheme or a drive. */
function track({ file, channel }: TrackEntry): Json {
  return { file: /^[^/]*:/.test(file) ? `./${file}` : file, channel };
}

/** The values that stand for something: null is "left out". */
function given(section: object): Json {
  const entries = Object.entries(section).filter(([, value]) => value !== null);
  return Object.fromEntries(
    entries.map(([key, value]) => [key, isSection(value) ? given(value) : (value as Json)]),
  );
}

function isSection(value: unknown): value is object {
  return typeof value === 'object' && !Array.isArray(value);
}

/** Fit and held-out intervals, on round figures; none where there is nothing to share out. */
function split({ samples, rate }: Draft): { [key: string]: { [key: string]: Json } } {
  const length = rate === null ? samples : samples / rate;
  const parts = rate === null ? 1 : partsOfAUnit(length);
  // The quotient of whole seconds can come out a hair below them.
  const end = Math.floor(length * parts * (1 + 1e-15));
  const cut = Math.floor((2 * end) / 3);
  if (cut < 1 || cut >= end) return {};
  const unit: { [key: string]: Json } = rate === null ? { samples: true } : {};
  return {
    fit: { from: 0, to: cut / parts, ...unit },
    heldOut: { from: cut / parts, to: end / parts, ...unit },
  };
}

/** 1, 10, 100 ... parts of a second: as few as make a thousandth of the recording. */
function partsOfAUnit(seconds: number): number {
  let parts = 1;
  while (parts * seconds < 1000 && parts < 1e9) parts *= 10;
  return parts;
}
