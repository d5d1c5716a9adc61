import { visible } from '../../../core/figures/visible';
import { changeJson } from '../../../core/files/changeJson';
import { designFiles } from '../../../core/files/designFiles';
import { findingJson, resultJson } from '../../../core/files/tapsJson';
import { blocked, type Finding, finding } from '../../../core/findings/finding';
import { problemLine } from '../../../core/findings/problemLine';
import { changeAgainst } from '../../../core/pipeline/changeAgainst';
import { design as runDesign } from '../../../core/pipeline/design';
import { type Arguments, type Command, exit, rootOption } from '../commandLine';
import { newNodeHost } from '../nodeHost';
import { changeSummary, designSummary } from '../summary';
import { newTerminal, type Terminal } from '../terminal';
import { fromFolder, openWorkplace } from '../workplace';
import { writeFiles } from '../writeFiles';

export const design: Command = {
  name: 'design',
  usage: 'DOC…',
  summary: 'solves and writes the files',
  help: [
    'Designs the filter of each pairing document, proves it on the held-out data and writes coefficients, test vectors,',
    'the design note and NAME.taps.json into the folder that the document names: all files or none. Files over a limit',
    'are written too, with that finding first in the note, and the exit code is 1.',
  ].join('\n'),
  positionals: [1, 1000],
  options: {
    root: rootOption,
  },
  async run(given) {
    const terminal = newTerminal();
    let worst: number = exit.ok;
    for (const document of given.positionals) {
      worst = Math.max(worst, await designOne(document, given, terminal));
    }
    return worst;
  },
};

async function designOne(document: string, given: Arguments, terminal: Terminal): Promise<number> {
  const workplace = await openWorkplace(document, given.text('root'));
  if ('code' in workplace) return report(terminal, given, document, null, [workplace]);
  const { root, folder, place, text } = workplace;
  const host = newNodeHost(root, terminal.pace());
  try {
    const { result, findings } = await runDesign(host, text, place);
    if (result === null) return report(terminal, given, document, text, findings);
    // Figures of one part of what a recording was and another of what it is are worth nothing.
    const changed = host
      .changed()
      .map((path) => finding('file-changed', {}, { file: fromFolder(workplace, path) }));
    if (changed.length > 0) return report(terminal, given, document, text, changed);
    const files = designFiles(result, host.newSha256);
    // The taps file comes last; it is compared before it is overwritten.
    const change = await changeAgainst(host, place.folder, files[files.length - 1].path, result);
    const json = given.flag('json');
    // Before anything is overwritten.
    if (!json && change !== null) terminal.print(changeSummary(result, change));
    const written = await writeFiles(root, folder, files);
    if (blocked(written.findings)) return report(terminal, given, document, text, written.findings);
    for (const found of findings) terminal.complain(problemLine(found, document, text));
    if (json) {
      const changed = change === null ? {} : { change: changeJson(change) };
      terminal.print(JSON.stringify({ ...resultJson(result), ...changed, written: written.files }, null, 2));
    } else {
      const lines = written.files.map((file) => `  ${file.change.padEnd(9)} ${visible(file.path)}`);
      terminal.print([designSummary(result), ...lines].join('\n'));
    }
    return findings.some((found) => found.code === 'over-limit') ? exit.failed : exit.ok;
  } finally {
    await host.close();
  }
}

/** Prints findings that stopped a command. */
function report(
  terminal: Terminal,
  given: Arguments,
  document: string,
  text: string | null,
  findings: readonly Finding[],
): number {
  for (const found of findings) terminal.complain(problemLine(found, document, text));
  if (given.flag('json')) terminal.print(JSON.stringify({ findings: findings.map(findingJson) }, null, 2));
  return exit.badInput;
}
