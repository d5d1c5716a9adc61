import type * as vscode from 'vscode';
import type { Services } from '../services';
import { Pairing } from './pairing';

/** The pairings that pages or commands use now: all pages of a document share one. */
export class OpenPairings {
  private readonly known = new Map<string, { pairing: Pairing; holders: number }>();

  constructor(private readonly services: Services) {}

  /** To be given back by {@link release}. */
  hold(document: vscode.TextDocument): Pairing {
    const key = document.uri.toString();
    const entry = this.known.get(key) ?? { pairing: new Pairing(document, this.services), holders: 0 };
    entry.holders++;
    this.known.set(key, entry);
    return entry.pairing;
  }

  release({ document }: Pairing): void {
    const key = document.uri.toString();
    const entry = this.known.get(key);
    if (entry === undefined || --entry.holders > 0) return;
    this.known.delete(key);
    entry.pairing.dispose();
  }

  dispose(): void {
    for (const { pairing } of this.known.values()) pairing.dispose();
    this.known.clear();
  }
}
