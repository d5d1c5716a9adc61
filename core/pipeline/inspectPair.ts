import type { Finding } from '../findings/finding';
import type { Means } from '../pair/signals';
import type { CrossSpectra } from '../spectra/crossSpectra';
import { inspectChange } from '../suitability/change/inspectChange';
import type { Band } from '../suitability/pair/bands';
import type { CoherenceCurve } from '../suitability/pair/coherenceCurve';
import type { Excitation } from '../suitability/pair/excitation';
import type { AttainableFigure } from '../suitability/pair/inspectSpectra';
import type { TakeTiming } from '../suitability/timing/inspectTiming';
import type { Work } from './host';
import { inspectSignals } from './inspectSignals';
import type { Pairing } from './pairing';
import { inspectionKey } from './stageKeys';

/** What one take tells about the pair; spectral figures are null where the take has no part to take them from. */
export interface TakeInspection extends TakeTiming {
  attainableDb: number | null;
  attainableReason: string | null;
  coherence: CoherenceCurve | null;
}

/** Whether the recordings of a pair belong together and what they can give at best. */
export interface PairInspection {
  takes: TakeInspection[];
  /** Of all takes as one: what an unconstrained linear filter could reach. */
  attainable: Omit<AttainableFigure, 'coherence' | 'spectra'>;
  coherence: CoherenceCurve | null;
  /** For pictures: inputs in order, then the desired signal. */
  spectra: CrossSpectra;
  excitation: Excitation;
  /** For `identify`: bands in which the model says nothing. */
  unknownBands: Band[];
  findings: Finding[];
}

/**
 * Inspects the fit intervals of every take: timing and spectra, then what changes
 * along the recordings.
 * @param means as the fit takes them off
 * @param earlier findings that are there already, so that nothing is said twice
 * @throws Refusal `not-finite-used` where a sample is NaN or infinite
 */
export async function inspectPair(
  pairing: Pairing,
  means: Means,
  earlier: readonly Finding[],
  work: Work,
): Promise<PairInspection> {
  // Of what was found earlier only the kinds matter.
  const key = [inspectionKey(pairing), earlier.map(({ code, channel, take }) => [code, channel, take])];
  return work.keep('inspection', key, () => inspectNow(pairing, means, earlier, work));
}

async function inspectNow(
  pairing: Pairing,
  means: Means,
  earlier: readonly Finding[],
  work: Work,
): Promise<PairInspection> {
  const { document, takes } = pairing;
  const { pace } = work;
  const { timing, spectra } = await inspectSignals(pairing, means, work);
  const change = await inspectChange(takes, document, means, pace, [...earlier, ...timing.findings]);
  const { together } = spectra;
  return {
    takes: timing.takes.map((take) => {
      const own = spectra.takes.find(({ name }) => name === take.name);
      return {
        ...take,
        attainableDb: own?.attainableDb ?? null,
        attainableReason: own?.attainableReason ?? null,
        coherence: own?.coherence ?? null,
      };
    }),
    attainable: {
      attainableDb: together.attainableDb,
      attainableReason: together.attainableReason,
      atLeastDb: together.atLeastDb,
      bandsDb: together.bandsDb,
    },
    coherence: together.coherence,
    spectra: together.spectra,
    excitation: spectra.excitation,
    unknownBands: spectra.unknownBands,
    findings: [...timing.findings, ...spectra.findings, ...change.findings],
  };
}
