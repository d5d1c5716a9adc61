import type { TrackEntry } from '../core/document/pairingDocument';
import type { Change } from '../core/protocol/messages';
import type { FileView, FormView } from '../core/protocol/views';

/** Edits of takes and their signals. All takes have the same number of inputs, so inputs are added to all at once. */

/** Points a signal at another channel. */
export function setTrack(path: Change['path'], before: TrackEntry, after: TrackEntry): Change[] {
  const changes: Change[] = [];
  if (after.file !== before.file) changes.push({ path: [...path, 'file'], value: after.file });
  if (after.channel !== before.channel) changes.push({ path: [...path, 'channel'], value: after.channel });
  return changes;
}

/** Adds an input to every take: the channel of the same name or number in the file of the take's first input. */
export function addInput(form: FormView, take: number, track: TrackEntry): Change[] {
  return form.document.takes.map((entry, i) => ({
    path: ['takes', i, 'inputs', entry.inputs.length],
    value: i === take ? track : { file: entry.inputs[0].file, channel: track.channel },
  }));
}

/** Takes an input out of every take, and its own full scale where each input has one. */
export function removeInput(form: FormView, input: number): Change[] {
  const changes: Change[] = form.document.takes.map((_entry, i) => ({ path: ['takes', i, 'inputs', input] }));
  if (form.given.includes(`arithmetic/input/fullScale/${input}`)) {
    changes.push({ path: ['arithmetic', 'input', 'fullScale', input] });
  }
  return changes;
}

/** Adds a take with a name of its own; further inputs are those of the first take, in the new file. */
export function addTake(form: FormView, input: TrackEntry, desired: TrackEntry): Change[] {
  const { takes } = form.document;
  const names = new Set(takes.map(({ name }) => name));
  let number = takes.length + 1;
  while (names.has(`take ${number}`)) number++;
  const others = (takes[0]?.inputs ?? []).slice(1).map(({ channel }) => ({ file: input.file, channel }));
  const value = { name: `take ${number}`, inputs: [input, ...others], desired };
  return [{ path: ['takes', takes.length], value }];
}

export function removeTake(take: number): Change[] {
  return [{ path: ['takes', take] }];
}

/** The first two recordings of an empty document. `missing` are keys the document still needs. */
export function firstPair(input: TrackEntry, desired: TrackEntry, missing: readonly string[]): Change[] {
  const changes: Change[] = [];
  if (missing.includes('pairing')) changes.push({ path: ['pairing'], value: 1 });
  if (missing.includes('job')) changes.push({ path: ['job'], value: 'cancel' });
  return [...changes, { path: ['takes'], value: [{ inputs: [input], desired }] }];
}

export interface TrackChoice {
  label: string;
  track: TrackEntry;
}

/** Every channel of the files, and the present one where no file has it. */
export function trackChoices(files: readonly FileView[], present: TrackEntry): TrackChoice[] {
  const choices = files.flatMap(({ file, channels }) =>
    channels.map(({ label, entry }) => ({ label: `${file} · ${label}`, track: { file, channel: entry } })),
  );
  if (choices.some(({ track }) => sameTrack(track, present, files))) return choices;
  return [{ label: `${present.file} · ${present.channel}`, track: present }, ...choices];
}

/** True where both mean the same channel: a name and its number are the same. */
export function sameTrack(a: TrackEntry, b: TrackEntry, files: readonly FileView[]): boolean {
  if (a.file !== b.file) return false;
  if (a.channel === b.channel) return true;
  const channels = files.find(({ file }) => file === a.file)?.channels ?? [];
  const number = (channel: string | number) =>
    typeof channel === 'number' ? channel - 1 : channels.findIndex(({ label }) => label === channel);
  return number(a.channel) >= 0 && number(a.channel) === number(b.channel);
}
