import * as vscode from 'vscode';
import type { OpenPairings } from '../editors/openPairings';
import type { Services } from '../services';
import { activeFile, openAsText, openPageOf } from './openViews';
import { checkAndReport, onPairing, writeAndReport } from './pairingCommands';
import { pairRecordings } from './pairRecordings';
import { openSampleBench } from './sampleBench';

/** Registers every command of the manifest. One that fails says so and writes why into the log. */
export function registerCommands(services: Services, pairings: OpenPairings): vscode.Disposable {
  const write = onPairing(services, pairings, () => vscode.l10n.t('writing files'), writeAndReport);
  const check = onPairing(services, pairings, () => vscode.l10n.t('checking'), checkAndReport);
  const commands: Record<string, (first?: vscode.Uri, all?: vscode.Uri[]) => Promise<unknown> | undefined> = {
    'tapwright.pairRecordings': (first, all) => pairRecordings(services, selection(first, all)),
    'tapwright.openSampleBench': () => openSampleBench(services.extensionUri),
    'tapwright.writeFiles': write,
    'tapwright.solveAndWrite': write,
    'tapwright.check': check,
    'tapwright.openAsText': (uri) => withFile(uri, (file) => openAsText(file, null)),
    'tapwright.openPage': (uri) => withFile(uri, openPageOf),
    'tapwright.showLog': async () => services.log.show(),
  };
  const registered = Object.entries(commands).map(([name, run]) =>
    vscode.commands.registerCommand(name, async (first?: vscode.Uri, all?: vscode.Uri[]) => {
      try {
        await run(first, all);
      } catch (error) {
        services.log.error(`${name}: ${error instanceof Error ? (error.stack ?? error.message) : error}`);
        throw error;
      }
    }),
  );
  return vscode.Disposable.from(...registered);
}

/** The explorer gives the file under the pointer and all that are selected. */
function selection(first: vscode.Uri | undefined, all: vscode.Uri[] | undefined): vscode.Uri[] {
  if (first === undefined) return [];
  const others = Array.isArray(all) ? all.filter((uri) => uri.toString() !== first.toString()) : [];
  // Of two files the one selected first comes first.
  return Array.isArray(all) && all.length === 2 ? all : [first, ...others].slice(0, 2);
}

function withFile(
  given: vscode.Uri | undefined,
  run: (file: vscode.Uri) => Promise<unknown>,
): Promise<unknown> | undefined {
  const file = given ?? activeFile();
  return file === null ? undefined : run(file);
}
