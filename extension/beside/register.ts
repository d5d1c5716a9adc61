import * as vscode from 'vscode';
import type { OpenPairings } from '../editors/openPairings';
import type { Services } from '../services';
import { Beside } from './beside';
import { checkPairing } from './checkPairing';
import { CheckTasks, taskType } from './checkTask';
import { Comparison } from './compare';
import { languages } from './generatedNames';
import { ArrayHover } from './hover';
import { ArrayLens } from './lens';
import { Problems } from './problems';
import { QuickFixes } from './quickFixes';
import { StrayTaps } from './strayTaps';

/** What is beside the code, for the commands. */
export interface BesideCode {
  beside: Beside;
  comparison: Comparison;
}

/** Registers what explains generated arrays and tells when they no longer hold, and begins to look. */
export function registerBeside(
  context: vscode.ExtensionContext,
  services: Services,
  pairings: OpenPairings,
): BesideCode {
  const beside = new Beside(services, context);
  const comparison = new Comparison(beside, pairings);
  const stray = new StrayTaps(beside);
  const lens = new ArrayLens(beside);
  const problems = new Problems(beside);
  const code = languages.map((language) => ({ language }));
  const fixes = new QuickFixes(problems);
  services.checked = (document, findings) => beside.checked(document, findings);
  context.subscriptions.push(
    beside,
    comparison,
    stray,
    lens,
    problems,
    vscode.languages.registerHoverProvider(code, new ArrayHover(beside, stray)),
    vscode.languages.registerCodeLensProvider(code, lens),
    vscode.languages.registerCodeActionsProvider({ pattern: '**/*' }, fixes, QuickFixes.metadata),
    vscode.tasks.registerTaskProvider(taskType, new CheckTasks(services, beside)),
    vscode.workspace.onDidSaveTextDocument(({ uri }) => {
      const wanted = () => vscode.workspace.getConfiguration('tapwright', uri).get('check.onSave', false);
      if (!uri.path.endsWith('.pairing.json') || !wanted()) return;
      checkPairing(services, beside, uri).catch((error) => services.log.error(`check: ${error}`));
    }),
  );
  beside.find().catch((error) => services.log.error(`pairings of the workspace: ${error}`));
  return { beside, comparison };
}
