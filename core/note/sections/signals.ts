import { jobWords } from '../../figures/jobWords';
import { duration, frequency, intervals } from '../../figures/units';
import type { DesignResult, TakeSummary } from '../../pipeline/designResult';
import { code, name, section, table } from '../markdown';

const purpose = {
  cancel:
    'The inputs pick up a disturbance that is also in the desired signal; what is wanted is the error, the desired signal without it.',
  identify:
    'The inputs are what went into a device or path, the desired signal is what came out; what is wanted is the filter itself, a model of the path.',
  equalise:
    'The inputs are the distorted observation, the desired signal is the known original; what is wanted is the output, the restored signal.',
  predict: 'The inputs are the past of the desired signal; what is wanted is the output, the forecast.',
} as const;

/** The job, the definition of the filter, and each take's signals and intervals. */
export function signals(result: DesignResult): string {
  const { document, sampleRate, inputs, takes } = result;
  const { length, delay } = document.filter;
  const sum = inputs.length === 1 ? 'y[n] = Σ_k w[k] x[n-k]' : 'y[n] = Σ_r Σ_k w_r[k] x_r[n-k]';
  const error =
    delay === 0 ? 'e[n] = d[n] - y[n]' : `e[n] = d[n ${delay > 0 ? '-' : '+'} ${Math.abs(delay)}] - y[n]`;
  return section(
    'Job and signals',
    `Job: ${jobWords[document.job]} (${code(document.job)}). ${purpose[document.job]}`,
    `The output is ${code(sum)}, k = 0 to ${length - 1}; the fit makes the mean square of ${code(error)} small, with d the desired signal. Sample rate ${frequency(sampleRate)}, so one sample is ${duration(1 / sampleRate)}.`,
    table(
      ['take', 'signal', 'file', 'channel'],
      takes.flatMap((take) => tracks(take)),
    ),
    table(
      ['take', 'fit', 'held out', 'disturbance only'],
      takes.map((take) => [
        name(take.name),
        ...[take.fit, take.heldOut, take.disturbanceOnly].map((list) => intervals(list, sampleRate)),
      ]),
    ),
  );
}

function tracks(take: TakeSummary): string[][] {
  const input = take.inputs.map(({ file, channel }, r) => [
    name(take.name),
    take.inputs.length === 1 ? 'input x' : `input x_${r}`,
    name(file),
    name(channel),
  ]);
  return [...input, [name(take.name), 'desired d', name(take.desired.file), name(take.desired.channel)]];
}
