import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { project } from './places';

interface Command {
  command: string;
  title: string;
  category?: string;
}

const json = (name: string) => JSON.parse(readFileSync(join(project, name), 'utf8'));

function commandOf(id: string): Command {
  const commands: Command[] = json('package.json').contributes?.commands ?? [];
  const found = commands.find(({ command }) => command === id);
  if (found === undefined) throw new Error(`the manifest has no command ${id}`);
  return found;
}

/** A text of the manifest, looked up where it stands in the table of translations. */
function told(text: string): string {
  const key = /^%(.*)%$/.exec(text)?.[1];
  if (key === undefined || !existsSync(join(project, 'package.nls.json'))) return text;
  return json('package.nls.json')[key];
}

/** A command as the palette shows it: `Category: Title`. */
export function titleOf(id: string): string {
  const { title, category } = commandOf(id);
  return category === undefined ? told(title) : `${told(category)}: ${told(title)}`;
}

/** A command as a menu shows it: without its category. */
export function menuTitleOf(id: string): string {
  return told(commandOf(id).title);
}

/** The walkthrough's title, and those of its steps by their names. */
export function walkthrough(): { title: string; steps: Record<string, string> } {
  const [{ title, steps }] = json('package.json').contributes.walkthroughs;
  const titles = steps.map((step: { id: string; title: string }) => [step.id, told(step.title)]);
  return { title: told(title), steps: Object.fromEntries(titles) };
}
