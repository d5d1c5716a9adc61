import { type Command, exit, helpText, readArguments, UsageError } from './commandLine';
import { apply } from './commands/apply';
import { check } from './commands/check';
import { choose } from './commands/choose';
import { design } from './commands/design';
import { inspect } from './commands/inspect';
import { pair } from './commands/pair';
import { newTerminal } from './terminal';

const commands: Command[] = [pair, inspect, choose, design, check, apply];

function overview(): string {
  const rows = commands.map(({ name, usage, summary }) => [`  tapwright ${name} ${usage}`, summary]);
  const width = Math.max(...rows.map(([left]) => left.length));
  return [
    'tapwright: from a pair of recordings to committed FIR taps',
    '',
    ...rows.map(([left, right]) => `${left.padEnd(width)}  ${right}`),
    '',
    'Exit codes: 0 all well, 1 stale, edited, different or over a limit, 2 bad input.',
    '"tapwright COMMAND --help" tells more.',
  ].join('\n');
}

async function main(args: string[]): Promise<number> {
  const terminal = newTerminal();
  const [name, ...rest] = args;
  if (name === undefined || name === '--help' || name === '-h' || name === 'help') {
    terminal.print(overview());
    return name === undefined ? exit.badInput : exit.ok;
  }
  const command = commands.find((known) => known.name === name);
  if (command === undefined) {
    terminal.complain(
      `tapwright: got command "${name}" when expected one of ${commands.map((c) => c.name).join(', ')}`,
    );
    return exit.badInput;
  }
  try {
    const given = readArguments(command, rest);
    if (given.flag('help')) {
      terminal.print(helpText(command));
      return exit.ok;
    }
    return await command.run(given);
  } catch (error) {
    if (!(error instanceof UsageError)) throw error;
    terminal.complain(`tapwright ${name}: ${error.message}; see "tapwright ${name} --help"`);
    return exit.badInput;
  }
}

main(process.argv.slice(2)).then((code) => {
  process.exitCode = code;
});
