import { open, rm } from 'node:fs/promises';
import { basename, dirname, extname, relative, resolve, sep } from 'node:path';
import { type Job, jobs } from '../../../core/document/pairingDocument';
import { visible } from '../../../core/figures/visible';
import { findingJson } from '../../../core/files/tapsJson';
import { type Finding, finding, Refusal } from '../../../core/findings/finding';
import { problemLine } from '../../../core/findings/problemLine';
import { draftPair, type PairFile } from '../../../core/pipeline/draftPair';
import { type Arguments, type Command, exit, rootOption, UsageError } from '../commandLine';
import { newNodeHost } from '../nodeHost';
import { newTerminal } from '../terminal';
import { rootFor } from '../workplace';

export const pair: Command = {
  name: 'pair',
  usage: 'INPUT [DESIRED] [-o DOC]',
  summary: 'writes a new pairing document from two recordings, or two channels of one',
  help: [
    'Writes a new pairing document with defaults drawn from the files: fit on the first two thirds, held out on the last.',
    'Without --input and --desired the first channel of each file is taken; of one file the first and the last.',
    'An existing document is never overwritten.',
  ].join('\n'),
  positionals: [1, 2],
  options: {
    output: {
      type: 'string',
      short: 'o',
      value: 'DOC',
      says: 'the document (default: NAME.pairing.json beside the desired file)',
    },
    input: {
      type: 'string',
      multiple: true,
      value: 'CHANNEL',
      says: 'channel of INPUT, by name or number from 1; give it again for more inputs',
    },
    desired: { type: 'string', value: 'CHANNEL', says: 'channel of DESIRED' },
    job: {
      type: 'string',
      value: 'JOB',
      says: `one of ${jobs.join(', ')} (default: identify, or predict where both are one channel)`,
    },
    length: {
      type: 'string',
      value: 'TAPS',
      says: 'filter length (default: 64, or fewer for a short recording)',
    },
    rate: { type: 'string', value: 'HZ', says: 'samples a second, where the files do not say' },
    title: { type: 'string', value: 'TEXT', says: 'title (default: the name of the document)' },
    root: rootOption,
  },
  run,
};

async function run(given: Arguments): Promise<number> {
  const terminal = newTerminal();
  const [inputFile, desiredFile = inputFile] = given.positionals.map((file) => resolve(file));
  const output = resolve(given.text('output') ?? defaultOutput(desiredFile));
  if (!output.endsWith('.pairing.json')) {
    throw new UsageError(`got "${basename(output)}" when expected a name that ends in .pairing.json`);
  }
  const folder = dirname(output);
  const root = rootFor(folder, given.text('root'));
  const host = newNodeHost(root, terminal.pace());
  const show = (path: string) => relative(process.cwd(), path) || path;
  try {
    const drafted = await draftPair(host, {
      input: pairFile(root, folder, inputFile),
      desired: pairFile(root, folder, desiredFile),
      inputChannels: given.texts('input'),
      desiredChannel: given.text('desired'),
      job: jobGiven(given),
      title: given.text('title') ?? basename(output, '.pairing.json'),
      sampleRate: numberGiven(given, 'rate', 'a number above 0'),
      length: numberGiven(given, 'length', 'a whole number above 0'),
    });
    await writeNew(output, drafted.text, show(output));
    for (const found of drafted.findings) terminal.complain(problemLine(found, show(output), null));
    const { job, inputs, desired } = drafted;
    if (given.flag('json')) {
      terminal.print(
        JSON.stringify(
          { document: show(output), job, inputs, desired, findings: drafted.findings.map(findingJson) },
          null,
          2,
        ),
      );
    } else {
      const of = (channels: string[], path: string) => `${channels.join(' and ')} of ${basename(path)}`;
      terminal.print(
        visible(
          `wrote ${show(output)}: ${job}, input ${of(inputs, inputFile)}, desired ${of([desired], desiredFile)}`,
        ),
      );
    }
    return exit.ok;
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    for (const found of error.findings) terminal.complain(problemLine(found, show(output), null));
    if (given.flag('json'))
      terminal.print(JSON.stringify({ findings: error.findings.map(findingJson) }, null, 2));
    return exit.badInput;
  } finally {
    await host.close();
  }
}

function defaultOutput(desired: string): string {
  return `${desired.slice(0, desired.length - extname(desired).length)}.pairing.json`;
}

function pairFile(root: string, folder: string, path: string): PairFile {
  const file = relative(folder, path).split(sep).join('/');
  const fromRoot = relative(root, path).split(sep).join('/');
  if (fromRoot.startsWith('../') || fromRoot === '..')
    throw new Refusal([finding('outside-root', {}, { file })]);
  return { path: fromRoot, file };
}

function jobGiven(given: Arguments): Job | null {
  const text = given.text('job');
  if (text === null) return null;
  const job = jobs.find((known) => known === text);
  if (job === undefined) throw new UsageError(`got job "${text}" when expected one of ${jobs.join(', ')}`);
  return job;
}

function numberGiven(given: Arguments, name: string, expected: string): number | null {
  const text = given.text(name);
  if (text === null) return null;
  const value = Number(text);
  if (!(value > 0) || !Number.isFinite(value) || (expected.includes('whole') && !Number.isInteger(value))) {
    throw new UsageError(`got --${name} ${text} when expected ${expected}`);
  }
  return value;
}

/** Fails where the file is there already, also if it appeared a moment ago. */
async function writeNew(path: string, text: string, shown: string): Promise<void> {
  let made = false;
  try {
    const handle = await open(path, 'wx');
    made = true;
    try {
      await handle.writeFile(text);
      await handle.sync();
    } finally {
      await handle.close();
    }
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    // Half a document is none, and would be in the way of the next try.
    if (made) await rm(path, { force: true });
    const found: Finding =
      code === 'EEXIST'
        ? finding('document-exists', {}, { file: shown })
        : finding('not-writable', { error: code ?? 'unknown' }, { file: shown });
    throw new Refusal([found]);
  }
}
