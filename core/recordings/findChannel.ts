import { type Finding, finding, type Place } from '../findings/finding';
import { channelLabel, type Recording } from './recording';

/** Most channels that a finding names. */
const named = 12;

/** Characters of each: headers know no limit. */
const longest = 60;

/**
 * Number from 0 of a channel that a document names: by its name in the file (the first of that name) or by its number
 * from 1; null where the recording has none such.
 */
export function findChannel(recording: Recording, channel: string | number): number | null {
  const number = typeof channel === 'number' ? channel - 1 : recording.channels.indexOf(channel);
  return number >= 0 && number < recording.channels.length ? number : null;
}

/** The same for a text of the command line, where digits may be a name or a number. */
export function findChannelByText(recording: Recording, text: string): number | null {
  return (
    findChannel(recording, text) ?? (/^[1-9]\d*$/.test(text) ? findChannel(recording, Number(text)) : null)
  );
}

/** The finding that a recording has no such channel, with those it has. */
export function channelMissing(recording: Recording, channel: string | number, place: Place = {}): Finding {
  const known = recording.channels.slice(0, named).map((_, c) => short(channelLabel(recording, c)));
  const more = recording.channels.length > named ? ', …' : '';
  const values = {
    channel: short(String(channel)),
    count: recording.channels.length,
    known: known.join(', ') + more,
  };
  return finding('channel-missing', values, { file: recording.file, ...place });
}

function short(name: string): string {
  const characters = [...name.slice(0, 2 * longest)];
  const cut = characters.length > longest || name.length > 2 * longest;
  return cut ? `${characters.slice(0, longest).join('')}…` : name;
}
