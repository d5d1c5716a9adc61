import type { Finding, FindingValue } from './finding';
import { sentences } from './sentences';

function show(value: FindingValue): string {
  if (typeof value === 'string') return value;
  return Number.isInteger(value) ? String(value) : String(Number(value.toPrecision(6)));
}

/** The finding's sentence with its values filled in, without its place. */
export function say(found: Finding): string {
  return sentences[found.code].says.replace(/\{(\w+)\}/g, (all, name: string) => {
    const value = found.values[name];
    return value === undefined ? all : show(value);
  });
}

/** Where a finding is, in words: `slow.csv, channel cell, samples 100 to 140`; empty where nothing is known. */
export function placeInWords(found: Finding): string {
  const parts: string[] = [];
  if (found.file !== undefined) parts.push(found.file);
  if (found.line !== undefined) parts.push(`line ${found.line}`);
  if (found.take !== undefined) parts.push(`take ${found.take}`);
  if (found.channel !== undefined) parts.push(`channel ${found.channel}`);
  if (found.from !== undefined) {
    parts.push(found.to === undefined ? `sample ${found.from}` : `samples ${found.from} to ${found.to}`);
  }
  return parts.join(', ');
}

/** Place and sentence in one line. */
export function sayWithPlace(found: Finding): string {
  const place = placeInWords(found);
  return place === '' ? say(found) : `${place}: ${say(found)}`;
}
