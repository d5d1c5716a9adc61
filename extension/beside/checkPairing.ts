import * as vscode from 'vscode';
import { spotOf } from '../editors/spot';
import type { Services } from '../services';
import type { Beside } from './beside';

/** Checks a pairing as it is saved, solution and all, and shows what was found. */
export async function checkPairing(services: Services, beside: Beside, document: vscode.Uri) {
  const { root, file, folder } = spotOf(document, services.platform);
  const text = new TextDecoder().decode(await vscode.workspace.fs.readFile(document));
  const outcome = await services.worker.call.check({
    session: document.toString(),
    root,
    place: { file, folder },
    text,
  });
  beside.checked(document, outcome.findings);
  return outcome;
}
