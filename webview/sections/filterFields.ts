import type { PageContext } from '../context';
import { regularisationDb } from '../figures';
import { newCheckField, newChoiceField, newGroup } from '../form/choiceField';
import type { Field } from '../form/fieldBook';
import { newNumberField } from '../form/numberField';
import { jobInWords } from '../stripText';
import { t } from '../words';
import { bandFields, gainFields } from './bandFields';

/** The fields of section Design, in reading order. */
export function filterFields({ edit, fields, state }: PageContext): Field[] {
  const jobs = ['cancel', 'identify', 'equalise', 'predict'] as const;
  const own: Field[] = [
    newChoiceField(
      {
        path: ['job'],
        label: t('Job'),
        help: t('What the filter is for: it decides which of error, filter and output is the result.'),
        choices: jobs.map((value) => ({ value, label: jobInWords(value) })),
      },
      edit,
    ),
    newNumberField(
      {
        path: ['filter', 'length'],
        label: t('Length'),
        unit: t('taps'),
        help: t('Taps of each input.'),
        rule: { min: 1, max: 65_536, whole: true },
      },
      edit,
    ),
    newNumberField(
      {
        path: ['filter', 'delay'],
        label: t('Delay'),
        unit: t('samples'),
        help: t(
          'By so many samples the desired signal is delayed before the output comes close to it; negative: the input is delayed, or the horizon of a forecast.',
        ),
        rule: { min: -1e9, max: 1e9, whole: true },
      },
      edit,
    ),
    newNumberField(
      {
        path: ['filter', 'regularisation'],
        label: t('Regularisation'),
        help: t("Added to the diagonal of the normal equations, as a part of each input's own power."),
        rule: { min: 0, max: 1e6 },
        beside: (value) => (value === null ? '' : regularisationDb(value)),
      },
      edit,
    ),
    newChoiceField(
      {
        path: ['filter', 'windowing'],
        label: t('Windowing'),
        help: t(
          'Covariance: exact least squares with the true samples before each interval. Autocorrelation: samples outside count as zero.',
        ),
        choices: [
          { value: 'covariance', label: t('covariance') },
          { value: 'autocorrelation', label: t('autocorrelation') },
        ],
      },
      edit,
    ),
    newChoiceField(
      {
        path: ['filter', 'symmetry'],
        label: t('Symmetry'),
        help: t('Mirrored taps have a constant delay and need half the multiplies.'),
        choices: [
          { value: 'none', label: t('none: free taps') },
          { value: 'even', label: t('even: w[k] = w[M−1−k]') },
          { value: 'odd', label: t('odd: w[k] = −w[M−1−k]') },
        ],
      },
      edit,
    ),
  ];
  const gain = gainFields(edit, () => state().form);
  const band = bandFields(edit, () => state().form);
  const gainGroup = newGroup(['filter', 'fixedGain'], t('Fixed gain'), ...gain.map(({ element }) => element));
  const bandGroup = newGroup(['prepare', 'band'], t('Band'), ...band.map(({ element }) => element));
  const mean = newCheckField(
    {
      path: ['prepare', 'removeMean'],
      label: t('Remove the means'),
      help: t('Takes one constant off each signal, its mean over the fit intervals of all takes.'),
    },
    edit,
  );
  for (const field of [...own, mean, ...gain, ...band, gainGroup, bandGroup]) fields.add(field);
  return [...own, mean, gainGroup, bandGroup];
}
