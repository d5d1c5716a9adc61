import { frequencyResponse, magnitudeDecibels } from '../../figures/frequencyResponse';
import { frequency } from '../../figures/units';
import type { DesignResult } from '../../pipeline/designResult';
import { bandShades } from './bandShades';
import { magnitudeBand } from './confidenceBand';
import { curvePath, legend } from './curves';
import { decibelRange, frequencyUnit, raised } from './frequencyAxis';
import { axes, newPlot } from './plot';
import { svgFile } from './svg';

const points = 621;
const depth = 100;

/** The magnitude response of each input's filter as designed, in dB. */
export function magnitudePicture(result: DesignResult, mark: string): string {
  const { coefficients, inputs, sampleRate } = result;
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
  const shaded =
    (result.inspection?.unknownBands.length ?? 0) > 0
      ? ' Shaded: bands in which the model says nothing.'
      : '';
  return svgFile({
    mark,
    title: 'Magnitude response',
    description: `Magnitude of the filter in dB over frequency, 0 Hz to ${frequency(sampleRate / 2)}, one line for each input: ${inputs.join(', ')}${'withheld' in result.confidence.errors ? '' : ', with its 95 % confidence band'}.${shaded}`,
    height: plot.bottom + 52,
    body: [
      ...key.body,
      ...bandShades(plot, result.inspection?.unknownBands ?? [], divisor),
      ...axes(plot, `frequency in ${unit}`, 'dB re 1 (d unit / x unit)'),
      ...rows.map((_, r) => magnitudeBand(result, r, plot, highest, range)).filter((band) => band !== ''),
      ...rows.map((row, r) => curvePath(plot, { x, y: raised(row, range[0]) }, r)),
    ],
  });
}
