import { open, readFile, rename, rm } from 'node:fs/promises';
import { basename, dirname, resolve } from 'node:path';
import { visible } from '../../../core/figures/visible';
import { findingJson } from '../../../core/files/tapsJson';
import { finding, Refusal } from '../../../core/findings/finding';
import { problemLine } from '../../../core/findings/problemLine';
import { type Application, prepareApplication, type Wanted } from '../../../core/pipeline/apply';
import { floatWavHeader, floatWavSamples } from '../../../core/recordings/writeWav';
import { type Arguments, type Command, exit, UsageError } from '../commandLine';
import { newNodeHost } from '../nodeHost';
import { newTerminal } from '../terminal';

const wants: readonly Wanted[] = ['output', 'error'];

export const apply: Command = {
  name: 'apply',
  usage: 'TAPS.json FILE -o OUT.wav',
  summary: 'filters a recording with written taps',
  help: [
    "Filters a recording in double precision, with silence before it, and writes 32-bit float WAV in the recording's unit.",
    'For noise cancelling the error d - y, the cleaned signal, is written where the file has the desired channel;',
    'otherwise the output y, the desired mean added.',
  ].join('\n'),
  positionals: [2, 2],
  options: {
    output: { type: 'string', short: 'o', value: 'OUT.wav', says: 'the file to write (needed)' },
    input: {
      type: 'string',
      multiple: true,
      value: 'CHANNEL',
      says: 'input channel, by name or number from 1; give it again for more (default: those of TAPS.json)',
    },
    desired: {
      type: 'string',
      value: 'CHANNEL',
      says: 'channel of the desired signal (default: that of TAPS.json)',
    },
    want: { type: 'string', value: 'WHAT', says: '"output" (y) or "error" (d - y)' },
  },
  run,
};

async function run(given: Arguments): Promise<number> {
  const terminal = newTerminal();
  const [tapsFile, file] = given.positionals;
  const output = given.text('output');
  if (output === null)
    throw new UsageError('got no -o when expected the file to write, for example -o OUT.wav');
  const want = given.text('want');
  const wanted = wants.find((known) => known === want) ?? null;
  if (want !== null && wanted === null)
    throw new UsageError(`got --want ${want} when expected output or error`);
  const path = resolve(file);
  const host = newNodeHost(dirname(path), terminal.pace());
  try {
    const application = await prepareApplication(
      host,
      await readTapsText(tapsFile),
      tapsFile,
      basename(path),
      file,
      {
        inputs: given.texts('input'),
        desired: given.text('desired'),
        wanted,
      },
    );
    await writeWav(application, output, path);
    for (const found of application.findings) terminal.complain(problemLine(found, file, null));
    const { inputs, desired, samples, sampleRate } = application;
    if (given.flag('json')) {
      const json = {
        file: output,
        wanted: application.wanted,
        inputs,
        desired,
        samples,
        sampleRate,
        findings: application.findings.map(findingJson),
      };
      terminal.print(JSON.stringify(json, null, 2));
    } else {
      const from =
        desired === null
          ? `input ${inputs.join(' and ')}`
          : `input ${inputs.join(' and ')}, desired ${desired}`;
      const rate = Number.isInteger(sampleRate) ? '' : `; its header rounds the rate of ${sampleRate} Hz`;
      terminal.print(
        visible(`wrote ${output}: the ${application.wanted}, ${samples} samples (${from})${rate}`),
      );
    }
    return exit.ok;
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    for (const found of error.findings) terminal.complain(problemLine(found, tapsFile, null));
    if (given.flag('json'))
      terminal.print(JSON.stringify({ findings: error.findings.map(findingJson) }, null, 2));
    return exit.badInput;
  } finally {
    await host.close();
  }
}

async function readTapsText(file: string): Promise<string> {
  try {
    return await readFile(file, 'utf8');
  } catch (error) {
    const missing = (error as NodeJS.ErrnoException).code === 'ENOENT';
    throw new Refusal([finding(missing ? 'missing-file' : 'unreadable-file', {}, { file })]);
  }
}

/** Written beside its place and renamed when whole, so that a broken run leaves what was there. */
async function writeWav(application: Application, output: string, source: string): Promise<void> {
  if (resolve(output) === source)
    throw new UsageError('got the recording itself as -o when expected another file');
  const temporary = `${output}.${process.pid}.tmp`;
  try {
    await rm(temporary, { force: true });
    const handle = await open(temporary, 'wx');
    try {
      // Each goes on where the last ended, and writes all or throws.
      await handle.writeFile(floatWavHeader(application.sampleRate, 1, application.samples));
      await application.run((samples) => handle.writeFile(floatWavSamples([samples])));
      await handle.sync();
    } finally {
      await handle.close();
    }
    await rename(temporary, output);
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    if (error instanceof Refusal || code === undefined) throw error;
    throw new Refusal([finding('not-writable', { error: code }, { file: output })]);
  } finally {
    await rm(temporary, { force: true });
  }
}
