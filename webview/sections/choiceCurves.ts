import type { ChoiceView } from '../../core/protocol/views';
import type { Curve, Mark, PlotData } from '../plots/types';
import { t } from '../words';

type Name = 'length' | 'delay' | 'regularisation';

/** The errors along one of the three numbers, with the present and the suggested choice and the limit. */
export function choiceCurves(view: ChoiceView, name: Name): PlotData {
  const { values, errors } = along(view, name);
  // A logarithmic axis has no place for 0.
  const shown = values
    .map((value, i) => ({ value, i }))
    .filter(({ value }) => name !== 'regularisation' || value > 0);
  const x = shown.map(({ value }) => value);
  const pick = (series: Float64Array) => Float64Array.from(shown, ({ i }) => series[i]);
  const curves: Curve[] = [
    { label: t('fit'), role: 'figure2', x, y: pick(errors.fitDb) },
    {
      label: t('cross-validated, with standard error'),
      role: 'figure',
      x,
      y: pick(errors.crossDb),
      errors: pick(errors.errorDb),
    },
  ];
  const marks: Mark[] = [];
  const { present, suggestion, limitDb } = view;
  if (present.crossDb !== null && inRange(present[name])) {
    marks.push({ kind: 'place', shape: 'now', x: present[name], y: present.crossDb, label: t('now') });
  }
  if (suggestion !== null && inRange(suggestion[name])) {
    const y = suggestion.crossDb;
    marks.push({ kind: 'place', shape: 'suggested', x: suggestion[name], y, label: t('suggested') });
  }
  if (limitDb !== null) marks.push({ kind: 'level', y: limitDb, label: t('limit') });
  return { curves, marks };

  function inRange(value: number): boolean {
    return name !== 'regularisation' || value > 0;
  }
}

function along(view: ChoiceView, name: Name) {
  if (name === 'length') return { values: view.lengths, errors: view.byLength };
  if (name === 'delay') return { values: view.delays, errors: view.byDelay };
  return { values: view.regularisations, errors: view.byRegularisation };
}
