import { powerDecibels } from '../figures/decibels';

/** A filter in the target's numbers beside the ideal one over the same n. */
export interface LossFigures {
  nmseDb: number;
  /** Rise of the NMSE in dB. */
  quantisationLossDb: number;
  /** `10 log10(Σ(y_q - y)² / Σ y²)`, which no wanted signal can hide. */
  outputErrorDb: number;
}

/** The same of a bit-true run, and what it counted. */
export interface TargetFigures extends LossFigures {
  accumulatorOverflows: number;
  outputOverflows: number;
  samples: number;
}

/** Energies of the errors that a filter in the target's numbers makes. */
export interface TargetTally {
  /**
   * Brings the next samples of d[n-Δ], of the ideal y and of the target's, which is in counts.
   * @param outputCount q_out, the unit of one count
   */
  add(desired: Float64Array, output: Float64Array, counts: Float64Array, outputCount: number): void;
  /** Brings what a bit-true run counted. */
  count(run: { output: Float64Array; accumulatorOverflows: number; outputOverflows: number }): void;
  /** Figures; the ideal NMSE is that of the same samples. */
  figures(ideal: { nmseDb: number }, desiredEnergy: number): TargetFigures;
}

export function newTargetTally(): TargetTally {
  let errorEnergy = 0;
  let gapEnergy = 0;
  let outputEnergy = 0;
  const counted = { accumulatorOverflows: 0, outputOverflows: 0, samples: 0 };
  return {
    add(desired, output, counts, outputCount) {
      // Sums in locals: variables that a closure holds are stored at each step.
      let errors = errorEnergy;
      let gaps = gapEnergy;
      let outputs = outputEnergy;
      for (let n = 0; n < desired.length; n++) {
        const ideal = output[n];
        const y = counts[n] * outputCount;
        const e = desired[n] - y;
        const gap = y - ideal;
        errors += e * e;
        gaps += gap * gap;
        outputs += ideal * ideal;
      }
      errorEnergy = errors;
      gapEnergy = gaps;
      outputEnergy = outputs;
    },
    count({ output, accumulatorOverflows, outputOverflows }) {
      counted.accumulatorOverflows += accumulatorOverflows;
      counted.outputOverflows += outputOverflows;
      counted.samples += output.length;
    },
    figures(ideal, desiredEnergy) {
      const nmseDb = powerDecibels(errorEnergy / desiredEnergy);
      return {
        nmseDb,
        quantisationLossDb: nmseDb - ideal.nmseDb,
        outputErrorDb: powerDecibels(gapEnergy / outputEnergy),
        ...counted,
      };
    },
  };
}
