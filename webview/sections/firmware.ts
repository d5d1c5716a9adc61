import type { FindingView, FirmwareView, PlannedFile } from '../../core/protocol/views';
import type { PageContext, Section } from '../context';
import { el, whenChanged } from '../elements';
import { viewOf } from '../state';
import { phrase, t } from '../words';
import { arithmeticFields } from './arithmeticFields';
import { newDetails } from './details';
import { findingList } from './findingList';
import { fileList, rowTable, wordTable } from './firmwareTables';
import { newFrame } from './frame';
import { newPreview } from './preview';
import { writeFields } from './writeFields';

export interface Outcome {
  heading: string;
  files: readonly PlannedFile[];
  findings: readonly FindingView[];
}

export interface FirmwareSection extends Section {
  /** What a writing or a check came to; null: nothing that still holds. */
  showOutcome(outcome: Outcome | null): void;
}

/** The numbers of the target and the files for it. */
export function newFirmware(context: PageContext): FirmwareSection {
  const frame = newFrame('firmware', t('Firmware'), ['firmware'], context);
  frame.fields.append(
    ...arithmeticFields(context).map(({ element }) => element),
    el('h3', {}, t('Files')),
    ...writeFields(context).map(({ element }) => element),
  );
  const numbers = el('div');
  const words = newDetails('words', t('Other word lengths'), false, context);
  const wordRows = el('div');
  words.append(wordRows);
  const files = el('div');
  const preview = newPreview(context);
  const heading = el('h3', { tabindex: '-1' });
  const outcome = el('div', { class: 'outcome', 'data-outcome': '' });
  outcome.hidden = true;
  frame.plots.append(
    outcome,
    frame.follow(numbers, 'firmware'),
    frame.follow(words, 'firmware'),
    frame.follow(files, 'firmware'),
    frame.follow(preview.element, 'firmware'),
  );

  const show = whenChanged((view: FirmwareView | null) => {
    numbers.replaceChildren(...(view === null ? [] : numberTables(view)));
    files.replaceChildren(...(view === null ? [] : plannedFiles(view, context)));
    const table = view === null ? null : wordTable(view);
    wordRows.replaceChildren(...(table === null ? [] : [table]));
    preview.show(view?.preview ?? null);
  });
  return {
    element: frame.element,
    showOutcome(shown) {
      outcome.hidden = shown === null;
      if (shown === null) return;
      const { files: written, findings } = shown;
      heading.textContent = shown.heading;
      outcome.replaceChildren(
        heading,
        ...(written.length > 0 ? [fileList(written, context, true)] : []),
        ...(findings.length > 0 ? [findingList(findings, context)] : []),
      );
      heading.focus();
    },
    update(state) {
      frame.element.hidden = state.form === null;
      frame.update(state);
      const view = viewOf(state, 'firmware');
      show(view);
      words.hidden ||= view?.words === null || view === null;
    },
  };
}

function numberTables(view: FirmwareView): HTMLElement[] {
  const { verdict, safe } = view.overflow;
  const shape = safe ? `✓ ${phrase(verdict)}` : `▲ ${phrase(verdict)}`;
  return [
    el('p', { 'data-anchor': 'overflow', class: safe ? 'verdict' : 'verdict caution' }, shape),
    rowTable(t('Number format'), view.format),
    rowTable(t('Cost'), view.cost),
  ];
}

function plannedFiles(view: FirmwareView, context: PageContext): HTMLElement[] {
  const changes = view.change.map((text) => el('p', {}, phrase(text)));
  return [fileList(view.files, context, false), ...changes];
}
