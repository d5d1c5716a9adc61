import * as vscode from 'vscode';
import { stemOf } from '../files/relativePath';

const ending = '.pairing.json';

/** Where the new document goes, and its title. */
export interface NewDocument {
  uri: vscode.Uri;
  title: string;
}

/**
 * Asks for the document's name, beside the desired recording; a file that is there is replaced on the user's word only.
 * Null: cancelled.
 */
export async function askDocument(desired: vscode.Uri): Promise<NewDocument | null> {
  const stem = stemOf(desired.path);
  const name = await vscode.window.showInputBox({
    title: vscode.l10n.t('Name of the pairing document'),
    value: stem + ending,
    valueSelection: [0, stem.length],
    validateInput: (given) => faultOf(given),
  });
  if (name === undefined) return null;
  const whole = withEnding(name);
  const uri = vscode.Uri.joinPath(desired, '..', whole);
  if ((await isThere(uri)) && !(await mayReplace(whole))) return null;
  return { uri, title: whole.slice(0, -ending.length) };
}

function withEnding(given: string): string {
  const name = given.trim();
  return name.endsWith(ending) ? name : name + ending;
}

function faultOf(given: string): string | null {
  const stem = withEnding(given).slice(0, -ending.length);
  if (stem === '' || /[\\/:*?"<>|\p{Cc}]/u.test(stem) || /^\.+$/.test(stem)) {
    return vscode.l10n.t('Got "{0}" when expected a file name.', given);
  }
  return null;
}

async function isThere(uri: vscode.Uri): Promise<boolean> {
  try {
    await vscode.workspace.fs.stat(uri);
    return true;
  } catch {
    return false;
  }
}

async function mayReplace(name: string): Promise<boolean> {
  const replace = vscode.l10n.t('Replace');
  const text = vscode.l10n.t('{0} is there already. Replace it?', name);
  return (await vscode.window.showWarningMessage(text, { modal: true }, replace)) === replace;
}
