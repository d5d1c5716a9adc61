import type { IntervalEntry, PairingDocument, TakeEntry, TrackEntry } from '../document/pairingDocument';
import { type Finding, finding } from '../findings/finding';
import { channelMissing, findChannel } from '../recordings/findChannel';
import type { Recording } from '../recordings/recording';
import { complement, firstOverlap, type Interval, wholeSample } from './intervals';
import { inputSamples, type Take, type Track } from './take';

export interface ResolvedTakes {
  takes: Take[];
  /** Hz, common to all recordings; 0 where a blocker says that it is missing. */
  sampleRate: number;
  findings: Finding[];
}

type Path = readonly (string | number)[];

/**
 * Turns the document's takes into tracks and whole samples: channels by name or number, intervals in seconds rounded
 * to the nearest sample, defaults where keys were left out. Whatever does not fit the recordings is a finding.
 * @param recordings by file name as the document has it; a file that is missing here has its finding already
 */
export function resolveTakes(
  document: PairingDocument,
  recordings: ReadonlyMap<string, Recording>,
): ResolvedTakes {
  const findings: Finding[] = [];
  const sampleRate = commonRate(document, [...recordings.values()], findings);
  const takes: Take[] = [];
  document.takes.forEach((entry, t) => {
    const take = resolveTake(entry, ['takes', t], recordings, sampleRate, findings);
    if (take !== null) takes.push(take);
  });
  return { takes, sampleRate, findings };
}

/** Rates within a millionth of each other are the same: text recordings print their times with few digits. */
function commonRate(
  document: PairingDocument,
  recordings: readonly Recording[],
  findings: Finding[],
): number {
  let rate = document.sampleRate;
  let from = 'the document';
  for (const recording of recordings) {
    const own = recording.sampleRate;
    if (own === null) continue;
    if (rate !== null && Math.abs(own - rate) > 1e-6 * rate) {
      findings.push(
        finding(
          'rate-differs',
          { rate: own, expected: rate, other: from },
          { file: recording.file },
          'blocker',
        ),
      );
    } else if (rate === null) {
      rate = own;
      from = recording.file;
    }
  }
  if (rate === null && recordings.length > 0) {
    findings.push(finding('rate-missing', {}, { file: recordings[0].file, path: [] }, 'blocker'));
  }
  return rate ?? 0;
}

function resolveTake(
  entry: TakeEntry,
  path: Path,
  recordings: ReadonlyMap<string, Recording>,
  sampleRate: number,
  findings: Finding[],
): Take | null {
  const inputs = entry.inputs.map((track, i) =>
    resolveTrack(track, [...path, 'inputs', i], recordings, findings),
  );
  const desired = resolveTrack(entry.desired, [...path, 'desired'], recordings, findings);
  if (desired === null || inputs.includes(null) || sampleRate === 0) return null;
  const take: Take = {
    name: entry.name,
    inputs: inputs.filter((track) => track !== null),
    desired,
    fit: [],
    heldOut: [],
    disturbanceOnly: [],
  };
  const samples = Math.min(inputSamples(take), desired.recording.samples);
  noteLengths(take, samples, findings);

  const place = (key: 'fit' | 'heldOut' | 'disturbanceOnly', entries: readonly IntervalEntry[]) =>
    resolveIntervals(entries, samples, sampleRate, take.name, [...path, key], findings);
  if (entry.fit === null && entry.heldOut === null) {
    const split = Math.floor((2 * samples) / 3);
    take.fit = [{ from: 0, to: split }];
    take.heldOut = [{ from: split, to: samples }];
  } else {
    take.heldOut = place('heldOut', entry.heldOut ?? []);
    take.fit = entry.fit === null ? complement(take.heldOut, samples) : place('fit', entry.fit);
  }
  take.disturbanceOnly = place('disturbanceOnly', entry.disturbanceOnly);
  noteOverlap(take, path, findings);
  if (take.fit.length === 0) {
    findings.push(finding('no-fit-interval', {}, { take: take.name, path: [...path, 'fit'] }));
  }
  return take;
}

function resolveTrack(
  { file, channel }: TrackEntry,
  path: Path,
  recordings: ReadonlyMap<string, Recording>,
  findings: Finding[],
): Track | null {
  const recording = recordings.get(file);
  if (recording === undefined) return null;
  const number = findChannel(recording, channel);
  if (number !== null) return { recording, channel: number };
  findings.push(channelMissing(recording, channel, { path: [...path, 'channel'] }));
  return null;
}

function noteLengths(take: Take, samples: number, findings: Finding[]): void {
  for (const track of [...take.inputs, take.desired]) {
    const { recording } = track;
    if (
      recording.samples !== samples &&
      !findings.some((f) => f.code === 'length-differs' && f.file === recording.file)
    ) {
      findings.push(
        finding(
          'length-differs',
          { samples: recording.samples, common: samples },
          { file: recording.file, take: take.name },
        ),
      );
    }
  }
}

function resolveIntervals(
  entries: readonly IntervalEntry[],
  samples: number,
  sampleRate: number,
  take: string,
  path: Path,
  findings: Finding[],
): Interval[] {
  const intervals: Interval[] = [];
  entries.forEach((entry, i) => {
    const scale = entry.samples ? 1 : sampleRate;
    const from = wholeSample(entry.from, scale);
    const to = wholeSample(entry.to, scale);
    const where = { take, path: entries.length > 1 ? [...path, i] : path };
    if (to <= from) {
      findings.push(finding('interval-empty', { from, to }, where));
    } else if (to > samples) {
      findings.push(
        finding('interval-past-end', { to, samples, seconds: samples / sampleRate }, { ...where, from, to }),
      );
    } else intervals.push({ from, to });
  });
  return intervals.sort((a, b) => a.from - b.from);
}

function noteOverlap(take: Take, path: Path, findings: Finding[]): void {
  const report = (key: string, pair: [Interval, Interval] | null) => {
    if (pair === null) return;
    const [first, second] = pair;
    const place = {
      take: take.name,
      path: [...path, key],
      from: second.from,
      to: Math.min(first.to, second.to),
    };
    findings.push(finding('interval-overlap', { from: place.from, to: place.to }, place));
  };
  report('heldOut', firstOverlap([...take.fit, ...take.heldOut].sort((a, b) => a.from - b.from)));
  report('disturbanceOnly', firstOverlap(take.disturbanceOnly));
}
