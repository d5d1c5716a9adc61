import { decibels } from '../../figures/decibels';
import { counted, noFigure } from '../../figures/numbers';
import { duration, frequency } from '../../figures/units';
import { wordInWords } from '../../files/numberTypes';
import type { Finding } from '../../findings/finding';
import { sayWithPlace } from '../../findings/say';
import type { DesignResult } from '../../pipeline/designResult';
import { type LimitCheck, limitChecks, worstTake } from '../limits';
import { bullets, name, plain, section, table } from '../markdown';
import { wantedSignalCaution } from '../wantedSignal';

const most = 5;

/** The figure that counts, the limits, and what speaks against the design, worst first. */
export function verdict(result: DesignResult): string {
  const checks = limitChecks(result);
  return section(
    'Verdict',
    `**${headline(result, checks)}** ${shown(result)}`,
    table(
      ['figure', 'value', 'limit', 'state'],
      checks.map((check) => limitRow(result, check)),
      ['value', 'limit'],
    ),
    result.heldOut === null
      ? '**Caution:** nothing is held out, so nothing is proved: every figure here is of the data that the fit saw.'
      : '',
    wantedSignalCaution(result),
    against(result.findings),
  );
}

function headline(result: DesignResult, checks: readonly LimitCheck[]): string {
  const has = (state: LimitCheck['state']) => checks.some((check) => check.state === state);
  if (has('exceeded')) return 'Over a limit: these taps do not pass.';
  if (result.heldOut === null) return 'Not proved: no data are held out.';
  if (has('not tested')) return 'Not tested: a limit is set that these recordings cannot test.';
  if (has('met')) return has('no limit') ? 'The limit that is set is met.' : 'All limits are met.';
  return 'No limits are set; judge the figures.';
}

/** The figure that counts, in a sentence. */
function shown({ heldOut, fit, arithmetic, desired, document, sampleRate }: DesignResult): string {
  const figure = heldOut ?? fit;
  const data = heldOut === null ? 'fit' : heldOut.disturbanceOnly ? 'held-out, disturbance-only' : 'held-out';
  const time = duration(figure.samples / sampleRate);
  const asked = document.prepare.band;
  const band = asked === null ? '' : ` in the band ${frequency(asked.from)} to ${frequency(asked.to)}`;
  const target =
    document.arithmetic.word === 'float64'
      ? ''
      : `; in the arithmetic of the target, with ${wordInWords(document.arithmetic.word)} taps, ${decibels(arithmetic.heldOutNmseDb)}`;
  return `On ${counted(figure.samples, `${data} sample`)} (${time}) the power of the error${band} is ${decibels(figure.nmseDb)} relative to that of the desired signal ${name(desired)}${target}.`;
}

function limitRow(result: DesignResult, check: LimitCheck): string[] {
  const limit = check.limit === null ? 'none set' : decibels(check.limit);
  if (check.what === 'quantisationLoss') {
    return ['quantisation loss', decibels(check.figure), limit, check.state];
  }
  const take = worstTake(result);
  const error = take?.standardErrorDb ?? null;
  const figure = take === null ? noFigure : decibels(take.nmseDb);
  return [
    take === null || result.takes.length === 1
      ? 'held-out NMSE'
      : `held-out NMSE, worst take (${name(take.name)})`,
    error === null ? figure : `${figure} (standard error ${decibels(error)})`,
    limit,
    check.state,
  ];
}

function against(findings: readonly Finding[]): string {
  const isLimit = (found: Finding) => found.code === 'over-limit';
  const grave = [
    ...findings.filter(isLimit),
    ...findings.filter((found) => !isLimit(found) && found.severity !== 'note'),
  ];
  if (grave.length === 0) return 'No cautions were found.';
  const lines = grave.slice(0, most).map((found) => `**${found.severity}:** ${plain(sayWithPlace(found))}`);
  const more = grave.length - lines.length;
  return bullets(more > 0 ? [...lines, `${counted(more, 'further finding')}: see Suitability.`] : lines);
}
