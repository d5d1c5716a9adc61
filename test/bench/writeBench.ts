import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { benchFiles, benchScenarios } from './bench';

const folder = join('media', 'bench');
mkdirSync(folder, { recursive: true });
for (const [name, bytes] of benchFiles(benchScenarios())) {
  writeFileSync(join(folder, name), bytes);
  console.log(`${join(folder, name)}  ${(bytes.length / 1024).toFixed(0)} KiB`);
}
