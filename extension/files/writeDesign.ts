import * as vscode from 'vscode';
import type { WrittenFile } from '../../core/protocol/messages';
import type { FindingView, PlannedFile } from '../../core/protocol/views';
import { findingView } from '../../core/view/findingView';
import type { Spot } from '../editors/spot';
import { hostFinding } from '../findingsOfHost';
import type { Platform } from '../platform';
import { workspaceDisk } from './workspaceDisk';
import { writeAll } from './writeAll';

export interface WriteOutcome {
  files: PlannedFile[];
  /** Why nothing was written. */
  findings: FindingView[];
}

/** Writes a design's files, all or none, unless the workspace is not trusted or one is being edited. */
export async function writeDesign(
  platform: Platform,
  { rootUri, folderUri }: Spot,
  files: readonly WrittenFile[],
): Promise<WriteOutcome> {
  if (!vscode.workspace.isTrusted) return refused([untrusted()]);
  const edited = files.filter(({ path }) => isEdited(vscode.Uri.joinPath(folderUri, path)));
  if (edited.length > 0) return refused(edited.map(({ path }) => unsaved(path)));
  const disk = platform.disk(rootUri, folderUri) ?? workspaceDisk(rootUri, folderUri);
  const written = await writeAll(disk, files);
  if (written.findings.length > 0) {
    return refused(written.findings.map((found) => findingView(found, null)));
  }
  const planned = written.files.map((file, i) => ({ ...file, size: files[i].bytes.length }));
  return { files: planned, findings: [] };
}

export function untrusted(): FindingView {
  return hostFinding(
    'untrusted',
    vscode.l10n.t('Files are written only in a workspace that you trust. Trust it, then write again.'),
  );
}

function unsaved(path: string): FindingView {
  return hostFinding(
    'unsaved-changes',
    vscode.l10n.t('The file is open with unsaved changes, so it is left as it is. Save or revert it first.'),
    path,
  );
}

function isEdited(uri: vscode.Uri): boolean {
  const key = uri.toString();
  return vscode.workspace.textDocuments.some(
    (document) => document.isDirty && document.uri.toString() === key,
  );
}

function refused(findings: FindingView[]): WriteOutcome {
  return { files: [], findings };
}
