import type { Job } from '../../document/pairingDocument';
import { bareFit, hasBareFit } from '../../evaluation/measuredRuns';
import type { Finding } from '../../findings/finding';
import type { Pace } from '../../pace';
import type { Means } from '../../pair/signals';
import type { Take } from '../../pair/take';
import type { CrossSpectra } from '../../spectra/crossSpectra';
import type { Attainable } from './attainable';
import type { Band } from './bands';
import { centreTake } from './centreTake';
import { type CoherenceCurve, coherenceCurve, unknownBands } from './coherenceCurve';
import { converterNoise } from './converterNoise';
import { type Excitation, excitationOf } from './excitation';
import { alignTake } from './gatherSpectra';
import { noisyInputs } from './noisyInput';
import { coherenceFigure, predictionFigure } from './rungFigure';
import { settleSpectra } from './settleSpectra';
import {
  attainableUnknown,
  lowCoherence,
  noisyInput,
  poorExcitation,
  spectralNull,
  withheldWords,
} from './spectraFindings';
import { type SpectralNulls, spectralNulls } from './spectralNulls';

export interface SpectraRequest {
  /** At least one, all of the same inputs. */
  takes: readonly Take[];
  job: Job;
  filter: { length: number; delay: number; regularisation: number };
  /** Hz. */
  sampleRate: number;
  means: Means;
  /** Samples by which the desired signal comes after the inputs, one for each take; 0 where it is not known. */
  lags: readonly number[];
}

export interface AttainableFigure {
  /** dB; null where it is withheld. */
  attainableDb: number | null;
  attainableReason: string | null;
  /** Where it is withheld and something is known: it is no less than this. */
  atLeastDb: number | null;
  /** In the bands of the evaluation; empty or null where withheld. */
  bandsDb: (number | null)[];
  /** Null for `predict`, whose desired signal is the input itself. */
  coherence: CoherenceCurve | null;
  /** For pictures: inputs in order, then the desired signal. */
  spectra: CrossSpectra;
}

export interface InspectedSpectra {
  takes: (AttainableFigure & { name: string })[];
  /** Of all takes as one. */
  together: AttainableFigure;
  excitation: Excitation;
  /** For `identify`: where the model says nothing, since an input is empty or the coherence chance. */
  unknownBands: Band[];
  /** For `equalise`. */
  nulls: SpectralNulls | null;
  findings: Finding[];
}

/** Coherence, attainable reduction, excitation, noise on the input and spectral nulls of a pairing's fit intervals. */
export async function inspectSpectra(request: SpectraRequest, pace: Pace): Promise<InspectedSpectra> {
  const { takes, job, filter, means, sampleRate } = request;
  const bare = job === 'cancel' && takes.some(hasBareFit);
  const chosen = bare ? takes.filter(hasBareFit) : takes;
  const aligned = [];
  for (const take of chosen) {
    const intervals = bare ? bareFit(take) : take.fit;
    const lag = job === 'predict' ? 0 : Math.round(request.lags[takes.indexOf(take)]);
    const first = alignTake(take, lag, intervals);
    const centred = job === 'predict' ? 0 : await centreTake(first, means, pace);
    aligned.push(alignTake(take, lag + centred, intervals));
  }
  const figure = job === 'predict' ? predictionFigure : coherenceFigure;
  let resolution = 512;
  while (resolution < Math.min(2 * filter.length, 4096)) resolution *= 2;
  const settled = await settleSpectra(aligned, { means, sampleRate, resolution, figure, pace });

  const limited = job !== 'predict' || chosen.every((take) => isOneStep(take, filter.delay));
  const show = ({ spectra, attainable }: (typeof settled)['together']): AttainableFigure => ({
    ...figureOf(limited ? attainable : severalSteps),
    coherence: job === 'predict' ? null : coherenceCurve(spectra),
    spectra,
  });
  const { spectra } = settled.together;
  const noise = await converterNoise(chosen[0], aligned[0].stretches, sampleRate);
  const excitation = excitationOf(spectra, filter.length, noise);
  const nulls = job === 'equalise' ? spectralNulls(spectra, filter.length) : null;
  const noises =
    job === 'identify'
      ? noisyInputs(
          settled.takes.map((take) => take.spectra),
          spectra,
          settled.together.attainable.reductionDb,
        )
      : [];
  const findings = [
    ...(job === 'predict'
      ? []
      : chosen.flatMap((take, t) => {
          const own = settled.takes[t];
          return lowCoherence(take, own.attainable, job === 'cancel' && !bare);
        })),
    ...(limited ? attainableUnknown(settled.together.attainable) : []),
    ...poorExcitation(chosen[0], excitation, job),
    ...noisyInput(chosen[0], noises),
    ...(nulls === null ? [] : spectralNull(nulls, filter.regularisation)),
  ];
  return {
    takes: chosen.map((take, t) => ({ name: take.name, ...show(settled.takes[t]) })),
    together: show(settled.together),
    excitation,
    unknownBands: job === 'identify' ? unknownBands(spectra, excitation) : [],
    nulls,
    findings,
  };
}

const severalSteps: Attainable = {
  reductionDb: null,
  withheld: 'several-steps',
  atLeastDb: null,
  bandsDb: [],
  segment: null,
  averages: 0,
};

function isOneStep({ inputs, desired }: Take, delay: number): boolean {
  const [{ recording, channel }] = inputs;
  const same = inputs.length === 1 && recording === desired.recording && channel === desired.channel;
  return same && delay === -1;
}

function figureOf({ reductionDb, withheld, atLeastDb, bandsDb }: Attainable) {
  const attainableReason = withheld === null ? null : withheldWords[withheld];
  return { attainableDb: reductionDb, attainableReason, atLeastDb, bandsDb };
}
