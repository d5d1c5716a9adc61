import type { SpectrumView } from '../../core/protocol/views';
import type { Curve } from '../plots/types';

/** A spectrum's lines as curves. */
export function spectrumCurves({ frequencies, lines }: SpectrumView): Curve[] {
  return lines.map(({ label, role, valuesDb }) => ({ label, role, x: frequencies, y: valuesDb }));
}
