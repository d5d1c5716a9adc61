import type { FindingView, PlannedFile } from '../core/protocol/views';
import type { PageContext } from './context';
import type { FirmwareSection } from './sections/firmware';
import type { Strip } from './strip';
import { t } from './words';

/** Where it is told what came of a check or a writing. */
export interface OutcomePlaces {
  strip: Strip;
  firmware: FirmwareSection | null;
}

/** Checking and writing: told in the strip, and with files and findings in section Firmware. */
export function newOutcome(
  context: PageContext,
  places: () => OutcomePlaces,
): { check(): void; write(): void } {
  const tell = (heading: string, files: PlannedFile[], findings: FindingView[]) => {
    places().strip.say(heading);
    places().firmware?.showOutcome(heading, files, findings);
  };
  const fail = (error: unknown) => {
    places().strip.say(null);
    context.fail(error);
  };
  return {
    check() {
      places().strip.say(t('checking…'));
      context.calls.check(null).then(({ state, findings }) => {
        const heading = {
          current: t('Check passed: the files match.'),
          failed: t('Check failed.'),
          'bad-input': t('Check not possible: the input is bad.'),
        }[state];
        tell(heading, [], findings);
      }, fail);
    },
    write() {
      places().strip.say(t('writing…'));
      context.calls.write(null).then(({ files, findings }) => {
        tell(files.length > 0 ? t('Files written.') : t('Nothing was written.'), files, findings);
      }, fail);
    },
  };
}
