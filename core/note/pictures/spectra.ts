import { powerDecibels } from '../../figures/decibels';
import { counted } from '../../figures/numbers';
import { frequency } from '../../figures/units';
import type { DesignResult } from '../../pipeline/designResult';
import { wantedSignalHides } from '../wantedSignal';
import { curvePath, legend } from './curves';
import { decibelRange, frequencyUnit, raised } from './frequencyAxis';
import { axes, newPlot } from './plot';
import { svgFile } from './svg';

const depth = 120;

/** Power spectral densities before (desired signal) and after (error), and the output for the jobs that use it. */
export function spectraPicture(result: DesignResult, mark: string): string {
  const { spectra, sampleRate } = result;
  const { unit, divisor } = frequencyUnit(sampleRate / 2);
  const curves = rows(result);
  const decibels = curves.map(({ density }) => density.map(powerDecibels));
  const range = decibelRange(decibels, depth);
  const labels = curves.map(({ label }) => label);
  const key = legend(labels, 36);
  const plot = newPlot(key.bottom + 8, 230, [0, sampleRate / 2 / divisor], range);
  const x = spectra.frequencies.map((f) => f / divisor);
  const averages = counted(spectra.averages, 'averaged segment');
  return svgFile({
    mark,
    title: `Spectra of the ${data(result)}`,
    description: `Power spectral densities in dB over frequency, 0 Hz to ${frequency(sampleRate / 2)}, from ${averages} of ${counted(spectra.segment, 'sample')} (Hann window, half overlap): ${labels.join(', ')}.`,
    height: plot.bottom + 52,
    body: [
      ...key.body,
      ...axes(plot, `frequency in ${unit}`, 'dB re 1 unit²/Hz of d'),
      ...decibels.map((row, i) => curvePath(plot, { x, y: raised(row, range[0]) }, i)),
    ],
  });
}

function data(result: DesignResult): string {
  if (result.heldOut?.disturbanceOnly) return 'held-out, disturbance-only data';
  const which = result.heldOut === null ? 'fit data' : 'held-out data';
  return wantedSignalHides(result) ? `${which} (the wanted signal hides the disturbance)` : which;
}

function rows({ document, spectra }: DesignResult): { label: string; density: Float64Array }[] {
  const desired = { label: 'desired signal d', density: spectra.desired };
  const error = { label: 'error e', density: spectra.error };
  const output = { label: 'output y', density: spectra.output };
  return document.job === 'equalise' || document.job === 'predict'
    ? [desired, error, output]
    : [desired, error];
}
