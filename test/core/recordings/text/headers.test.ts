import { describe, it } from 'vitest';
import { checkText, type TextCase } from '../../../support/textBytes';

// Expected values are read off each text by eye. Quotes follow RFC 4180; the rest is common practice of loggers,
// oscilloscopes and spreadsheets.

const ab = ['a', 'b'];
const two = [
  [1.5, -2, 3],
  [10, 20, 30],
];
const none = [null, null];

const cases: TextCase[] = [
  {
    what: 'units row',
    text: 'a,b\nm/s²,°C\n1.5,10\n-2,20\n3,30\n',
    channels: ab,
    values: two,
  },
  {
    what: 'units row in brackets, some empty',
    text: 'a;b\n[g];\n1.5;10\n-2;20\n3;30\n',
    channels: ab,
    values: two,
  },
  {
    what: 'comments of every kind',
    text: '# one, two\n% three\n// four,4\n; five;5\na,b\n# 1,2\n1.5,10\n  % 3\n-2,20\n//\n; 7,8\n3,30\n#\n',
    channels: ab,
    values: two,
  },
  {
    what: 'comments between blanks',
    text: '; Sample Rate 8000\n; Channels 2\n 1.5 10\n;\n -2 20\n# x\n 3 30\n',
    channels: none,
    values: two,
  },
  {
    what: 'a row that starts with a semicolon where it separates',
    text: 'a;b\n1;2\n;4\n5;6\n',
    channels: ab,
    values: [
      [1, Number.NaN, 5],
      [2, 4, 6],
    ],
  },
  {
    what: 'title above the names',
    text: 'Run of the belt\n\na,b\n1.5,10\n-2,20\n3,30\n',
    channels: ab,
    values: two,
  },
  {
    what: 'quoted names with separators in them',
    text: '"a, left","b ""x"", #2"\n1.5,10\n-2,20\n3,30\n',
    channels: ['a, left', 'b "x", #2'],
    values: two,
  },
  {
    what: 'quoted names with blanks in them',
    text: '"a left" "b"\n1.5 10\n-2 20\n3 30\n',
    channels: ['a left', 'b'],
    values: two,
  },
  {
    what: 'quoted numbers with the decimal comma',
    text: '"a";"b"\n"1,5";"10"\n"-2";"20"\n"3";"30"\n',
    channels: ab,
    values: two,
  },
  {
    what: 'quoted numbers with blanks in the quotes',
    text: 'a,b\n" 1.5"," 10"\n"  -2"," 20"\n"   3"," 30"\n',
    channels: ab,
    values: two,
  },
  {
    what: 'preamble of as many cells as there are columns',
    text: 'Model,X1\nRecord Length,3\na,b\n1.5,10\n-2,20\n3,30\n',
    channels: ab,
    values: two,
  },
  {
    what: 'a preamble of 400 lines of comment',
    text: `${'# settings\n'.repeat(400)}a,b\n1.5,10\n-2,20\n3,30\n`,
    channels: ab,
    values: two,
  },
  {
    what: 'a preamble of 200 lines of comment',
    text: `${'# settings\n'.repeat(200)}a,b\n1.5,10\n-2,20\n3,30\n`,
    channels: ab,
    values: two,
  },
  {
    what: 'non-ASCII letters',
    text: 'Größe;вес\n1,5;10\n-2;20\n3;30\n',
    channels: ['Größe', 'вес'],
    values: two,
  },
  {
    what: 'a column without a name',
    text: 'a,\n1.5,10\n-2,20\n3,30\n',
    channels: ['a', null],
    values: two,
  },
];

describe('names, units and comments', () => {
  it.each(cases)('$what', checkText);
});
