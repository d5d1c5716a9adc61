import * as vscode from 'vscode';
import type { BesideCode } from '../beside/register';
import { relinkRecording } from '../beside/relink';
import type { OpenPairings } from '../editors/openPairings';
import type { Services } from '../services';
import { activeFile, openAsText, openPageOf } from './openViews';
import { checkAndReport, onPairing, writeAndReport } from './pairingCommands';
import { pairRecordings } from './pairRecordings';
import { openSampleBench } from './sampleBench';

/** In the text of a document, from 1. */
type Position = { line: number; column: number };

/** Registers every command of the manifest. One that fails says so and writes why into the log. */
export function registerCommands(
  services: Services,
  pairings: OpenPairings,
  { beside, comparison }: BesideCode,
): vscode.Disposable {
  const write = onPairing(services, pairings, () => vscode.l10n.t('writing files'), writeAndReport);
  const check = onPairing(services, pairings, () => vscode.l10n.t('checking'), checkAndReport);
  const commands: Record<string, (first?: vscode.Uri, more?: unknown) => Promise<unknown> | undefined> = {
    'tapwright.pairRecordings': (first, all) => pairRecordings(services, selection(first, all)),
    'tapwright.openSampleBench': () => openSampleBench(services.extensionUri),
    'tapwright.writeFiles': write,
    'tapwright.solveAndWrite': write,
    'tapwright.check': check,
    'tapwright.openAsText': (uri) => withFile(uri, (file) => openAsText(file, null)),
    'tapwright.openPage': (uri) => withFile(uri, openPageOf),
    'tapwright.compare': (uri) => withPairing(uri, (document) => comparison.show(document)),
    'tapwright.showInText': (uri, at) => withPairing(uri, (document) => openAsText(document, at as Position)),
    'tapwright.relinkRecording': (uri, missing) =>
      withPairing(uri, (document) => relinkRecording(services, beside, document, String(missing))),
    'tapwright.showLog': async () => services.log.show(),
  };
  const registered = Object.entries(commands).map(([name, run]) =>
    vscode.commands.registerCommand(name, async (first?: vscode.Uri | string, more?: unknown) => {
      try {
        // A link in a hover can only bring a text.
        await run(typeof first === 'string' ? vscode.Uri.parse(first) : first, more);
      } catch (error) {
        services.log.error(`${name}: ${error instanceof Error ? (error.stack ?? error.message) : error}`);
        throw error;
      }
    }),
  );
  return vscode.Disposable.from(...registered);
}

/** The explorer gives the file under the pointer and all that are selected. */
function selection(first: vscode.Uri | undefined, all: unknown): vscode.Uri[] {
  if (first === undefined) return [];
  const others = Array.isArray(all) ? all.filter((uri) => uri.toString() !== first.toString()) : [];
  // Two files are given in the order in which they stand there; which has the input is asked.
  return Array.isArray(all) && all.length === 2 ? all : [first, ...others].slice(0, 2);
}

function withPairing(
  given: vscode.Uri | undefined,
  run: (document: vscode.Uri) => Promise<unknown>,
): Promise<unknown> | undefined {
  const file = given ?? activeFile();
  return file?.path.endsWith('.pairing.json') ? run(file) : undefined;
}

function withFile(
  given: vscode.Uri | undefined,
  run: (file: vscode.Uri) => Promise<unknown>,
): Promise<unknown> | undefined {
  const file = given ?? activeFile();
  return file === null ? undefined : run(file);
}
