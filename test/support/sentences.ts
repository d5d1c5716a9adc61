import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import ts from 'typescript';

const project = join(__dirname, '..', '..');

/** A call of a translate function: where, and its English template; null where that is not written out in the call. */
export interface Translated {
  at: string;
  template: string | null;
  values: number;
}

/** TypeScript files of a folder, from the project. */
export function filesOf(folder: string): string[] {
  return readdirSync(join(project, folder), { recursive: true, encoding: 'utf8' })
    .filter((file) => file.endsWith('.ts'))
    .map((file) => `${folder}/${file.replaceAll('\\', '/')}`);
}

/** Calls visit for every node of a file. */
export function eachNode(file: string, visit: (node: ts.Node, at: string) => void): void {
  const text = readFileSync(join(project, file), 'utf8');
  const source = ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true);
  const walk = (node: ts.Node): void => {
    visit(node, `${file}:${source.getLineAndCharacterOfPosition(node.getStart()).line + 1}`);
    ts.forEachChild(node, walk);
  };
  walk(source);
}

/** Every call of `t` and `l10n.t` in a folder. */
export function translatedIn(folder: string): Translated[] {
  const found: Translated[] = [];
  for (const file of filesOf(folder)) {
    eachNode(file, (node, at) => {
      if (!ts.isCallExpression(node) || !/^(?:t|(?:vscode\.)?l10n\.t)$/.test(node.expression.getText()))
        return;
      const [first, ...values] = node.arguments;
      const template = first !== undefined && ts.isStringLiteralLike(first) ? first.text : null;
      found.push({ at, template, values: values.length });
    });
  }
  return found;
}

/** Strings of a folder with `{0}`, `{1}` for what is filled in. */
export function stringsIn(folder: string, without: RegExp): string[] {
  const found: string[] = [];
  for (const file of filesOf(folder).filter((one) => !without.test(one))) {
    eachNode(file, (node) => {
      if (ts.isStringLiteralLike(node)) found.push(node.text);
      if (ts.isTemplateExpression(node)) {
        const rest = node.templateSpans.map((span, i) => `{${i}}${span.literal.text}`);
        found.push(node.head.text + rest.join(''));
      }
    });
  }
  return found;
}
