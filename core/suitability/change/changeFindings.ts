import { fixed, significant } from '../../figures/numbers';
import { type Finding, finding } from '../../findings/finding';
import type { Take, Track } from '../../pair/take';
import { channelLabel } from '../../recordings/recording';
import type { Crosstalk } from './crosstalk';
import type { PowerChange } from './power';
import type { ResponseChange } from './response';

/**
 * Ratio of powers, loudest part to quietest, below which all parts count for about the same in the fit: with half the
 * power (3 dB) a part has half the say.
 */
const harmlessRatio = 2;

/** A note: a filter fitted to signals of changing level is not wrong, but the loud part decides. */
export function powerFinding(take: Take, t: number, track: Track, change: PowerChange): Finding | null {
  const limit = Math.max(harmlessRatio, change.chance);
  if (change.ratio <= limit) return null;
  const label = channelLabel(track.recording, track.channel);
  const side = change.level > 1 ? 'louder' : 'quieter';
  return finding(
    'non-stationary',
    {
      what: `the power of channel ${label} changes by a factor of ${significant(change.ratio, 3)} between parts of the fit, and is furthest from its mean here (${significant(Math.max(change.level, 1 / change.level), 3)} times ${side})`,
      expected: `a factor of ${significant(limit, 3)} at most (chance alone gives up to ${significant(change.chance, 3)})`,
      cure: 'The loud part decides the fit: leave out what is not typical, or record each condition as a take of its own.',
    },
    {
      take: take.name,
      file: track.recording.file,
      channel: label,
      ...change.part,
      path: ['takes', t, 'fit'],
    },
    'note',
  );
}

export function responseFinding(take: Take, t: number, change: ResponseChange): Finding {
  const { gainDb, standardErrorDb } = change.comparison;
  const { differing, parts } = change;
  return finding(
    'non-stationary',
    {
      what: `the response changes along the recording: a filter fitted to this part leaves ${fixed(gainDb, 1)} ± ${fixed(standardErrorDb, 1)} dB less error here than one fitted to the rest (${differing} of ${parts} parts differ so)`,
      expected: 'no gain on samples it was not fitted to',
      cure: 'One filter cannot serve both: find what changed (temperature, load, mounting), or make a filter for each state.',
    },
    { take: take.name, file: take.desired.recording.file, ...change.part, path: ['takes', t, 'fit'] },
  );
}

export function crosstalkFinding(found: Crosstalk): Finding {
  const { gainDb, standardErrorDb } = found.comparison;
  return finding(
    'crosstalk',
    {
      gain: fixed(gainDb, 1),
      error: fixed(standardErrorDb, 1),
      rise: fixed(Math.abs(found.riseDb), 1),
      direction: found.riseDb < 0 ? 'weaker' : 'stronger',
      share: significant(100 * found.coherence, 2),
    },
    { path: ['takes', 0, 'inputs'] },
  );
}
