import { writeSync } from 'node:fs';
import { visible } from '../../core/figures/visible';
import { newPace, type Pace } from '../../core/pace';
import { exit } from './commandLine';

/** Where a command speaks: results on standard output, everything else on standard error. */
export interface Terminal {
  print(text: string): void;
  complain(text: string): void;
  /** A pace that shows progress where standard error is a terminal. */
  pace(): Pace;
}

function write(stream: 1 | 2, text: string): void {
  // Synchronous: what is printed last must not be lost when the process ends. A closed pipe ends it quietly.
  const bytes = Buffer.from(text);
  for (let start = 0; start < bytes.length; ) {
    try {
      start += writeSync(stream, bytes, start);
    } catch (error) {
      const { code } = error as NodeJS.ErrnoException;
      if (code === 'EPIPE') process.exit(0);
      if (code === 'EAGAIN') continue;
      if (stream === 1) write(2, `tapwright: standard output could not be written (${code})\n`);
      process.exit(exit.badInput);
    }
  }
}

/** What a terminal would obey or hide is spelled out, in JSON too, where it means the same. */
const seen = (text: string) => text.split('\n').map(visible).join('\n');

export function newTerminal(): Terminal {
  let shown = '';
  const clear = () => {
    if (shown === '') return;
    write(2, `\r${' '.repeat(shown.length)}\r`);
    shown = '';
  };
  return {
    print(text) {
      clear();
      write(1, `${seen(text)}\n`);
    },
    complain(text) {
      clear();
      write(2, `${seen(text)}\n`);
    },
    pace() {
      if (!process.stderr.isTTY) return newPace();
      let last = 0;
      return newPace(
        () => false,
        (what, done, total) => {
          const now = Date.now();
          if (now - last < 100) return;
          last = now;
          clear();
          shown = `${what} ${Math.floor((100 * done) / Math.max(1, total))} %`;
          write(2, shown);
        },
      );
    },
  };
}
