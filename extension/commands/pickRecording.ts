import * as vscode from 'vscode';
import type { RecordingHead } from '../../core/protocol/messages';
import { fromRoot, type Spot } from '../editors/spot';
import { listRecordings } from '../files/listRecordings';
import { recordingEndings } from '../files/recordingNames';
import { nameOf } from '../files/relativePath';

interface FileItem extends vscode.QuickPickItem {
  path: string | null;
}

/**
 * Asks for a recording of the root.
 * @param present the one that is chosen now, from the root
 * @returns its path from the root; null: none was chosen
 */
export async function pickRecording(
  spot: Spot,
  title: string,
  present: string | null,
): Promise<string | null> {
  const listing = recordingsOf(spot).then((paths): FileItem[] => [
    ...paths.map((path) => ({
      path,
      label: nameOf(path),
      description: path === nameOf(path) ? '' : path,
      picked: path === present,
    })),
    { path: null, label: vscode.l10n.t('Another file…'), alwaysShow: true },
  ]);
  const chosen = await vscode.window.showQuickPick(listing, {
    title,
    placeHolder: vscode.l10n.t('A recording'),
    matchOnDescription: true,
  });
  if (chosen === undefined) return null;
  return chosen.path ?? pickElsewhere(spot, title);
}

/** Recordings below the root, by their paths from it. */
export function recordingsOf({ rootUri }: Spot): Promise<string[]> {
  return listRecordings((folder) => vscode.workspace.fs.readDirectory(vscode.Uri.joinPath(rootUri, folder)));
}

async function pickElsewhere(spot: Spot, title: string): Promise<string | null> {
  const [uri] =
    (await vscode.window.showOpenDialog({
      title,
      defaultUri: spot.folderUri,
      filters: { [vscode.l10n.t('Recordings')]: recordingEndings.map((ending) => ending.slice(1)) },
    })) ?? [];
  if (uri === undefined) return null;
  const path = fromRoot(spot, uri);
  if (path !== null) return path;
  const text = vscode.l10n.t('{0} lies outside the folder of the document; copy it there first.', uri.path);
  await vscode.window.showErrorMessage(text, { modal: true });
  return null;
}

/** Rate and length of a recording, in words. */
export function shapeInWords({ samples, sampleRate, channels }: RecordingHead): string {
  const count =
    channels.length === 1 ? vscode.l10n.t('one channel') : vscode.l10n.t('{0} channels', channels.length);
  if (sampleRate === null) return vscode.l10n.t('{0} samples, rate not known, {1}', samples, count);
  const seconds = Number((samples / sampleRate).toPrecision(3));
  return vscode.l10n.t('{0} Hz, {1} s, {2}', sampleRate, seconds, count);
}

/** A channel in words. */
export function channelInWords(channel: string | number): string {
  return typeof channel === 'number' ? vscode.l10n.t('channel {0}', channel) : channel;
}
