import { type Finding, finding } from '../findings/finding';
import { totalLength } from '../pair/intervals';
import type { Moments } from '../pair/moments';
import type { Take, Track } from '../pair/take';
import { usedSegments } from '../pair/usedSegments';
import { channelLabel } from '../recordings/recording';
import { askedBand } from './askedBand';
import type { Pairing } from './pairing';

/** Unknowns that recursions and conjugate gradients solve within seconds. */
const mostUnknowns = 65_536;

/** Unknowns up to which a normal matrix can be formed: 512 MB. */
const mostDense = 8192;

/** Stretches of a longer system: each takes two transforms in every step of conjugate gradients, and their memory. */
const mostStretches = 32;

/** Blockers that can be told before anything is computed. */
export function checkPair(pairing: Pairing): Finding[] {
  const { document, takes, recordings } = pairing;
  const { length, delay } = document.filter;
  const findings: Finding[] = [];
  const band = askedBand(pairing);
  if (band !== null && 'severity' in band) findings.push(band);
  const history = band !== null && 'history' in band ? band.history : 0;
  const unknowns = length * takes[0].inputs.length;
  const used = takes.flatMap((take) => usedSegments(take, take.fit, length, delay, history));
  const tooLong = checkSize(pairing, unknowns, used.length);
  if (tooLong !== null) findings.push(tooLong);
  const samples = totalLength(used);
  if (samples < unknowns) {
    findings.push(finding('too-few-samples', { samples, unknowns }, { path: ['filter', 'length'] }));
  }
  const digest = (track: Track) => recordings.get(track.recording.file)?.sha256;
  takes.forEach((take, t) => {
    const same = take.inputs.some(
      (input) => digest(input) === digest(take.desired) && input.channel === take.desired.channel,
    );
    if (same && delay >= 0 && delay < length) {
      findings.push(
        finding('trivial', { delay, last: length - 1 }, { take: take.name, path: ['takes', t, 'desired'] }),
      );
    }
  });
  return findings;
}

/** @param stretches of usable samples, which leave edges in the normal matrix with `covariance` windowing */
function checkSize({ document }: Pairing, unknowns: number, stretches: number): Finding | null {
  const place = { path: ['filter', 'length'] };
  if (unknowns > mostUnknowns) return finding('too-many-taps', { unknowns, limit: mostUnknowns }, place);
  if (unknowns <= mostDense) return null;
  const { symmetry, windowing } = document.filter;
  if (symmetry !== 'none') return finding('too-many-mirrored', { unknowns, limit: mostDense }, place);
  if (windowing === 'covariance' && stretches > mostStretches) {
    const values = { unknowns, stretches, limit: mostDense, most: mostStretches };
    return finding('too-many-stretches', values, place);
  }
  return null;
}

/** Signals that are constant over the fit intervals. */
export function checkSilence(takes: readonly Take[], moments: Moments): Finding[] {
  const findings: Finding[] = [];
  const check = (track: Track, power: number) => {
    if (power > 0) return;
    const place = { file: track.recording.file, channel: channelLabel(track.recording, track.channel) };
    findings.push(finding('silent', {}, place));
  };
  takes[0].inputs.forEach((track, r) => {
    check(track, moments.inputPowers[r]);
  });
  check(takes[0].desired, moments.desiredPower);
  return findings;
}
