import { t } from '../words';
import { make } from './elements';
import { newTableTwin, type TableData } from './tableTwin';

/** What every plot has around its canvas: title, tools, legend, a line that reads values out, and the table twin. */
export interface Frame {
  element: HTMLElement;
  /** Beside the title. */
  tools: HTMLElement;
  /** Takes the focus and the keys. */
  area: HTMLElement;
  canvas: HTMLCanvasElement;
  legend: HTMLElement;
  readout: HTMLElement;
  /** Says something below the plot; aloud only while the plot has the focus, so that a moving pointer stays silent. */
  say(text: string): void;
  /** Null: nothing to show. */
  fill(tables: (() => TableData[]) | null): void;
}

/**
 * @param keys what the keys do, for the label of the part that takes the focus
 * @param picture what the canvas shows, for its label
 */
export function newFrame(className: string, title: string, keys: string, picture: string): Frame {
  const element = make('figure', `plot ${className}`);
  const head = make('figcaption', 'plotHead');
  const tools = make('span', 'plotTools');
  head.append(make('span', 'plotTitle', title), tools);
  const area = make('div', 'plotArea');
  area.tabIndex = 0;
  // Arrow keys reach the plot in a screen reader's reading mode too.
  area.setAttribute('role', 'application');
  area.setAttribute('aria-label', `${title}. ${keys}`);
  const canvas = make('canvas');
  canvas.setAttribute('role', 'img');
  canvas.setAttribute('aria-label', picture);
  area.append(canvas);
  const legend = make('ul', 'plotLegend');
  const readout = make('p', 'plotReadout');
  readout.setAttribute('aria-live', 'off');
  area.addEventListener('focusin', () => readout.setAttribute('aria-live', 'polite'));
  area.addEventListener('focusout', () => readout.setAttribute('aria-live', 'off'));
  const table = newTableTwin();
  const empty = make('p', 'plotEmpty', t('Nothing to show yet.'));
  const frame: Frame = {
    element,
    tools,
    area,
    canvas,
    legend,
    readout,
    say(text) {
      if (readout.textContent !== text) readout.textContent = text;
    },
    fill(tables) {
      element.classList.toggle('plotNothing', tables === null);
      table.show(tables ?? (() => []));
    },
  };
  element.append(head, empty, area, readout, legend, table.element);
  frame.fill(null);
  return frame;
}
