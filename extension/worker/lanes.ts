import { filterStretch } from '../../core/evaluation/filterStretch';
import type { Pace } from '../../core/pace';
import { signalReader } from '../../core/pair/signals';
import type { Take } from '../../core/pair/take';
import type { Envelope, EnvelopeRequest, Lane } from '../../core/protocol/messages';
import { addToColumns, type Columns, columnsFromOutline, planColumns } from '../../core/recordings/envelope';
import type { Outline } from '../../core/recordings/outline';
import type { Recording } from '../../core/recordings/recording';
import type { SessionResults } from './session';

/** A channel behind a lane, with its outline where one was made. */
interface Source {
  recording: Recording;
  channel: number;
  outline: Outline | undefined;
}

const blockSamples = 65536;

/**
 * Envelopes of some lanes over a stretch of samples.
 * @throws Error where the lane or the take is not there, or the filter is not known yet
 */
export async function envelopeOf(
  left: SessionResults,
  { take, lanes, from, to, columns }: EnvelopeRequest,
  pace: Pace,
): Promise<Envelope> {
  const start = Math.max(0, Math.floor(from));
  const end = Math.max(start, Math.ceil(to));
  const sources = lanes.map((lane) => ({ lane, source: sourceOf(left, take, lane) }));
  // One grid for all: as coarse as the coarsest outline, whose step is a multiple of the others'.
  const run = sources.some(({ source }) => source === null)
    ? 0
    : Math.max(...sources.map(({ source }) => source?.outline?.step ?? 0));
  const rows = sources.map((row) => ({ ...row, columns: planColumns(start, end, columns, run) }));
  for (const { source, columns: into } of rows) {
    if (source === null) continue;
    if (source.outline !== undefined && run > 0 && into.step >= run) columnsFromOutline(into, source.outline);
    else await readColumns(into, source, end, pace);
  }
  const filtered = rows.filter(({ source }) => source === null);
  if (filtered.length > 0) {
    await eachRun(left, take, start, end, pace, (signals, at) => {
      for (const row of filtered) addToColumns(row.columns, signals[row.lane as keyof typeof signals], at);
    });
  }
  const [first] = rows;
  return {
    from: first?.columns.from ?? start,
    step: first?.columns.step ?? 1,
    lanes: rows.map(({ lane, columns: { low, high } }) => ({ lane, low, high })),
  };
}

function isRun(lane: Lane): boolean {
  return lane === 'target' || lane === 'output' || lane === 'error';
}

/** Null for lanes of the run. */
export function sourceOf(left: SessionResults, take: number, lane: Lane): Source | null {
  if (isRun(lane)) return null;
  const [kind, number] = lane.split(':');
  if (kind === 'channel') {
    const opened = left.recording?.opened;
    const channel = Number(number);
    if (opened == null || !(channel < opened.recording.channels.length)) throw new Error(`no lane ${lane}`);
    return { recording: opened.recording, channel, outline: opened.outlines[channel] };
  }
  const tracks = left.read?.takes[take];
  const track = kind === 'desired' ? tracks?.desired : tracks?.inputs[Number(number)];
  if (track === undefined) throw new Error(`no lane ${lane} in take ${take}`);
  const opened = left.read?.recordings.get(track.recording.file);
  return { ...track, outline: opened?.outlines[track.channel] };
}

async function readColumns(
  columns: Columns,
  { recording, channel }: Source,
  to: number,
  pace: Pace,
): Promise<void> {
  const end = Math.min(to, recording.samples);
  for (let n = columns.from; n < end; n += blockSamples) {
    const [samples] = await recording.read([channel], n, Math.min(end, n + blockSamples));
    addToColumns(columns, samples, n);
    await pace.step('waveform', n, end);
  }
}

/** Runs the last fit over a stretch of a take; NaN where the delay asks for desired samples beyond the recording. */
export async function eachRun(
  left: SessionResults,
  take: number,
  from: number,
  to: number,
  pace: Pace,
  visit: (signals: { target: Float64Array; output: Float64Array; error: Float64Array }, at: number) => void,
): Promise<void> {
  const { fit, read } = left;
  const of: Take | undefined = read?.takes[take];
  if (fit === null || of === undefined) throw new Error('there is no filter to show the output of');
  const { coefficients, means, delay } = fit.filter;
  if (coefficients.length !== of.inputs.length) throw new Error('the filter is of other inputs');
  const reader = signalReader(of, { means, delay });
  const recorded = of.desired.recording.samples;
  await filterStretch(reader, { from, to }, coefficients, pace, ({ from: at, desired, output }) => {
    const first = at - delay;
    const target = desired.map((value, n) => (first + n >= 0 && first + n < recorded ? value : Number.NaN));
    const error = target.map((value, n) => value - output[n]);
    visit({ target, output, error }, at);
  });
}
