import { visible } from '../../../core/figures/visible';
import { findingJson, resultJson } from '../../../core/files/tapsJson';
import { problemLine } from '../../../core/findings/problemLine';
import { check as runCheck } from '../../../core/pipeline/check';
import { type Arguments, type Command, exit, rootOption } from '../commandLine';
import { newNodeHost } from '../nodeHost';
import { newTerminal, type Terminal } from '../terminal';
import { openWorkplace } from '../workplace';

const exits = { current: exit.ok, failed: exit.failed, 'bad-input': exit.badInput } as const;

export const check: Command = {
  name: 'check',
  usage: 'DOC…',
  summary: 'tells whether what is written still holds; writes nothing',
  help: [
    'Compares digests of the document, the recordings and the written files, solves again, runs the written integers',
    'again and holds the limits against them. Prints one line a finding:',
    '',
    '  FILE:LINE:COL: error|warning|note: TEXT [CODE]',
  ].join('\n'),
  positionals: [1, 1000],
  options: {
    root: rootOption,
  },
  async run(given) {
    const terminal = newTerminal();
    let worst: number = exit.ok;
    for (const document of given.positionals)
      worst = Math.max(worst, await checkOne(document, given, terminal));
    return worst;
  },
};

async function checkOne(document: string, given: Arguments, terminal: Terminal): Promise<number> {
  const workplace = await openWorkplace(document, given.text('root'));
  const print = given.flag('json') ? terminal.complain : terminal.print;
  if ('code' in workplace) {
    print(problemLine(workplace, document, null));
    if (given.flag('json'))
      terminal.print(JSON.stringify({ state: 'bad-input', findings: [findingJson(workplace)] }, null, 2));
    return exit.badInput;
  }
  const host = newNodeHost(workplace.root, terminal.pace());
  try {
    const { state, result, findings } = await runCheck(host, workplace.text, workplace.place);
    for (const found of findings) print(problemLine(found, document, workplace.text));
    if (given.flag('json')) {
      const figures = result === null ? {} : resultJson(result);
      terminal.print(JSON.stringify({ state, ...figures, findings: findings.map(findingJson) }, null, 2));
    } else if (state === 'current') {
      terminal.print(`${visible(document)}: current`);
    }
    return exits[state];
  } finally {
    await host.close();
  }
}
