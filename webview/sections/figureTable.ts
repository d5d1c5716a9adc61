import type { EvidenceView } from '../../core/protocol/views';
import { el } from '../elements';
import { count, decibels, decibelsWithError, plain } from '../figures';
import { type Cell, table } from '../tables';
import { phrase, t } from '../words';

/** What the filter is worth: fit, held-out, limit, by take and by band. */
export function figureTables(view: EvidenceView): HTMLElement[] {
  const rows: Cell[][] = [
    [t('fit'), decibels(view.fitDb), t('{0} samples', count(view.fitSamples))],
    [
      t('held-out'),
      decibelsWithError(view.heldOutDb, view.standardErrorDb),
      view.heldOutDb === null ? t('nothing held out') : t('{0} samples', count(view.heldOutSamples)),
    ],
    [t('limit of any linear filter'), decibels(view.limitDb), view.limitDb === null ? t('withheld') : ''],
    [t('asked in the document'), decibels(view.askedDb), askedNote(view)],
  ];
  if (view.outsideBandDb !== null) {
    rows.push([t('outside the band'), decibels(view.outsideBandDb), t('not weighed in the fit')]);
  }
  const solution = [
    [t('condition number'), plain(view.conditionNumber, 3)],
    [t('solved by'), phrase(view.method)],
  ];
  const takes = view.takes.map(({ name, nmseDb, standardErrorDb, samples }) => [
    name,
    decibelsWithError(nmseDb, standardErrorDb),
    count(samples),
  ]);
  const bands = view.bands.map(({ from, to, reductionDb, attainableDb }) => [
    t('{0} to {1} Hz', plain(from), plain(to)),
    decibels(reductionDb),
    decibels(attainableDb),
  ]);
  const wanted = view.trustworthy
    ? null
    : el(
        'p',
        { class: 'rest' },
        t(
          'The wanted signal is part of the error here, since no held-out stretch has the disturbance alone.',
        ),
      );
  return [
    el(
      'div',
      { 'data-anchor': 'figures' },
      table(t('NMSE'), [t('over'), t('NMSE'), t('about it')], rows, [1]),
    ),
    ...(wanted ? [wanted] : []),
    table(t('NMSE by take'), [t('take'), t('NMSE'), t('samples')], takes, [1, 2]),
    table(t('Reduction by band'), [t('band'), t('reduction'), t('attainable')], bands, [1, 2]),
    table(t('Solution'), [t('what'), t('value')], solution),
  ];
}

function askedNote({ askedDb, heldOutDb }: EvidenceView): string {
  if (askedDb === null) return t('no limit');
  if (heldOutDb === null) return t('not tested');
  return heldOutDb <= askedDb ? t('kept') : t('exceeded');
}
