import type { RecordedTake } from './pairing';

/** Sums over the n on which a take is judged. */
export interface HeldOutError {
  errorEnergy: number;
  desiredEnergy: number;
}

/**
 * Runs a filter over the judged part of each take, straight from the definition: e[n] = d[n-Δ] - Σ w[k] x[n-k], the
 * mean of each signal over the fit intervals of all takes taken off before.
 * @param rows one row an input, newest-first
 */
export function heldOutErrors(takes: RecordedTake[], rows: number[][], delay: number): HeldOutError[] {
  const inputMeans = rows.map((_, r) => fitMean(takes, (take) => take.inputs[r]));
  const desiredMean = fitMean(takes, (take) => take.desired);
  return takes.map((take) => {
    let errorEnergy = 0;
    let desiredEnergy = 0;
    for (const { from, to } of take.judged) {
      for (let n = from; n < Math.min(to, take.desired.length + delay); n++) {
        const desired = take.desired[n - delay] - desiredMean;
        let error = desired;
        rows.forEach((taps, r) => {
          for (let k = 0; k < taps.length; k++) error -= taps[k] * (take.inputs[r][n - k] - inputMeans[r]);
        });
        errorEnergy += error * error;
        desiredEnergy += desired * desired;
      }
    }
    return { errorEnergy, desiredEnergy };
  });
}

/** 10 log10 of error over desired, of several takes together. */
export function nmseDb(errors: HeldOutError[]): number {
  const total = (key: keyof HeldOutError) => errors.reduce((sum, error) => sum + error[key], 0);
  return 10 * Math.log10(total('errorEnergy') / total('desiredEnergy'));
}

function fitMean(takes: RecordedTake[], signalOf: (take: RecordedTake) => Float64Array): number {
  let sum = 0;
  let count = 0;
  for (const take of takes) {
    for (const { from, to } of take.fit) {
      for (let n = from; n < to; n++) sum += signalOf(take)[n];
      count += to - from;
    }
  }
  return sum / count;
}
