import { readFileSync } from 'node:fs';
import { writeFiles } from '../../../extension/node/writeFiles';

// The command line's writing alone, in a process that starts fast: `writer.js FOLDER FILES`, with FILES a JSON object of
// paths and bytes in base64. Prints the findings' codes.

const [folder, list] = process.argv.slice(2);
const files = Object.entries(JSON.parse(readFileSync(list, 'utf8')) as Record<string, string>);
void writeFiles(
  folder,
  folder,
  files.map(([path, base64]) => ({ path, bytes: new Uint8Array(Buffer.from(base64, 'base64')) })),
).then(({ findings }) => console.log(JSON.stringify(findings.map(({ code }) => code))));
