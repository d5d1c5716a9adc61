import { decibels, powerDecibels } from '../../figures/decibels';
import { counted, grouped, significant } from '../../figures/numbers';
import { duration, frequency, samplesAndTime } from '../../figures/units';
import type { DesignResult } from '../../pipeline/designResult';
import { noiseGains } from '../../suitability/pair/spectralNulls';
import { bullets, code, name, section, table } from '../markdown';
import { responseShape } from '../responseShape';
import { wantedSignalHides, wantedSignalInFit } from '../wantedSignal';

/** Length, delay, regularisation and windowing: what they are, and what the figures at hand say about them. */
export function choices(result: DesignResult): string {
  return section(
    'Length, delay, regularisation, windowing',
    'Chosen by the engineer in the pairing document. What the result says about each choice:',
    bullets([
      length(result),
      delay(result),
      regularisation(result),
      windowing(result),
      preparation(result),
      ...noise(result),
      ...shape(result),
    ]),
    shapes(result),
    advice(result),
  );
}

function length(result: DesignResult): string {
  const { document, sampleRate, fit, heldOut, inputs } = result;
  const taps = document.filter.length;
  const unknowns = taps * inputs.length;
  const each = inputs.length === 1 ? '' : ' for each input';
  const data = `${grouped(fit.samples)} samples fit ${counted(unknowns, 'coefficient')}, ${significant(fit.samples / unknowns, 3)} for each`;
  return `**Length ${samplesAndTime(taps, sampleRate)}${each}.** ${data}.${gap(result)}${heldOut === null ? ' Whether it is too long cannot be told without held-out data.' : ''}`;
}

function gap(result: DesignResult): string {
  const { fit, heldOut } = result;
  if (heldOut === null) return '';
  if (wantedSignalHides(result) || wantedSignalInFit(result)) {
    return ' Fit and held-out NMSE are not comparable here, since the wanted signal may be present in the fit.';
  }
  const rise = heldOut.nmseDb - fit.nmseDb;
  if (!Number.isFinite(rise)) return '';
  return ` Held-out NMSE minus fit NMSE is ${decibels(rise)}; a filter that is too long for its data shows a large rise.`;
}

function delay({ document, sampleRate }: DesignResult): string {
  const { delay: samples } = document.filter;
  const time = samplesAndTime(Math.abs(samples), sampleRate);
  if (samples > 0) {
    return `**Delay ${time}.** The output stands for the desired signal of ${time} ago, so the filter may use that much of what came after it.`;
  }
  if (samples === 0) {
    return '**Delay 0.** The output stands for the desired signal of the same sample; only present and past input is used.';
  }
  return document.job === 'predict'
    ? `**Delay ${samples}, a horizon of ${time}.** The output stands for the desired signal that much later.`
    : `**Delay ${samples}.** A pure lag of ${time} is kept out of the filter: the input is delayed before it.`;
}

/** How the system was solved. */
export const solverWords = {
  levinson: 'the Levinson recursion',
  gradients: 'preconditioned conjugate gradients',
  schur: 'the generalised Schur algorithm',
  cholesky: 'Cholesky factorisation',
};

function regularisation({ document, conditionNumber, method }: DesignResult): string {
  const rho = document.filter.regularisation;
  const value =
    rho === 0
      ? 'none (0)'
      : `${significant(rho)} of each input's own power (${decibels(powerDecibels(rho))})`;
  const digits = Math.max(0, 16 - Math.log10(conditionNumber));
  const left = Number.isFinite(conditionNumber)
    ? `Of the 16 digits of the arithmetic about ${Math.floor(digits)} are left in the coefficients.`
    : 'The coefficients are not determined by the data.';
  const solver = solverWords[method];
  return `**Regularisation ${value}.** Condition number of the regularised normal matrix ${significant(conditionNumber, 2)}, solved by ${solver}. ${left}`;
}

function windowing({ document }: DesignResult): string {
  return document.filter.windowing === 'covariance'
    ? `**Windowing ${code('covariance')}.** Exact least squares: the sums run over the fit intervals with the true samples before each.`
    : `**Windowing ${code('autocorrelation')}.** Samples outside each fit interval count as zero, which tapers the ends of the intervals and biases short ones. Held-out figures use the true samples.`;
}

function preparation({ document, means, inputs, desired }: DesignResult): string {
  const { removeMean, band } = document.prepare;
  const taken = inputs.map((label, r) => `input ${name(label)}: ${significant(means.inputs[r])}`).join('; ');
  const mean = removeMean
    ? `**Means removed,** in the unit of the recordings: ${taken}; desired ${name(desired)}: ${significant(means.desired)}. They are the means over the fit intervals of all takes, and the same constants everywhere.`
    : '**No means removed.**';
  return band === null
    ? `${mean} The error is not weighted to a band.`
    : `${mean} **Error weighted to ${frequency(band.from)} to ${frequency(band.to)};** NMSE is of the signals so weighted.`;
}

/** What an equaliser does to white noise on its inputs, and how to have less of it. */
function noise({ document, coefficients, inputs }: DesignResult): string[] {
  if (document.job !== 'equalise') return [];
  const gains = noiseGains(coefficients).map((gain, r) => {
    const of = inputs.length === 1 ? '' : `input ${name(inputs[r])}: `;
    return `${of}${decibels(powerDecibels(gain))}`;
  });
  return [
    `**Noise gain ${gains.join('; ')}** (Σ w²): by so much the filter raises the power of white noise on its input. More regularisation lowers it and raises the error.`,
  ];
}

/** Symmetry and fixed gain, what came of them and what they cost. */
function shape({ document, shape: found, heldOut, inputs }: DesignResult): string[] {
  if (found === null) return [];
  const { symmetry, fixedGain, length: taps } = document.filter;
  const data = heldOut === null ? 'fit' : 'held-out';
  const price = (without: 'shape' | 'gain') => {
    const row = found.prices.find((entry) => entry.without === without);
    return row === undefined
      ? ''
      : ` Without it the ${data} NMSE is ${decibels(row.nmseDb)}: its price is ${decibels(row.priceDb)}.`;
  };
  const lines: string[] = [];
  if (symmetry !== 'none') {
    const rule = symmetry === 'even' ? 'w[k] = w[M-1-k]' : 'w[k] = -w[M-1-k]';
    const both = fixedGain === null ? '' : ' (together with the fixed gain)';
    lines.push(
      `**Symmetry ${code(symmetry)}**, ${code(rule)}: the delay is ${significant((taps - 1) / 2)} samples at every frequency.${price('shape').replace('its price', `its price${both}`)}`,
    );
  }
  if (fixedGain !== null && found.gain !== null) {
    const of = inputs.length === 1 ? '' : ` of input ${name(inputs[fixedGain.input - 1])}`;
    lines.push(
      `**Gain${of} fixed to ${significant(found.gain.asked, 7)} at ${frequency(fixedGain.frequency)}**; in the numbers of the target it is ${significant(found.gain.target[0], 9)}.${price('gain')}`,
    );
  }
  return lines;
}

/** From as many taps on the share of an eighth says something. */
const tapsForShares = 16;

function shapes({ coefficients, inputs, sampleRate, inputPowers, document }: DesignResult): string {
  const shares = document.filter.length >= tapsForShares;
  const head = ['input', 'mean square over the fit', 'largest coefficient at'];
  const rows = inputs.map((label, r) => {
    const { peak, lastEighth } = responseShape(coefficients[r]);
    const row = [name(label), significant(inputPowers[r]), `k = ${peak} (${duration(peak / sampleRate)})`];
    return shares ? [...row, `${significant(100 * lastEighth, 2)} %`] : row;
  });
  return table(shares ? [...head, 'Σ w² in the last eighth'] : head, rows, [
    head[1],
    'Σ w² in the last eighth',
  ]);
}

function advice({ coefficients, document }: DesignResult): string {
  const first = coefficients.some((row) => responseShape(row).peak === 0);
  const cut =
    document.filter.length >= tapsForShares
      ? 'A flat response has 12.5 % of Σ w² in each eighth of its taps: a share of that size in the last one says that the response is cut off there (common practice).'
      : '';
  const late = first
    ? 'A largest coefficient at k = 0 can mean that the response begins before it and that a larger delay would serve better (common practice).'
    : '';
  return [cut, late].filter((text) => text !== '').join(' ');
}
