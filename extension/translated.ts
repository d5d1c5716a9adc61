import * as vscode from 'vscode';
import { type Dictionary, translatedLine, translatedText } from '../core/findings/translate';
import type { FindingView } from '../core/protocol/views';

/** Translations by English template, for the page too; empty for English. */
export function dictionary(): Dictionary {
  return vscode.l10n.bundle ?? {};
}

/** A finding's sentence in the user's language. */
export function textOf(found: FindingView): string {
  return translatedText(found, dictionary());
}

/** A finding's place and sentence in the user's language. */
export function lineOf(found: FindingView): string {
  return translatedLine(found, dictionary());
}
