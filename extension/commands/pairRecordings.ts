import * as vscode from 'vscode';
import type { RecordingHead } from '../../core/protocol/messages';
import type { FindingView } from '../../core/protocol/views';
import { fromRoot, type Spot, spotOf } from '../editors/spot';
import { isRecording } from '../files/recordingNames';
import { nameOf, relativePath } from '../files/relativePath';
import type { Services } from '../services';
import { lineOf } from '../translated';
import { candidates, nearestFirst } from './candidates';
import { activeFile, openPageOf } from './openViews';
import { askDocument } from './pairName';
import { askDesired, askInputFile, askInputs, askJob, askRate } from './pairQuestions';
import { channelInWords, pickRecording, recordingsOf } from './pickRecording';

/** Files whose heads are read at most, beside those that were selected: text recordings must be read whole. */
const mostHeads = 12;

/**
 * "Pair Recordings…": asks which channel is what, with the likely answer first, writes the document and opens it.
 * @param selected from the explorer: the recording with the inputs, or two of which one has them; none: asked for
 */
export async function pairRecordings(services: Services, selected: readonly vscode.Uri[]): Promise<void> {
  const ordered = selected.length === 2 ? await askInputFile(selected) : selected;
  if (ordered === null) return;
  const begun = await firstRecording(services, ordered);
  if (begun === null) return;
  const { spot, path } = begun;
  const given = ordered.slice(1).flatMap((uri) => fromRoot(spot, uri) ?? []);
  const others = given.length > 0 ? given : nearestFirst(path, await recordingsOf(spot)).slice(0, mostHeads);
  const [input, ...heads] = await readHeads(services, spot, [path, ...others]);
  if (input.problems.length > 0) return complain(services, input.problems);

  const inputs = await askInputs(input);
  if (inputs === null) return;
  const listed = candidates(input, inputs, heads);
  // Two selected files: the second one is the desired signal's, whatever the first has.
  const chosen = given.length > 0 ? listed.filter((one) => one.path !== path) : [];
  const desired = await askDesired(
    [...chosen, ...listed.filter((one) => !chosen.includes(one))],
    [input, ...heads],
    [nameOf(path), inputs.map(channelInWords).join(', ')].join(' · '),
  );
  if (desired === null) return;
  const other = desired.path === path ? input : heads.find((head) => head.path === desired.path)!;
  const rate = await askRate(input, other);
  if (rate === 'cancelled') return;
  const job = await askJob(desired.path === path && inputs.includes(desired.channel));
  if (job === null) return;
  const document = await askDocument(vscode.Uri.joinPath(spot.rootUri, desired.path));
  if (document === null) return;

  const folder = `/${fromRoot(spot, vscode.Uri.joinPath(document.uri, '..')) ?? ''}`;
  const drafted = await services.worker.call.draft({
    root: spot.root,
    input: { path, file: relativePath(folder, `/${path}`) },
    desired: { path: desired.path, file: relativePath(folder, `/${desired.path}`) },
    inputChannels: inputs.map(String),
    desiredChannel: String(desired.channel),
    job,
    title: document.title,
    sampleRate: rate,
  });
  if ('findings' in drafted) {
    return complain(services, drafted.findings);
  }
  await vscode.workspace.fs.writeFile(document.uri, new TextEncoder().encode(drafted.text));
  await openPageOf(document.uri);
}

/** The recording that holds the inputs: the selected one, the one on show, or one that is asked for. */
async function firstRecording(
  { platform }: Services,
  [first]: readonly vscode.Uri[],
): Promise<{ spot: Spot; path: string } | null> {
  const shown = activeFile();
  const known = first ?? (shown !== null && isRecording(shown.path) ? shown : undefined);
  if (known !== undefined) {
    const spot = spotOf(known, platform);
    return { spot, path: fromRoot(spot, known)! };
  }
  const folder = vscode.workspace.workspaceFolders?.[0];
  if (folder === undefined) return askOutside(platform);
  const spot = spotOf(vscode.Uri.joinPath(folder.uri, 'new.pairing.json'), platform);
  const path = await pickRecording(spot, vscode.l10n.t('Recording with the input'), null);
  return path === null ? null : { spot, path };
}

/** Without a workspace folder a recording is asked for, and its folder is the root. */
async function askOutside(platform: Services['platform']): Promise<{ spot: Spot; path: string } | null> {
  const [uri] =
    (await vscode.window.showOpenDialog({ title: vscode.l10n.t('Recording with the input') })) ?? [];
  if (uri === undefined) return null;
  const spot = spotOf(uri, platform);
  return { spot, path: spot.file };
}

function readHeads({ worker }: Services, { root }: Spot, paths: string[]): Promise<RecordingHead[]> {
  const options = { location: vscode.ProgressLocation.Window, title: vscode.l10n.t('Reading recordings') };
  return Promise.resolve(
    vscode.window.withProgress(options, () => worker.call.heads({ root, paths: [...new Set(paths)] })),
  );
}

async function complain({ log }: Services, problems: readonly FindingView[]): Promise<void> {
  const lines = problems.map(lineOf);
  for (const line of lines) log.error(line);
  await vscode.window.showErrorMessage(lines.join('\n'), { modal: true });
}
