import { frequencyResponse, magnitudeDecibels } from '../../figures/frequencyResponse';
import { frequency } from '../../figures/units';
import type { DesignResult } from '../../pipeline/designResult';
import { curvePath, legend } from './curves';
import { decibelRange, frequencyUnit, raised } from './frequencyAxis';
import { axes, newPlot } from './plot';
import { svgFile } from './svg';

const points = 621;
const depth = 100;

/** The magnitude response of each input's filter as designed, in dB. */
export function magnitudePicture({ coefficients, inputs, sampleRate }: DesignResult, mark: string): string {
  const { unit, divisor } = frequencyUnit(sampleRate / 2);
  const highest = sampleRate / 2 / divisor;
  const x = Float64Array.from({ length: points }, (_, i) => (highest * i) / (points - 1));
  const rows = coefficients.map((row) => magnitudeDecibels(frequencyResponse(row, points)));
  const range = decibelRange(rows, depth);
  const key = legend(
    inputs.map((label) => `input ${label}`),
    36,
  );
  const plot = newPlot(key.bottom + 8, 230, [0, highest], range);
  return svgFile({
    mark,
    title: 'Magnitude response',
    description: `Magnitude of the filter in dB over frequency, 0 Hz to ${frequency(sampleRate / 2)}, one line for each input: ${inputs.join(', ')}.`,
    height: plot.bottom + 52,
    body: [
      ...key.body,
      ...axes(plot, `frequency in ${unit}`, 'dB re 1 (d unit / x unit)'),
      ...rows.map((row, r) => curvePath(plot, { x, y: raised(row, range[0]) }, r)),
    ],
  });
}
