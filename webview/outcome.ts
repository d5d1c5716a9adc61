import type { FindingView, PlannedFile } from '../core/protocol/views';
import type { PageContext } from './context';
import type { FirmwareSection } from './sections/firmware';
import { freshness, type PageState, viewOf } from './state';
import type { Strip } from './strip';
import { t } from './words';

/** Where it is told what came of a check or a writing. */
export interface OutcomePlaces {
  strip: Strip;
  firmware: FirmwareSection | null;
}

/** Of which state an outcome was told. */
export interface Told {
  document: string;
  generation: number;
  /** The files were found or made to match. */
  matching: boolean;
  /** There was a design, which had not been stopped. */
  designed: boolean;
}

/** Checking and writing: told in the strip, and with files and findings in section Firmware. */
export function newOutcome(
  context: PageContext,
  places: () => OutcomePlaces,
): { check(): void; write(): void; update(state: PageState): void } {
  let told: Told | null = null;
  const begin = (text: string) => {
    told = null;
    places().strip.say(text);
  };
  const tell = (heading: string, matching: boolean, files: PlannedFile[], findings: FindingView[]) => {
    const state = context.state();
    const designed = freshness(state, 'firmware') === 'fresh';
    told = { document: documentOf(state), generation: state.generation, matching, designed };
    places().strip.say(heading);
    places().firmware?.showOutcome({ heading, files, findings });
  };
  const fail = (error: unknown) => {
    places().strip.say(null);
    context.fail(error);
  };
  return {
    check() {
      begin(t('checking…'));
      context.calls.check(null).then(({ state, findings }) => {
        const heading = {
          current: t('Check passed: the files match.'),
          failed: t('Check failed.'),
          'bad-input': t('Check not possible: the input is bad.'),
        }[state];
        tell(heading, state === 'current', [], findings);
      }, fail);
    },
    write() {
      begin(t('writing…'));
      context.calls.write(null).then(({ files, findings }) => {
        const written = files.length > 0;
        tell(written ? t('Files written.') : t('Nothing was written.'), written, files, findings);
      }, fail);
    },
    update(state) {
      if (told === null || stillHolds(told, state)) return;
      told = null;
      places().strip.say(null);
      places().firmware?.showOutcome(null);
    },
  };
}

/**
 * Whether what was told is true of a later state. Writing alone makes a new generation, since the files are read again;
 * what it wrote, with the way to each file, stays in sight until the document changes or the files match no more.
 */
export function stillHolds({ document, generation, matching, designed }: Told, state: PageState): boolean {
  // Going on with what was stopped is no new generation.
  const cameLater = !matching && !designed && freshness(state, 'firmware') === 'fresh';
  if (state.generation === generation) return !cameLater;
  if (!matching || !state.readable || documentOf(state) !== document) return false;
  const how = freshness(state, 'firmware');
  if (how === 'computing' || how === 'awaited') return true;
  return how === 'fresh' && viewOf(state, 'firmware')?.state === 'current';
}

function documentOf({ form }: PageState): string {
  return JSON.stringify(form?.document ?? null);
}
