import type { PairingDocument } from '../../document/pairingDocument';
import { bareFit } from '../../evaluation/measuredRuns';
import type { Finding } from '../../findings/finding';
import type { Pace } from '../../pace';
import type { Interval } from '../../pair/intervals';
import { type Means, type Signals, signalReader } from '../../pair/signals';
import type { Take, Track } from '../../pair/take';
import { powerFinding, responseFinding } from './changeFindings';
import { powerChange } from './power';
import { responseChange } from './response';

/**
 * Power and response compared between parts of each take's fit. Takes are not compared with each other: they may be
 * of different working points. For `cancel` the desired signal and the response are looked at while the disturbance is
 * alone.
 * @param drifting whether the lag between a take's files is known to change, which is why its response does
 */
export async function stationarityFindings(
  takes: readonly Take[],
  document: PairingDocument,
  means: Means,
  pace: Pace,
  drifting: (take: Take) => boolean,
): Promise<Finding[]> {
  const findings: Finding[] = [];
  for (const [t, take] of takes.entries()) {
    // The wanted signal comes and goes as it likes.
    const bare = document.job === 'cancel' ? bareFit(take) : take.fit;
    const read = signalReader(take, { means, delay: 0 });
    const check = async (track: Track, pick: (signals: Signals) => Float64Array, where: Interval[]) => {
      const change = await powerChange(read, pick, where, pace);
      const found = change && powerFinding(take, t, track, change);
      if (found !== null) findings.push(found);
      return found !== null;
    };
    let changes = false;
    for (const [r, track] of take.inputs.entries()) {
      changes = (await check(track, ({ inputs }) => inputs[r], take.fit)) || changes;
    }
    // Where an input changes, the desired signal follows it.
    if (!changes && !take.inputs.some((input) => sameChannel(input, take.desired))) {
      await check(take.desired, ({ desired }) => desired, bare);
    }
    if (drifting(take)) continue;
    const change = await responseChange(take, bare, document, means, pace);
    if (change !== null) findings.push(responseFinding(take, t, change));
  }
  return findings;
}

function sameChannel(a: Track, b: Track): boolean {
  return a.recording.file === b.recording.file && a.channel === b.channel;
}
