import { expect, it } from 'vitest';
import { plainNotice } from '../../extension/plainNotice';
import { hostileNames } from '../support/hostileNames';

/** What the workbench takes for a link in a message. */
const link = /\[([^\]]+)\]\(((?:https?:\/\/|command:|file:)[^)\s]+)(?: (["'])(.+?)(\3))?\)/gi;

it('makes no link of a name and leaves other sentences as they are', () => {
  const names = [
    ...hostileNames,
    '[Run](command:workbench.action.terminal.new)',
    '[a][b](file:///etc/passwd)',
    '[x](](command:y)',
    '[a]\u202e(https://example.org)',
  ];
  for (const name of names) expect(plainNotice(`${name}: nothing was written. ${name}`)).not.toMatch(link);
  expect('[Run](command:x)').toMatch(link);
  expect(plainNotice('belt (2) [a]: 3 of 5 files written.')).toBe('belt (2) [a]: 3 of 5 files written.');
});
