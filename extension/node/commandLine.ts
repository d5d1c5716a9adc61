import { parseArgs } from 'node:util';

/** Exit codes of every command. */
export const exit = { ok: 0, failed: 1, badInput: 2 } as const;

/** An option of a command: what follows `--name` in the help, and its sentence. */
export interface Option {
  type: 'string' | 'boolean';
  short?: string;
  multiple?: boolean;
  /** Placeholder of its value in the help. */
  value?: string;
  says: string;
}

/** The folder that a document's paths stay in. */
export const rootOption: Option = {
  type: 'string',
  value: 'FOLDER',
  says: "folder that no path may leave (default: the current one, or the document's)",
};

export type Options = Readonly<Record<string, Option>>;

/** What was given on the command line. */
export interface Arguments {
  positionals: string[];
  text(name: string): string | null;
  texts(name: string): string[] | null;
  flag(name: string): boolean;
}

export interface Command {
  name: string;
  /** After the name, for example `DOC…`. */
  usage: string;
  /** One line for the list of commands. */
  summary: string;
  /** More for `--help`. */
  help: string;
  /** Fewest and most positionals. */
  positionals: [number, number];
  options: Options;
  run(given: Arguments): Promise<number>;
}

/** Wrong use of the command line; its message is for the user. */
export class UsageError extends Error {}

/** Options that every command takes. */
export const commonOptions: Options = {
  json: { type: 'boolean', says: 'print one JSON object on standard output' },
  help: { type: 'boolean', short: 'h', says: 'show this help' },
};

/** @throws UsageError for unknown options, missing values and wrong numbers of arguments */
export function readArguments(command: Command, args: string[]): Arguments {
  const options = { ...command.options, ...commonOptions };
  let parsed: ReturnType<typeof parseArgs>;
  try {
    parsed = parseArgs({ args, options, allowPositionals: true });
  } catch (error) {
    throw new UsageError((error as Error).message);
  }
  const { positionals, values } = parsed;
  const [fewest, most] = command.positionals;
  if (!values.help && (positionals.length < fewest || positionals.length > most)) {
    throw new UsageError(`got ${positionals.length} file names when expected ${command.usage}`);
  }
  return {
    positionals,
    text: (name) => (values[name] as string | undefined) ?? null,
    texts: (name) => (values[name] as string[] | undefined) ?? null,
    flag: (name) => values[name] === true,
  };
}

/** The text of `tapwright COMMAND --help`. */
export function helpText(command: Command): string {
  const rows = Object.entries({ ...command.options, ...commonOptions }).map(([name, option]) => {
    const short = option.short === undefined ? '    ' : `-${option.short}, `;
    const value = option.type === 'string' ? ` ${option.value ?? 'TEXT'}` : '';
    return [`  ${short}--${name}${value}`, option.says];
  });
  const width = Math.max(...rows.map(([left]) => left.length));
  const table = rows.map(([left, right]) => `${left.padEnd(width)}  ${right}`).join('\n');
  return `tapwright ${command.name} ${command.usage}\n\n${command.help}\n\n${table}`;
}
