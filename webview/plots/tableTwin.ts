import { grouped } from '../../core/figures/numbers';
import { t } from '../words';
import { make } from './elements';
import { evenRows } from './thin';

/** The numbers of a plot. Cells that are numbers are shown by their column and copied in full. */
export interface TableData {
  caption: string;
  columns: { label: string; show(value: number): string }[];
  rows: number;
  row(index: number): (number | string)[];
}

const mostRows = 500;

/** A closed "Table" whose content is made when it is opened, and made again when the data changes while it is open. */
export function newTableTwin(): { element: HTMLElement; show(tables: () => TableData[]): void } {
  const element = make('details', 'plotTable');
  element.append(make('summary', '', t('Table')));
  const content = make('div', 'plotTableContent');
  element.append(content);
  let tables: () => TableData[] = () => [];
  const fill = () => {
    if (!element.open) return content.replaceChildren();
    const made = tables();
    const copy = make('button', 'plotButton', t('Copy all rows'));
    copy.type = 'button';
    const done = make('span', 'plotCopied');
    done.setAttribute('role', 'status');
    copy.addEventListener('click', () => {
      void writeClipboard(made.map(asText).join('\n')).then((written) => {
        done.textContent = written
          ? t('Copied.')
          : t('The clipboard cannot be reached; select the table and copy it.');
      });
    });
    content.replaceChildren(...made.flatMap(build), copy, done);
  };
  element.addEventListener('toggle', fill);
  return {
    element,
    show(next) {
      tables = next;
      fill();
    },
  };
}

/** False where there is no clipboard or it may not be written. */
async function writeClipboard(text: string): Promise<boolean> {
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    return false;
  }
}

function build(data: TableData): HTMLElement[] {
  const shownRows = evenRows(data.rows, mostRows);
  const table = make('table');
  table.append(make('caption', '', data.caption));
  const head = make('tr');
  const first = data.rows > 0 ? data.row(0) : [];
  data.columns.forEach(({ label }, column) => {
    const cell = make('th', typeof first[column] === 'number' ? 'number' : '', label);
    cell.scope = 'col';
    head.append(cell);
  });
  table.createTHead().append(head);
  const body = table.createTBody();
  for (const index of shownRows) {
    const line = body.insertRow();
    data.row(index).forEach((value, column) => {
      const cell = line.insertCell();
      cell.textContent = typeof value === 'number' ? data.columns[column].show(value) : value;
      if (typeof value === 'number') cell.className = 'number';
    });
  }
  const scroller = make('div', 'plotTableScroller');
  scroller.tabIndex = 0;
  scroller.setAttribute('role', 'region');
  scroller.setAttribute('aria-label', data.caption);
  scroller.append(table);
  if (shownRows.length === data.rows) return [scroller];
  const note = t(
    '{0} of {1} rows are shown, evenly spaced; all of them are copied.',
    grouped(shownRows.length),
    grouped(data.rows),
  );
  return [make('p', 'plotNote', note), scroller];
}

/** Tab-separated, numbers in full, so that it can be pasted into a sheet. */
function asText(data: TableData): string {
  const lines = [data.columns.map(({ label }) => label).join('\t')];
  for (let i = 0; i < data.rows; i++) {
    lines.push(
      data
        .row(i)
        .map((value) => (typeof value === 'number' && Number.isNaN(value) ? '' : String(value)))
        .join('\t'),
    );
  }
  return `${lines.join('\n')}\n`;
}
