import { choiceJson } from '../../../core/files/choiceJson';
import { jsonText } from '../../../core/files/jsonText';
import { findingJson } from '../../../core/files/tapsJson';
import { problemLine } from '../../../core/findings/problemLine';
import { choose as runChoose } from '../../../core/pipeline/choose';
import { choiceText } from '../choiceText';
import { type Command, exit, rootOption } from '../commandLine';
import { newNodeHost } from '../nodeHost';
import { newTerminal } from '../terminal';
import { openWorkplace } from '../workplace';

export const choose: Command = {
  name: 'choose',
  usage: 'DOC',
  summary: 'cross-validates length, delay and regularisation and suggests values; writes nothing',
  help: [
    'Fits filters of many lengths, delays and regularisations on parts of the fit intervals and measures each on the',
    'part left out. Suggests the shortest filter that is within one standard error of the best, says why, and shows its',
    'error on the held-out intervals, which nothing else looks at.',
  ].join('\n'),
  positionals: [1, 1],
  options: {
    root: rootOption,
  },
  async run(given) {
    const terminal = newTerminal();
    const [document] = given.positionals;
    const workplace = await openWorkplace(document, given.text('root'));
    if ('code' in workplace) {
      terminal.complain(problemLine(workplace, document, null));
      if (given.flag('json')) {
        terminal.print(JSON.stringify({ findings: [findingJson(workplace)] }, null, 2));
      }
      return exit.badInput;
    }
    const { root, place, text } = workplace;
    const host = newNodeHost(root, terminal.pace());
    try {
      const { choice, findings } = await runChoose(host, text, place);
      for (const found of findings) terminal.complain(problemLine(found, document, text));
      if (given.flag('json')) {
        const known = choice === null ? {} : choiceJson(choice);
        terminal.print(jsonText({ ...known, findings: findings.map(findingJson) }).trimEnd());
      } else if (choice !== null) terminal.print(choiceText(choice));
      return choice === null ? exit.badInput : exit.ok;
    } finally {
      await host.close();
    }
  },
};
