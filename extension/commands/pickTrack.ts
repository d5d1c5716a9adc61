import * as vscode from 'vscode';
import type { TrackEntry } from '../../core/document/pairingDocument';
import { resolveInside } from '../../core/document/paths';
import type { Spot } from '../editors/spot';
import { relativePath } from '../files/relativePath';
import type { Services } from '../services';
import { lineOf } from '../translated';
import { channelInWords, pickRecording, shapeInWords } from './pickRecording';

/**
 * Asks for a file and one of its channels.
 * @param file as the document names it, where only the channel is asked for
 * @param role what it is to be, where that is known
 */
export async function pickTrack(
  { worker }: Services,
  spot: Spot,
  file: string | null,
  role?: 'input' | 'desired',
): Promise<TrackEntry | null> {
  const title =
    role === undefined
      ? vscode.l10n.t('Choose a signal')
      : role === 'input'
        ? vscode.l10n.t('Choose the input')
        : vscode.l10n.t('Choose the desired signal');
  const path = file === null ? await pickRecording(spot, title, null) : resolveInside(spot.folder, file);
  if (path === null) return null;
  const [head] = await worker.call.heads({ root: spot.root, paths: [path] });
  if (head.problems.length > 0) {
    await vscode.window.showErrorMessage(head.problems.map(lineOf).join('\n'), { modal: true });
    return null;
  }
  const items = head.channels.map((channel) => ({ label: channelInWords(channel), channel }));
  const chosen =
    items.length === 1
      ? items[0]
      : await vscode.window.showQuickPick(items, { title, placeHolder: shapeInWords(head) });
  if (chosen === undefined) return null;
  return { file: file ?? relativePath(`/${spot.folder}`, `/${path}`), channel: chosen.channel };
}
