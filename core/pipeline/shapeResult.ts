import type { Run } from '../evaluation/measuredRuns';
import { runsFigure } from '../evaluation/runsFigure';
import { significant } from '../figures/numbers';
import { type Finding, finding } from '../findings/finding';
import { integerFormat, type TargetFilter } from '../numbers/targetFilter';
import { powerOfTwo } from '../numbers/words';
import type { Pace } from '../pace';
import { conditionsOf } from '../solvers/fixedGain';
import type { ShapeResult } from './designResult';
import type { Fit } from './fitPair';
import type { Pairing } from './pairing';

/**
 * The fixed gain as it came out, and what symmetry and gain cost over the measured runs.
 * @param nmseDb of the filter as it is
 * @returns null where the document asks for no shape
 */
export async function shapeResult(
  { document }: Pairing,
  fit: Fit,
  target: TargetFilter,
  runs: readonly Run[],
  nmseDb: number,
  pace: Pace,
): Promise<ShapeResult | null> {
  const { symmetry, fixedGain } = document.filter;
  if (symmetry === 'none' && fixedGain === null) return null;
  const prices: ShapeResult['prices'] = [];
  for (const { without, filter } of fit.unshaped) {
    const price = (await runsFigure(runs, filter, pace)).nmseDb;
    prices.push({ without, nmseDb: price, priceDb: nmseDb - price });
  }
  return { gain: gainResult(fit, target, (fixedGain?.input ?? 1) - 1), prices };
}

function gainResult({ gain, free, fold }: Fit, target: TargetFilter, input: number): ShapeResult['gain'] {
  if (gain === null) return null;
  const format = integerFormat(target);
  const { inputCount, outputCount } = target.scaling;
  const unit = (powerOfTwo(-(format?.fractionBits ?? 0)) * outputCount) / inputCount[input];
  const written = target.values[input].slice(0, fold.free).map((v) => v * unit);
  return {
    asked: gain.values[0],
    taps: conditionsOf(gain, free[input]),
    target: conditionsOf(gain, written),
  };
}

/** Says so where the integers could not have the fixed gain exactly. */
export function gainFindings({ document }: Pairing, shape: ShapeResult | null): Finding[] {
  const { fixedGain, symmetry } = document.filter;
  if (!shape?.gain || fixedGain === null) return [];
  const { asked, target } = shape.gain;
  const miss = Math.max(Math.abs(target[0] - asked), Math.abs(target[1] ?? 0));
  if (miss <= 1e-12 * Math.abs(asked)) return [];
  const why =
    symmetry === 'even' && fixedGain.frequency === 0
      ? 'their sum is even in pairs, or the gain is no whole number of counts'
      : fixedGain.frequency === 0
        ? 'the gain is no whole number of counts'
        : 'at other frequencies than 0 Hz integers meet it only nearly';
  const values = {
    got: significant(target[0], 7),
    expected: significant(asked, 7),
    frequency: fixedGain.frequency,
    why,
  };
  return [finding('gain-not-exact', values, { path: ['filter', 'fixedGain'] })];
}
