import type { Job, PairingDocument } from '../../document/pairingDocument';
import { fixed, significant } from '../../figures/numbers';
import { type Finding, finding } from '../../findings/finding';
import type { Take, Track } from '../../pair/take';
import { channelLabel } from '../../recordings/recording';
import { type Acausality, reachBefore } from './causality';
import type { Drift } from './drift';
import type { Lag } from './lag';

/** What is known about one input of a take. */
export interface InputTiming {
  /** Number of the input. */
  input: number;
  /** Whether it and the desired signal are of different files. */
  twoClocks: boolean;
  lag: Lag;
  drift: Drift | null;
}

/**
 * Samples of drift over the fit that cost nothing one would notice: spread evenly they leave an error of
 * (2πf·0.1)²/12 of the power at frequency f (in cycles a sample), -21 dB at half the sample rate, -33 dB at an eighth.
 */
const harmlessDrift = 0.1;

/** The lag is known to this: less below a whole number is that number. */
const accuracy = 0.1;

/** Taps kept before the lag: a lag between two samples takes some on either side. */
function spareTaps(length: number): number {
  return Math.min(8, Math.floor(length / 8));
}

/**
 * A caution where the filter does not reach the lag, a note where it spends taps on it that a delay would save: half
 * of them, or any that are not spare where the files were started separately. For `equalise` the delay stands for
 * taps that are needed, so that only a lag out of reach counts.
 */
export function lagFinding(
  take: Take,
  { filter, job }: PairingDocument,
  timing: InputTiming,
): Finding | null {
  const { length, delay } = filter;
  const { samples } = timing.lag;
  const whole = Math.floor(samples + accuracy);
  const tap = samples + delay;
  // What lies a little before the first tap of one clock's files is the matter of `acausal`, which weighs it.
  const earliest = timing.twoClocks ? -0.5 : -reachBefore(length, take.inputs.length);
  const missed = tap > length - 1 || tap < earliest;
  const spare = spareTaps(length);
  const wasteful = job !== 'equalise' && whole + delay > (timing.twoClocks ? spare : length / 2);
  const offer = spare - whole;
  if ((!missed && !wasteful) || offer === delay) return null;
  const size = Math.abs(samples);
  return finding(
    'lag',
    {
      ...names(take, timing.input),
      lag: Number.isInteger(size) ? size : fixed(size, 1),
      order: samples < 0 ? 'before' : 'after',
      reach: missed
        ? `the filter reaches lags of ${-delay} to ${length - 1 - delay} only`
        : `the first ${whole + delay} of its ${length} taps are spent on waiting for it`,
      start: timing.twoClocks ? ' The files were started separately, which may be part of it.' : '',
      offer,
      spare,
    },
    { take: take.name, path: ['filter', 'delay'] },
    missed ? 'caution' : 'note',
  );
}

export function driftFinding(take: Take, t: number, { input, drift }: InputTiming): Finding | null {
  if (drift === null || !drift.proved || drift.cost < harmlessDrift) return null;
  return finding(
    'drift',
    {
      ...names(take, input),
      ppm: significant(drift.ppm, 3),
      error: significant(drift.standardError, 2),
      cost: significant(drift.cost, 2),
      limit: harmlessDrift,
    },
    { take: take.name, path: ['takes', t, 'inputs', input] },
  );
}

const cures: Record<Job, string> = {
  identify:
    'A real path has no such part: check that input and desired are not exchanged and that no recorder delays the input.',
  cancel: 'If the firmware cannot delay the desired signal so far, move the reference nearer to the source.',
  equalise: 'The output then comes later by as much.',
  predict: '',
};

export function acausalFinding({ job }: PairingDocument, found: Acausality): Finding {
  const { gainDb, standardErrorDb } = found.comparison;
  return finding(
    'acausal',
    {
      share: significant(100 * found.share, 2),
      gain: fixed(gainDb, 1),
      error: fixed(standardErrorDb, 1),
      delay: found.delay,
      caught: significant(100 * found.caught, 3),
      cure: cures[job],
    },
    { path: ['filter', 'delay'] },
  );
}

function names(take: Take, input: number): { input: string; desired: string } {
  const label = ({ recording, channel }: Track) => channelLabel(recording, channel);
  const [x, d] = [label(take.inputs[input]), label(take.desired)];
  const one = take.inputs[input].recording.file === take.desired.recording.file;
  return one
    ? { input: `channel ${x}`, desired: `channel ${d}` }
    : {
        input: `${take.inputs[input].recording.file}, channel ${x}`,
        desired: `${take.desired.recording.file}, channel ${d}`,
      };
}
