import { spawnSync } from 'node:child_process';
import { cpSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';

/** `npm start`: the main job on a copy of the sample bench, and how to go on. */

const project = join(__dirname, '..');
const bench = join(project, 'out', 'bench');
const documents = ['belt.pairing.json', 'valve.pairing.json', 'tubing.pairing.json'];

interface Ideal {
  idealNmseDb: number;
}

function main(): number {
  rmSync(bench, { recursive: true, force: true });
  cpSync(join(project, 'media', 'bench'), bench, { recursive: true });
  const ideal: Record<string, Ideal> = JSON.parse(readFileSync(join(bench, 'ideal.json'), 'utf8'));
  console.log('Designing the filters of the sample bench, on a copy in out/bench:\n');
  for (const document of documents) {
    const run = spawnSync(process.execPath, [join(__dirname, 'cli.js'), 'design', document], {
      cwd: bench,
      stdio: 'inherit',
    });
    if (run.status !== 0) return run.status ?? 1;
    console.log(
      `  ideal     ${ideal[document].idealNmseDb.toFixed(2)} dB held out, known from how the recordings were made\n`,
    );
  }
  console.log(
    [
      'Next:',
      '  read   out/bench/generated/belt.note.md, the design note for the reviewer',
      '  check  node dist/cli.js check out/bench/*.pairing.json',
      '  own    node dist/cli.js pair INPUT.wav DESIRED.wav, then node dist/cli.js design NAME.pairing.json',
    ].join('\n'),
  );
  return 0;
}

process.exitCode = main();
