import { describe, it } from 'vitest';
import { checkText, type TextCase } from '../../../support/textBytes';

// Expected values are read off each text by eye; the dialects are common practice of loggers and spreadsheets.

const ab = ['a', 'b'];
const two = [
  [1.5, -2, 3],
  [10, 20, 30],
];
const none = [null, null];

const separators: TextCase[] = [
  { what: 'commas', text: 'a,b\n1.5,10\n-2,20\n3,30\n', channels: ab, values: two },
  { what: 'semicolons', text: 'a;b\n1.5;10\n-2;20\n3;30\n', channels: ab, values: two },
  { what: 'tabs', text: 'a\tb\n1.5\t10\n-2\t20\n3\t30\n', channels: ab, values: two },
  { what: 'one blank', text: 'a b\n1.5 10\n-2 20\n3 30\n', channels: ab, values: two },
  {
    what: 'many blanks, some before and after',
    text: '  a      b\n 1.5    10  \n-2      20\n   3  30\n',
    channels: ab,
    values: two,
  },
  { what: 'blanks and tabs mixed', text: 'a \t b\n1.5\t 10\n-2 \t20\n3  30\n', channels: ab, values: two },
  { what: 'no header', text: '1.5,10\n-2,20\n3,30\n', channels: none, values: two },
  {
    what: 'blanks and tabs round cells',
    text: ' a , b\n 1.5 ,\t10\n  -2,20 \n3 , 30\n',
    channels: ab,
    values: two,
  },
  {
    what: 'blanks round cells between tabs',
    text: 'a\t b \n 1.5\t 10\n -2 \t20 \n3\t30\n',
    channels: ab,
    values: two,
  },
  { what: 'decimal comma, semicolons', text: 'a;b\n1,5;10\n-2;20\n3,0;30\n', channels: ab, values: two },
  { what: 'decimal comma, tabs', text: 'a\tb\n1,5\t10\n-2\t20\n3,0\t30\n', channels: ab, values: two },
  { what: 'decimal comma, blanks', text: 'a b\n1,5 10,0\n-2 20\n3 30\n', channels: ab, values: two },
  {
    what: 'decimal comma late in the file',
    text: 'a;b\n1;10\n-2;20,5\n',
    channels: ab,
    values: [
      [1, -2],
      [10, 20.5],
    ],
  },
  { what: 'one column', text: 'a\n1.5\n-2\n3\n', channels: ['a'], values: [two[0]] },
  { what: 'one column without a name', text: '1.5\n-2\n3\n', channels: [null], values: [two[0]] },
];

const ends: TextCase[] = [
  {
    what: 'trailing separator in rows and header',
    text: 'a,b,\n1.5,10,\n-2,20,\n3,30,\n',
    channels: ab,
    values: two,
  },
  {
    what: 'trailing separator in rows only',
    text: 'a;b\n1.5;10;\n-2;20;\n3;30;\n',
    channels: ab,
    values: two,
  },
  {
    what: 'trailing separator, no header',
    text: '1.5\t10\t\n-2\t20\t\n3\t30\t\n',
    channels: none,
    values: two,
  },
  {
    what: 'trailing separator in some rows',
    text: 'a,b\n1.5,10\n-2,20,\n3,30\n',
    channels: ab,
    values: two,
  },
  {
    what: 'empty last column that the header names',
    text: 'a,b,c\n1.5,10,\n-2,20,\n3,30,\n',
    channels: ['a', 'b', 'c'],
    values: [...two, [Number.NaN, Number.NaN, Number.NaN]],
  },
  { what: 'CR LF', text: 'a,b\r\n1.5,10\r\n-2,20\r\n3,30\r\n', channels: ab, values: two },
  { what: 'CR only', text: 'a,b\r1.5,10\r-2,20\r3,30\r', channels: ab, values: two },
  { what: 'mixed line ends', text: 'a,b\r\n1.5,10\n-2,20\r3,30\r\n', channels: ab, values: two },
  { what: 'LF CR', text: 'a,b\n\r1.5,10\n\r-2,20\n\r3,30\n\r', channels: ab, values: two },
  { what: 'no end at the last line', text: 'a,b\n1.5,10\n-2,20\n3,30', channels: ab, values: two },
  { what: 'CR at the very end', text: 'a,b\r\n1.5,10\r\n-2,20\r\n3,30\r', channels: ab, values: two },
  {
    what: 'blank lines all over',
    text: '\n\na,b\n\n1.5,10\n\n-2,20\n3,30\n \n\t\n\n',
    channels: ab,
    values: two,
  },
];

describe('separators and decimal signs', () => {
  it.each(separators)('$what', checkText);
});

describe('ends of rows and of the file', () => {
  it.each(ends)('$what', checkText);
});
