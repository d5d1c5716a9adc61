import * as vscode from 'vscode';

/** The output channel "Tapwright": errors, and how long things took. */
export type Log = vscode.LogOutputChannel;

export function newLog(): Log {
  return vscode.window.createOutputChannel('Tapwright', { log: true });
}

/** Runs a task and writes down how long it took, or why it failed. */
export async function timed<T>(log: Log, what: string, task: () => Promise<T>): Promise<T> {
  const begun = performance.now();
  try {
    const result = await task();
    log.info(`${what}: ${Math.round(performance.now() - begun)} ms`);
    return result;
  } catch (error) {
    log.error(`${what}: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`);
    throw error;
  }
}
