import { appendFileSync, existsSync, mkdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { project } from './places';

/** A run takes less; older entries belong to a process that happened to have the same number. */
const longestRun = 30 * 60_000;

/** Flows of this run, over all its processes, that passed on the second try only. */
export class SecondTries {
  private readonly file: string;

  /** @param run tells runs apart; the processes of one run have the same parent */
  constructor(run = `${process.ppid}`, folder = join(project, 'out', 'secondTries')) {
    mkdirSync(folder, { recursive: true });
    this.file = join(folder, `${run}.txt`);
  }

  /** @returns the flows so far, this one last */
  add(flow: string, now = Date.now()): string[] {
    appendFileSync(this.file, `${now}\t${flow.replace(/\s/g, ' ')}\n`);
    return this.list(now);
  }

  list(now = Date.now()): string[] {
    if (!existsSync(this.file)) return [];
    return readFileSync(this.file, 'utf8')
      .split('\n')
      .filter((line) => line !== '')
      .map((line) => line.split('\t'))
      .filter(([time]) => now - Number(time) < longestRun)
      .map(([, flow]) => flow);
  }
}
