import type { Job } from '../../document/pairingDocument';
import { rough } from '../../figures/numbers';
import { type Finding, finding, type Place } from '../../findings/finding';
import type { Take } from '../../pair/take';
import { channelLabel } from '../../recordings/recording';
import type { Attainable, Withheld } from './attainable';
import { bandsInWords } from './bands';
import type { Excitation } from './excitation';
import type { InputNoise } from './noisyInput';
import { largestRiseDb, type SpectralNulls } from './spectralNulls';

/** Why there is no figure, for the reader. */
export const withheldWords: Record<Withheld, string> = {
  'too-short': 'the recording is too short for enough averages',
  unsettled:
    'longer segments still raise the figure, so that the recording is too short for a response as long',
  silent: 'the desired signal is silent',
  'several-steps': 'there is a limit for predicting one sample ahead only, from the signal itself',
};

/** With less than 6 dB not even half of the desired signal's amplitude can be taken off or foretold. */
const leastReductionDb = 6;

/** Where the figure is withheld but known to be this large, more does not matter: few sensors go further. */
const enoughDb = 40;

/** `low-coherence`: what the filter is wanted for cannot be had from these inputs. Of one take. */
export function lowCoherence(
  take: Take,
  { reductionDb, segment, averages }: Attainable,
  wantedSignal: boolean,
): Finding[] {
  if (reductionDb === null || segment === null || reductionDb >= leastReductionDb) return [];
  const wanted = wantedSignal ? ', and the wanted signal counts among it' : '';
  const values = {
    reduction: oneDigit(reductionDb),
    least: leastReductionDb,
    segment,
    averages: Math.round(averages),
    wanted,
  };
  return [finding('low-coherence', values, { take: take.name }, wantedSignal ? 'note' : 'caution')];
}

/** `attainable-unknown`, unless what is known is enough. */
export function attainableUnknown({ withheld, atLeastDb }: Attainable): Finding[] {
  if (withheld !== 'too-short' && withheld !== 'unsettled') return [];
  if (atLeastDb !== null && atLeastDb >= enoughDb) return [];
  const known = atLeastDb === null ? '' : `It is no less than ${oneDigit(atLeastDb)} dB. `;
  return [finding('attainable-unknown', { why: withheldWords[withheld], known })];
}

/** `poor-excitation`: a caution where the filter is the result, otherwise a note. */
export function poorExcitation(
  take: Take,
  { emptyBands, smallest, largest }: Excitation,
  job: Job,
): Finding[] {
  return emptyBands.flatMap((bands, r) => {
    if (bands.length === 0) return [];
    const condition = smallest > 0 ? rough(largest / smallest) : 'infinity';
    const values = { bands: bandsInWords(bands), condition };
    return finding('poor-excitation', values, inputPlace(take, r), job === 'identify' ? 'caution' : 'note');
  });
}

/** `noisy-input`, `noisy-input-possible`. */
export function noisyInput(take: Take, noises: readonly InputNoise[]): Finding[] {
  return noises.map(({ input, by, share }) => {
    const percent = Math.round(100 * share);
    if (by === 'coherence') {
      const coherence = Number((1 - share).toFixed(2));
      return finding('noisy-input-possible', { coherence, percent }, inputPlace(take, input));
    }
    const how =
      by === 'levels'
        ? 'the response grows with the level of the take, which tells for the quieter take'
        : 'the second sensor and the desired signal tell';
    return finding('noisy-input', { how, percent }, inputPlace(take, input));
  });
}

/** `spectral-null`. @param regularisation ρ of the document */
export function spectralNull({ bands, riseDb }: SpectralNulls, regularisation: number): Finding[] {
  if (bands.length === 0) return [];
  return [
    finding(
      'spectral-null',
      { bands: bandsInWords(bands), rise: oneDigit(riseDb), limit: largestRiseDb, regularisation },
      { path: ['filter', 'regularisation'] },
    ),
  ];
}

function inputPlace(take: Take, r: number): Place {
  const { recording, channel } = take.inputs[r];
  return { file: recording.file, channel: channelLabel(recording, channel) };
}

function oneDigit(value: number): number {
  return Number(value.toFixed(1));
}
