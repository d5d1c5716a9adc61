import type { SpectrumView } from '../../core/protocol/views';
import type { Curve } from '../plots/types';
import { phrase, t } from '../words';
import { channelName, inputName } from './signalNames';

/** A spectrum's lines as curves. */
export function spectrumCurves({ frequencies, lines }: SpectrumView): Curve[] {
  return lines.map(({ label, role, valuesDb }) => ({
    label: phrase(label),
    role,
    x: frequencies,
    y: valuesDb,
  }));
}

/** The same of the signals themselves, told apart by what they are for. */
export function signalCurves({ frequencies, lines }: SpectrumView): Curve[] {
  const inputs = lines.filter(({ role }) => role === 'input').length;
  return lines.map(({ label, role, valuesDb }, i) => ({
    label: role === 'desired' ? t('desired: {0}', channelName(label)) : inputName(label, i, inputs),
    role,
    x: frequencies,
    y: valuesDb,
  }));
}
