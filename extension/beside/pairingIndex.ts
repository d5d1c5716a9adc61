import { pathIn } from '../../core/document/paths';
import type { Entry } from './standing';

/** The pairings of the workspace, found by what hangs together with them. Paths are from a root. */
export class PairingIndex {
  private readonly entries = new Map<string, Entry>();
  private maps: Maps | null = null;

  get all(): Entry[] {
    return [...this.entries.values()];
  }

  get(document: string): Entry | undefined {
    return this.entries.get(document);
  }

  put(entry: Entry): void {
    this.entries.set(entry.document, entry);
    this.maps = null;
  }

  remove(document: string): boolean {
    this.maps = null;
    return this.entries.delete(document);
  }

  symbols(): Iterable<string> {
    return this.made().symbols.keys();
  }

  /** Pairings whose written names start with the symbol, those nearest to the file first. */
  bySymbol(symbol: string, root: string, path: string): Entry[] {
    const near = (entry: Entry) => (entry.root === root ? 1 + shared(entry.view?.tapsFile ?? '', path) : 0);
    return [...(this.made().symbols.get(symbol) ?? [])].sort((a, b) => near(b) - near(a));
  }

  /** The pairing that this file was written from. */
  byOutput(root: string, path: string): Entry | undefined {
    return this.made().outputs.get(keyOf(root, path));
  }

  /** Pairings whose state hangs on this file. */
  hangingOn(root: string, path: string): Entry[] {
    return this.made().files.get(keyOf(root, path)) ?? [];
  }

  /** Pairings whose state hangs on a file in this folder, or in one of its own. */
  hangingBelow(root: string, folder: string): Entry[] {
    const start = keyOf(root, `${folder}/`);
    const found = new Set<Entry>();
    for (const [key, entries] of this.made().files) {
      if (key.startsWith(start)) for (const entry of entries) found.add(entry);
    }
    return [...found];
  }

  private made(): Maps {
    this.maps ??= mapsOf(this.entries.values());
    return this.maps;
  }
}

interface Maps {
  symbols: Map<string, Entry[]>;
  outputs: Map<string, Entry>;
  files: Map<string, Entry[]>;
}

function mapsOf(entries: Iterable<Entry>): Maps {
  const maps: Maps = { symbols: new Map(), outputs: new Map(), files: new Map() };
  for (const entry of entries) {
    const { root, folder, file, view } = entry;
    const looked = new Set([pathIn(folder, file), ...Object.keys(view?.seen.stamps ?? {})]);
    for (const path of looked) push(maps.files, keyOf(root, path), entry);
    if (view === null || view.symbol === null) continue;
    push(maps.symbols, view.symbol, entry);
    const outputs = view.tapsFile === null ? view.others : [view.tapsFile, ...view.others];
    for (const path of outputs) maps.outputs.set(keyOf(root, path), entry);
  }
  return maps;
}

function push(map: Map<string, Entry[]>, key: string, entry: Entry): void {
  const known = map.get(key);
  if (known === undefined) map.set(key, [entry]);
  else known.push(entry);
}

function keyOf(root: string, path: string): string {
  return `${root}\n${path}`;
}

/** Folders that two paths share. */
function shared(a: string, b: string): number {
  const [x, y] = [a.split('/'), b.split('/')];
  let count = 0;
  while (count < x.length - 1 && count < y.length - 1 && x[count] === y[count]) count++;
  return count;
}
