import * as vscode from 'vscode';
import { type Job, jobs } from '../../core/document/pairingDocument';
import type { RecordingHead } from '../../core/protocol/messages';
import { nameOf } from '../files/relativePath';
import type { Candidate } from './candidates';
import { numberFrom } from './numberFrom';
import { channelInWords, shapeInWords } from './pickRecording';

/**
 * Asks which of two files has the input: in what order they were selected the explorer does not tell.
 * Null: cancelled.
 */
export async function askInputFile(files: readonly vscode.Uri[]): Promise<vscode.Uri[] | null> {
  const items = files.map((uri) => ({ label: nameOf(uri.path), uri }));
  const chosen = await vscode.window.showQuickPick(items, {
    title: vscode.l10n.t('Recording with the input'),
    placeHolder: vscode.l10n.t('What the filter will see; the other recording has the desired signal'),
  });
  if (chosen === undefined) return null;
  return [chosen.uri, ...files.filter((uri) => uri !== chosen.uri)];
}

/** Asks for the input's channels; not asked where there is one. Null: cancelled. */
export async function askInputs(head: RecordingHead): Promise<(string | number)[] | null> {
  if (head.channels.length === 1) return [...head.channels];
  const items = head.channels.map((channel, i) => ({
    label: channelInWords(channel),
    channel,
    picked: i === 0,
  }));
  const chosen = await vscode.window.showQuickPick(items, {
    title: vscode.l10n.t('Input channels of {0}', nameOf(head.path)),
    placeHolder: shapeInWords(head),
    canPickMany: true,
  });
  return chosen === undefined || chosen.length === 0 ? null : chosen.map(({ channel }) => channel);
}

/**
 * Asks for the desired signal among the candidates, the likeliest first.
 * @param input in words
 */
export async function askDesired(
  listed: readonly Candidate[],
  heads: readonly RecordingHead[],
  input: string,
): Promise<Candidate | null> {
  const items = listed.map((candidate) => ({
    label: channelInWords(candidate.channel),
    description: nameOf(candidate.path),
    detail: shapeInWords(heads.find(({ path }) => path === candidate.path)!),
    candidate,
  }));
  const chosen = await vscode.window.showQuickPick(items, {
    title: vscode.l10n.t('Desired signal for the input {0}', input),
    placeHolder: vscode.l10n.t('What the filter is to give'),
    matchOnDescription: true,
  });
  return chosen?.candidate ?? null;
}

/** Samples a second where neither file says; null where one does. */
export async function askRate(a: RecordingHead, b: RecordingHead): Promise<number | null | 'cancelled'> {
  if (a.sampleRate !== null || b.sampleRate !== null) return null;
  const text = await vscode.window.showInputBox({
    title: vscode.l10n.t('Sample rate'),
    prompt: vscode.l10n.t('The files do not say it. Samples a second, in Hz'),
    validateInput: (given) =>
      numberFrom(given) === null
        ? vscode.l10n.t('Got "{0}" when expected a number above 0, without separators.', given)
        : null,
  });
  return text === undefined ? 'cancelled' : numberFrom(text)!;
}

/** @param same input and desired signal are one channel */
export async function askJob(same: boolean): Promise<Job | null> {
  const says: Record<Job, string> = {
    identify: vscode.l10n.t('Model the path from the input to the desired signal'),
    cancel: vscode.l10n.t('Take what the input explains off the desired signal'),
    equalise: vscode.l10n.t('Undo what a path did to the desired signal'),
    predict: vscode.l10n.t('Foretell the signal from its past'),
  };
  const names: Record<Job, string> = {
    identify: vscode.l10n.t('Identify'),
    cancel: vscode.l10n.t('Cancel'),
    equalise: vscode.l10n.t('Equalise'),
    predict: vscode.l10n.t('Predict'),
  };
  const likely: Job = same ? 'predict' : 'identify';
  const ordered = [likely, ...jobs.filter((job) => job !== likely)];
  const items = ordered.map((job) => ({ label: names[job], description: says[job], job }));
  const chosen = await vscode.window.showQuickPick(items, {
    title: vscode.l10n.t('What is the filter for?'),
  });
  return chosen?.job ?? null;
}
