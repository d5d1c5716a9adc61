import type { DesignResult } from '../../pipeline/designResult';
import { section, target } from '../markdown';
import { wantedSignalReminder } from '../wantedSignal';

/** Links to the pictures in `folder`, which stands beside the note. */
export function pictures(result: DesignResult, folder: string): string {
  const { job } = result.document;
  const data =
    result.heldOut === null
      ? 'fit'
      : result.heldOut.disturbanceOnly
        ? 'held-out, disturbance-only'
        : 'held-out';
  const curves =
    job === 'equalise' || job === 'predict' ? 'desired signal, output and error' : 'desired signal and error';
  const link = (alt: string, file: string) => `![${alt}](${target(`${folder}/${file}`)})`;
  return section(
    'Pictures',
    link('Impulse response: the coefficients over their delay', 'impulse.svg'),
    link('Magnitude response in dB over frequency', 'magnitude.svg'),
    link(`Spectra of the ${data} data: ${curves}`, 'spectra.svg'),
    result.inspection?.coherence
      ? link('Coherence of the desired signal with the inputs', 'coherence.svg')
      : '',
    wantedSignalReminder(result),
  );
}
