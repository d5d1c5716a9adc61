import { errorShares } from '../../evaluation/errorShares';
import { decibels } from '../../figures/decibels';
import { counted, grouped, noFigure, significant } from '../../figures/numbers';
import { frequency } from '../../figures/units';
import { comparableBands, limitDiffers } from '../../pipeline/comparableLimit';
import type { DesignResult, ErrorFigure } from '../../pipeline/designResult';
import { name, section, table } from '../markdown';
import { residualTests } from '../residualTests';
import { wantedSignalHides, wantedSignalInFit, wantedSignalReminder } from '../wantedSignal';

/** Fit and held-out figures, for each take and by band. */
export function outcome(result: DesignResult): string {
  return section(
    'Result',
    where(result),
    figures(result),
    wantedSignalReminder(result),
    limit(result),
    ...bands(result),
    ...residualTests(result),
  );
}

function where(result: DesignResult): string {
  const { heldOut, takes, document } = result;
  const { band } = document.prepare;
  const weighted =
    band === null
      ? ''
      : ` Both are passed through the band ${frequency(band.from)} to ${frequency(band.to)} first; what that takes off is compared in a row of its own.`;
  const definition = `NMSE is the power of the error relative to that of the desired signal over the same samples, means removed as in the fit; its negative is the reduction.${weighted}`;
  if (heldOut === null) return `${definition} No interval is held out.`;
  const which = heldOut.disturbanceOnly
    ? `The held-out figures are over the disturbance-only part of the held-out intervals, where the wanted signal is absent.${leftOut(takes, heldOut.takes)}`
    : 'The held-out figures are over data that the fit never saw.';
  const fitToo = wantedSignalInFit(result)
    ? ' The fit figure is over all of the fit intervals, with the wanted signal where it is present.'
    : '';
  return `${definition} ${which}${fitToo}`;
}

function leftOut(takes: readonly { name: string }[], measured: readonly { name: string }[]): string {
  const without = takes.filter((take) => !measured.some((of) => of.name === take.name));
  return without.length === 0
    ? ''
    : ` Left out, since they have no such part: ${without.map((take) => name(take.name)).join(', ')}.`;
}

function figures({ fit, heldOut, takes }: DesignResult): string {
  const row = (what: string, { samples, mse, nmseDb }: ErrorFigure, error: number | null) => [
    what,
    grouped(samples),
    significant(mse),
    decibels(nmseDb),
    error === null ? noFigure : decibels(error),
  ];
  const rows = [row('fit', fit, null)];
  if (heldOut !== null) {
    if (takes.length === 1) rows.push(row('held out', heldOut, heldOut.takes[0].standardErrorDb));
    else {
      rows.push(row('held out, these takes together', heldOut, null));
      for (const take of heldOut.takes)
        rows.push(row(`held out, take ${name(take.name)}`, take, take.standardErrorDb));
    }
    const outside = heldOut.outsideBandDb;
    if (outside !== null)
      rows.push([
        'held out, outside the band',
        grouped(heldOut.samples),
        noFigure,
        decibels(outside),
        noFigure,
      ]);
  }
  return table(['data', 'samples', 'mean squared error', 'NMSE', 'standard error'], rows, [
    'samples',
    'mean squared error',
    'NMSE',
    'standard error',
  ]);
}

const incomparable = {
  band: 'the coherence knows of no weighting to a band; the table by band has it for each',
  'wanted signal':
    'no fit interval is marked `disturbanceOnly`, so the wanted signal may be in the coherence of the fit data and is not in the held-out figures',
};

/** What no filter could exceed, beside what this one reaches. */
function limit(result: DesignResult): string {
  const { inspection } = result;
  if (inspection === null) return '';
  const differs = limitDiffers(result);
  if (differs !== null) return `**Attainable:** not shown, since ${incomparable[differs]}.`;
  const { attainableDb, atLeastDb, attainableReason } = inspection.attainable;
  if (attainableDb !== null) {
    return `**Attainable:** the coherence of the fit data allows a reduction of about ${decibels(attainableDb)} by a linear filter of any length. Where the filter comes near it, more taps cannot help.`;
  }
  const least = atLeastDb === null ? '' : ` It is no less than ${decibels(atLeastDb)}.`;
  return `**Attainable:** not shown, since ${attainableReason ?? 'it cannot be told from these recordings'}.${least}`;
}

function bands(result: DesignResult): string[] {
  const { heldOut, spectra, inspection } = result;
  if (heldOut === null || heldOut.bands.length === 0) return [];
  const shares = errorShares(spectra);
  const attainable = comparableBands(result);
  const unknown = (from: number, to: number) =>
    inspection?.unknownBands.some((band) => band.from < to && band.to > from) ? ' (in part unknown)' : '';
  const caution = wantedSignalHides(result) ? ' The caution above holds for every row.' : '';
  return [
    `Held-out reduction by band, from ${counted(spectra.averages, 'averaged segment')} of ${counted(spectra.segment, 'sample')} (Hann window, half overlap); negative where the filter adds to the error.${caution}`,
    table(
      ['band', 'reduction', 'attainable', 'share of the error'],
      heldOut.bands.map(({ from, to, reductionDb }, b) => [
        `${frequency(from)} to ${frequency(to)}${unknown(from, to)}`,
        decibels(reductionDb),
        decibels(attainable[b] ?? null),
        decibels(shares[b]?.shareDb ?? null),
      ]),
      ['reduction', 'attainable', 'share of the error'],
    ),
  ];
}
