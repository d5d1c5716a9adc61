import { mkdtempSync, rmSync } from 'node:fs';
import { cpus, tmpdir } from 'node:os';
import { join } from 'node:path';
import { endReference } from './python';
import type { Row } from './row';
import { editorRows } from './rows/editor';
import { fileRows } from './rows/files';
import { forgetSignals, signalRows } from './rows/signals';
import { solverRows } from './rows/solvers';
import { stageRows } from './rows/stages';

// Prints a Markdown table of our time over the reference's, medians of alternating runs in one go.
// Words on the command line choose the rows whose names hold them; without words those that take minutes are left out.

const runs = 5;
const wanted = process.argv.slice(2);

const median = (values: number[]) => [...values].sort((a, b) => a - b)[values.length >> 1];
const milliseconds = (seconds: number) => (1000 * seconds).toPrecision(3);

async function measure(row: Row, folder: string): Promise<string> {
  const ratios: number[] = [];
  const ours: number[] = [];
  const reference: number[] = [];
  if (!row.long) {
    // Once to warm up: compiled code on our side, loaded data on the other.
    await row.ours(folder);
    await row.reference(folder);
  }
  for (let k = 0; k < (row.long ? 1 : runs); k++) {
    ours.push(await row.ours(folder));
    reference.push(await row.reference(folder));
    ratios.push(ours[k] / reference[k]);
  }
  const ratio = median(ratios);
  const state = ratio <= row.goal ? 'yes' : '**no**';
  const cells = [
    row.name,
    milliseconds(median(ours)),
    milliseconds(median(reference)),
    ratio.toFixed(2),
    `≤ ${row.goal}`,
    `${state}${row.remark === undefined ? '' : `, ${row.remark()}`}`,
  ];
  return `| ${cells.join(' | ')} |`;
}

async function main(): Promise<void> {
  const folder = mkdtempSync(join(tmpdir(), 'bench-'));
  console.log(`${cpus().length} × ${cpus()[0].model.trim()}, Node ${process.version}\n`);
  console.log('| work; reference | ours, ms | reference, ms | ratio | goal | reached |');
  console.log('| --- | --: | --: | --: | --: | --- |');
  try {
    for (const rows of [signalRows, solverRows, fileRows, stageRows, editorRows]) {
      for (const row of rows) {
        if (wanted.length > 0 ? !wanted.some((word) => row.name.includes(word)) : row.long) continue;
        await row.prepare(folder);
        console.log(await measure(row, folder));
      }
      endReference();
      forgetSignals();
    }
  } finally {
    endReference();
    rmSync(folder, { recursive: true, force: true });
  }
  // The editor's worker may be at work still.
  process.exit();
}

main();
