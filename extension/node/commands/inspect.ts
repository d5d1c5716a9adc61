import { basename, dirname, resolve } from 'node:path';
import { grouped, significant } from '../../../core/figures/numbers';
import { visible } from '../../../core/figures/visible';
import { inspectedTakeJson } from '../../../core/files/inspectionJson';
import { findingJson } from '../../../core/files/tapsJson';
import { blocked } from '../../../core/findings/finding';
import { problemLine } from '../../../core/findings/problemLine';
import type { RecordingSummary } from '../../../core/pipeline/designResult';
import { inspectPairing, inspectRecording } from '../../../core/pipeline/inspect';
import { type Arguments, type Command, exit, rootOption } from '../commandLine';
import { newNodeHost } from '../nodeHost';
import { pairText } from '../pairText';
import { newTerminal, type Terminal } from '../terminal';
import { openWorkplace } from '../workplace';

export const inspect: Command = {
  name: 'inspect',
  usage: 'FILE|DOC',
  summary: 'shows format, levels and findings',
  help: [
    'Opens a recording, or all recordings that a pairing document names, and shows format, levels and findings; of a',
    'document also whether the signals belong together: lag, clock difference, coherence and what it allows.',
  ].join('\n'),
  positionals: [1, 1],
  options: {
    root: rootOption,
  },
  async run(given) {
    const terminal = newTerminal();
    const [file] = given.positionals;
    return file.endsWith('.json')
      ? inspectDocument(file, given, terminal)
      : inspectFile(file, given, terminal);
  },
};

async function inspectFile(file: string, given: Arguments, terminal: Terminal): Promise<number> {
  const path = resolve(file);
  const host = newNodeHost(dirname(path), terminal.pace());
  try {
    const { recording, findings } = await inspectRecording(host, basename(path), file);
    for (const found of findings) terminal.complain(problemLine(found, file, null));
    if (given.flag('json')) {
      const known = recording === null ? { file } : recordingJson(recording);
      terminal.print(JSON.stringify({ ...known, findings: findings.map(findingJson) }, null, 2));
    } else if (recording !== null) terminal.print(recordingText(recording));
    return blocked(findings) ? exit.badInput : exit.ok;
  } finally {
    await host.close();
  }
}

async function inspectDocument(file: string, given: Arguments, terminal: Terminal): Promise<number> {
  const workplace = await openWorkplace(file, given.text('root'));
  if ('code' in workplace) {
    terminal.complain(problemLine(workplace, file, null));
    return exit.badInput;
  }
  const host = newNodeHost(workplace.root, terminal.pace());
  try {
    const { recordings, pair, findings } = await inspectPairing(host, workplace.text, workplace.place);
    for (const found of findings) terminal.complain(problemLine(found, file, workplace.text));
    if (given.flag('json')) {
      const json = {
        recordings: recordings.map(recordingJson),
        takes: pair?.takes.map(inspectedTakeJson) ?? [],
        findings: findings.map(findingJson),
      };
      terminal.print(JSON.stringify(json, null, 2));
    } else
      terminal.print([...recordings.map(recordingText), ...(pair === null ? [] : pairText(pair))].join('\n'));
    return blocked(findings) ? exit.badInput : exit.ok;
  } finally {
    await host.close();
  }
}

type Recorded = Omit<RecordingSummary, 'sha256'>;

function recordingJson({ file, format, sampleRate, samples, channels, levels }: Recorded) {
  return {
    file,
    format,
    sampleRate,
    samples,
    channels: channels.map((name, c) => {
      const { min, max, mean, rms } = levels[c];
      return { name, min, max, mean, rms };
    }),
  };
}

function recordingText({ file, format, sampleRate, samples, channels, levels }: Recorded): string {
  const rate =
    sampleRate === null
      ? 'rate not given'
      : `${significant(sampleRate, 6)} Hz, ${significant(samples / sampleRate, 6)} s`;
  const rows = channels.map((name, c) => {
    const { min, max, mean, rms } = levels[c];
    return [visible(name), ...[min, max, mean, rms].map((value) => significant(value, 5))];
  });
  const table = [['channel', 'min', 'max', 'mean', 'rms'], ...rows];
  const widths = table[0].map((_, i) => Math.max(...table.map((row) => row[i].length)));
  const lines = table.map(
    (row) =>
      `  ${row.map((cell, i) => (i === 0 ? cell.padEnd(widths[i]) : cell.padStart(widths[i]))).join('  ')}`,
  );
  return [`${visible(file)}: ${format}, ${grouped(samples)} samples, ${rate}`, ...lines].join('\n');
}
