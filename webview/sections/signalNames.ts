import { t } from '../words';

/** A channel by its label; one that has a number alone is not left as a bare figure. */
export function channelName(label: string): string {
  return /^\d+$/.test(label) ? t('channel {0}', label) : label;
}

/** An input in a legend: two files of one channel each have the same label. */
export function inputName(label: string, index: number, inputs: number): string {
  const name = channelName(label);
  return inputs === 1 ? t('input: {0}', name) : t('input {0}: {1}', index + 1, name);
}
