import type { Track } from '../pair/take';
import type { Pairing } from './pairing';

/** What the stages depend on, as keys for {@link import('./keep').Keep}: digests instead of samples. */

/** The signals of every take and the rate. */
function signals({ takes, recordings, sampleRate }: Pairing): unknown {
  const track = ({ recording, channel }: Track) => [
    recording.file,
    recordings.get(recording.file)?.sha256,
    channel,
  ];
  return [sampleRate, takes.map(({ name, inputs, desired }) => [name, inputs.map(track), track(desired)])];
}

/** The means and powers. */
export function momentsKey(pairing: Pairing): unknown {
  const fits = pairing.takes.map(({ fit }) => fit);
  return [signals(pairing), fits, pairing.document.prepare.removeMean];
}

/** The sums of the normal equations. */
export function sumsKey(pairing: Pairing): unknown {
  const { length, delay, windowing } = pairing.document.filter;
  return [momentsKey(pairing), pairing.document.prepare.band, length, delay, windowing];
}

/** The solution. */
export function fitKey(pairing: Pairing): unknown {
  return [momentsKey(pairing), pairing.document.prepare, pairing.document.filter];
}

/** How sure the taps are; the tests of the residual are those of the job. */
export function confidenceKey(pairing: Pairing): unknown {
  return [fitKey(pairing), pairing.document.job];
}

/** The figures of the solution over the held-out data, in doubles and in the numbers of the target. */
export function measureKey(pairing: Pairing): unknown {
  const { job, arithmetic } = pairing.document;
  return [fitKey(pairing), arithmetic, job, measuredKey(pairing)];
}

/** The inspection of the pair. */
export function inspectionKey(pairing: Pairing): unknown {
  const { job, takes } = pairing.document;
  return [fitKey(pairing), job, takes, measuredKey(pairing)];
}

/** Where figures are taken. */
export function measuredKey({ takes }: Pairing): unknown {
  return takes.map(({ heldOut, disturbanceOnly }) => [heldOut, disturbanceOnly]);
}
