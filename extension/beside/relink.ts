import * as vscode from 'vscode';
import { resolveInside } from '../../core/document/paths';
import { readTaps } from '../../core/files/readTaps';
import { Refusal } from '../../core/findings/finding';
import { applyChanges } from '../editors/applyEdit';
import { spotOf } from '../editors/spot';
import { recordingEndings } from '../files/recordingNames';
import { pathBelow, relativePath } from '../files/relativePath';
import { plainNotice } from '../plainNotice';
import type { Services } from '../services';
import { type Beside, passedOver } from './beside';
import { relinkChanges } from './relinkChanges';
import type { Entry } from './standing';

/** Finds a recording that was moved by what it holds, and lets the document name its new place. */
export async function relinkRecording(
  services: Services,
  beside: Beside,
  document: vscode.Uri,
  missing: string,
): Promise<void> {
  const entry = beside.index.get(document.toString());
  const sha256 = entry === undefined ? null : await digestOf(beside, entry, missing);
  if (entry === undefined || sha256 === null) {
    const text = vscode.l10n.t('Nothing was written from {0} yet, so that its digest is not known.', missing);
    void vscode.window.showInformationMessage(plainNotice(text));
    return;
  }
  const folder = vscode.Uri.parse(entry.root);
  const old = resolveInside(entry.folder, missing);
  const found = await services.worker.call.sameRecordings({
    root: spotOf(document, services.platform).root,
    paths: await recordingsBelow(folder, missing),
    sha256,
    size: (old === null ? undefined : entry.view?.seen.sizes[old]) ?? null,
  });
  const path = found.length > 1 ? await vscode.window.showQuickPick(found) : found[0];
  if (path === undefined) {
    if (found.length === 0) {
      const text = vscode.l10n.t('No recording of the workspace folder holds what {0} held.', missing);
      void vscode.window.showInformationMessage(plainNotice(text));
    }
    return;
  }
  const text = await vscode.workspace.openTextDocument(document);
  const wasSaved = !text.isDirty;
  await applyChanges(
    text,
    relinkChanges(text.getText(), missing, relativePath(`/${entry.folder}`, `/${path}`)),
  );
  if (wasSaved) await text.save();
}

/** As the taps file states it. */
async function digestOf(beside: Beside, entry: Entry, file: string): Promise<string | null> {
  if (entry.view?.tapsFile == null) return null;
  const uri = beside.uriOf(entry.root, entry.view.tapsFile);
  try {
    const text = new TextDecoder().decode(await vscode.workspace.fs.readFile(uri));
    return readTaps(text, uri.path).recordings.find((one) => one.file === file)?.sha256 ?? null;
  } catch (error) {
    if (error instanceof Refusal || error instanceof vscode.FileSystemError) return null;
    throw error;
  }
}

/** Paths from the folder of all files that could be recordings, those with the ending that it had first. */
async function recordingsBelow(folder: vscode.Uri, missing: string): Promise<string[]> {
  const ending = /\.[^./]*$/.exec(missing)?.[0] ?? '';
  const endings = [...new Set([ending, ...recordingEndings])].filter((one) => /^\.\w+$/.test(one));
  const found: string[] = [];
  for (const one of endings) {
    const pattern = new vscode.RelativePattern(folder, `**/*${one}`);
    for (const uri of await vscode.workspace.findFiles(pattern, passedOver)) {
      const path = pathBelow(folder.path, uri.path);
      if (path) found.push(path);
    }
  }
  return found;
}
