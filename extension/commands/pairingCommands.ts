import * as vscode from 'vscode';
import type { FindingView } from '../../core/protocol/views';
import type { OpenPairings } from '../editors/openPairings';
import type { Pairing } from '../editors/pairing';
import { plainNotice } from '../plainNotice';
import type { Services } from '../services';
import { lineOf } from '../translated';
import { activeFile, openPageOf } from './openViews';

type Report = (pairing: Pairing, services: Services) => Promise<void>;

/** A command on a pairing: the one given, from the explorer, or the one on show. */
export function onPairing(
  services: Services,
  pairings: OpenPairings,
  what: () => string,
  report: Report,
): (given?: vscode.Uri) => Promise<void> {
  return async (given) => {
    const uri = given ?? activeFile();
    if (uri === null || !uri.path.endsWith('.pairing.json')) {
      await vscode.window.showInformationMessage(vscode.l10n.t('Open a pairing document first.'));
      return;
    }
    const pairing = pairings.hold(await vscode.workspace.openTextDocument(uri));
    const options = { location: vscode.ProgressLocation.Window, title: `${pairing.spot.file}: ${what()}` };
    try {
      await vscode.window.withProgress(options, () => report(pairing, services));
    } finally {
      pairings.release(pairing);
    }
  };
}

/** Writes the files and says what became of them. */
export const writeAndReport: Report = async (pairing, services) => {
  const { files, findings } = await pairing.write();
  if (findings.length > 0) {
    await openPageOf(pairing.document.uri);
    pairing.show('firmware');
    return tellFindings(services, vscode.l10n.t('{0}: nothing was written.', pairing.spot.file), findings);
  }
  for (const { path, change } of files) services.log.info(`${pairing.spot.file}: ${change} ${path}`);
  const written = files.filter(({ change }) => change !== 'unchanged').length;
  const text =
    written === 0
      ? vscode.l10n.t('{0}: all {1} files are as they were.', pairing.spot.file, files.length)
      : vscode.l10n.t('{0}: {1} of {2} files written.', pairing.spot.file, written, files.length);
  void vscode.window.showInformationMessage(plainNotice(text));
};

/** Checks what was written and says how it stands. */
export const checkAndReport: Report = async (pairing, services) => {
  const { state, findings } = await pairing.check();
  const { file } = pairing.spot;
  if (state === 'current') {
    const text = vscode.l10n.t('{0}: the written files match the document and its recordings.', file);
    void vscode.window.showInformationMessage(plainNotice(text));
    return;
  }
  await openPageOf(pairing.document.uri);
  pairing.show('firmware');
  const text =
    state === 'failed'
      ? vscode.l10n.t('{0}: the check failed.', file)
      : vscode.l10n.t('{0}: there is no design to check.', file);
  tellFindings(services, text, findings);
};

/** The worst finding in sight, all of them in the log. */
function tellFindings({ log }: Services, text: string, findings: readonly FindingView[]): void {
  const lines = findings.map(lineOf);
  for (const line of lines) log.warn(line);
  const showLog = vscode.l10n.t('Show Log');
  void vscode.window.showWarningMessage(plainNotice(`${text} ${lines[0] ?? ''}`), showLog).then((chosen) => {
    if (chosen === showLog) log.show();
  });
}
