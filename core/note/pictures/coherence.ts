import { counted, significant } from '../../figures/numbers';
import { frequency } from '../../figures/units';
import type { DesignResult } from '../../pipeline/designResult';
import { bandShades } from './bandShades';
import { curvePath, legend } from './curves';
import { frequencyUnit } from './frequencyAxis';
import { axes, newPlot } from './plot';
import { svgFile } from './svg';

/** Coherence of the desired signal with the inputs over frequency and its 95 % level; null where there is none. */
export function coherencePicture({ inspection, sampleRate }: DesignResult, mark: string): string | null {
  const curve = inspection?.coherence ?? null;
  if (curve === null || inspection === null) return null;
  const { unit, divisor } = frequencyUnit(sampleRate / 2);
  const key = legend(['coherence', '95 % level of unrelated signals'], 36);
  const plot = newPlot(key.bottom + 8, 190, [0, sampleRate / 2 / divisor], [0, 1]);
  const x = curve.frequencies.map((f) => f / divisor);
  const segments = `${counted(curve.averages, 'averaged segment')} of ${counted(curve.segment, 'sample')}`;
  return svgFile({
    mark,
    title: 'Coherence over the fit',
    description: `Coherence of the desired signal with all inputs, 0 Hz to ${frequency(sampleRate / 2)}, from ${segments} (Hann window, half overlap), with the level ${significant(curve.significance)} that unrelated signals exceed at one frequency in twenty. Shaded: bands in which the model says nothing.`,
    height: plot.bottom + 52,
    body: [
      ...key.body,
      ...bandShades(plot, inspection.unknownBands, divisor),
      ...axes(plot, `frequency in ${unit}`, 'coherence'),
      curvePath(plot, { x, y: curve.values }, 0),
      curvePath(plot, { x, y: curve.values.map(() => curve.significance) }, 1),
    ],
  });
}
