import { table } from './sentence';

/** Findings about the pairing document by itself. `key` names the place, for example `takes[0].fit.to`. */
export const documentSentences = table({
  'document-too-large': {
    severity: 'blocker',
    says: 'got a document of {size} bytes when expected at most {limit}. Is this a pairing document?',
  },
  'document-too-deep': {
    severity: 'blocker',
    says: 'got lists or objects more than {max} deep in each other. Is this a pairing document?',
  },
  'broken-json': {
    severity: 'blocker',
    says: 'line {line}, column {column}: got {found} when expected {expected}. The document is strict JSON: no comments, no comma before a closing bracket.',
  },
  'duplicate-key': {
    severity: 'blocker',
    says: 'line {line}, column {column}: got {key} a second time when expected each key once. Take one of the two out.',
  },
  'version-missing': {
    severity: 'blocker',
    says: 'got no "pairing" when expected "pairing": {expected}, the version of the document. Is this a pairing document?',
  },
  'version-unknown': {
    severity: 'blocker',
    says: 'got version {got} when expected "pairing": {expected}, the only one that this release reads. A newer release may have written the document.',
  },
  'unknown-key': {
    severity: 'note',
    says: 'the key {name} is not known and changes nothing. Known here: {known}.',
  },
  'missing-key': {
    severity: 'blocker',
    says: 'got no {key}; it has no default and must be given.',
  },
  'not-an-object': { severity: 'blocker', says: '{key}: got {got} when expected an object in braces.' },
  'not-a-list': { severity: 'blocker', says: '{key}: got {got} when expected a list in brackets.' },
  'list-too-short': { severity: 'blocker', says: '{key}: got a list of {got} when expected at least {min}.' },
  'list-too-long': { severity: 'blocker', says: '{key}: got a list of {got} when expected at most {max}.' },
  'listed-twice': { severity: 'blocker', says: '{key}: got {got} a second time. Take it out.' },
  'not-a-number': { severity: 'blocker', says: '{key}: got {got} when expected a number.' },
  'not-whole': { severity: 'blocker', says: '{key}: got {got} when expected a whole number.' },
  'not-positive': { severity: 'blocker', says: '{key}: got {got} when expected a number above 0.' },
  'below-range': { severity: 'blocker', says: '{key}: got {got} when expected {min} or more.' },
  'out-of-range': { severity: 'blocker', says: '{key}: got {got} when expected {min} to {max}.' },
  'not-true-or-false': { severity: 'blocker', says: '{key}: got {got} when expected true or false.' },
  'not-one-of': { severity: 'blocker', says: '{key}: got {got} when expected one of {allowed}.' },
  'not-text': { severity: 'blocker', says: '{key}: got {got} when expected text in double quotes.' },
  'empty-text': { severity: 'blocker', says: '{key}: got an empty text. Give it or leave the key out.' },
  'text-too-long': {
    severity: 'blocker',
    says: '{key}: got {got} characters when expected at most {max}.',
  },
  'control-character': {
    severity: 'blocker',
    says: '{key}: got {got} when expected text without control characters, line ends and marks that turn the writing direction.',
  },
  'not-a-channel': {
    severity: 'blocker',
    says: "{key}: got {got} when expected a channel's name, or its number from 1.",
  },
  'path-absolute': {
    severity: 'blocker',
    says: '{key}: got {got} when expected a path relative to the document, without a leading slash or a drive.',
  },
  'path-scheme': {
    severity: 'blocker',
    says: '{key}: got {got}, which starts like an address, when expected a path relative to the document. Put ./ before a name that has a colon.',
  },
  'path-backslash': {
    severity: 'blocker',
    says: '{key}: got {got} when expected forward slashes, which every platform reads.',
  },
  'path-names-folder': {
    severity: 'blocker',
    says: '{key}: got {got}, which is a folder, when expected a file.',
  },
  'take-name-twice': {
    severity: 'blocker',
    says: 'takes {first} and {second} are both called "{name}" when expected different names. Rename one.',
  },
  'input-count-differs': {
    severity: 'blocker',
    says: '{key}: got a list of {got} when expected {expected}, as many as the first take has. All takes are fitted with the same filter.',
  },
  'range-empty': {
    severity: 'blocker',
    says: '{key}: got {from} to {to} {unit}, which holds nothing. The end must come after the start.',
  },
  'range-reversed': {
    severity: 'blocker',
    says: '{key}: got {from} to {to} {unit}, which runs backwards. Exchange the two.',
  },
  'fraction-bits-too-many': {
    severity: 'blocker',
    says: '{key}: got {got} when expected at most {max}, two less than the accumulator of {accumulator} bits. Widen the accumulator or leave the key out.',
  },
  'words-mixed': {
    severity: 'blocker',
    says: '{key}: got {got} when the coefficients are {coefficients}: the filter computes in integers or in one float type throughout.',
  },
  'not-a-signal-word': {
    severity: 'blocker',
    says: '{key}: got {got} when expected {min} to {max} bits, "float32" or "float64".',
  },
  'full-scale-count': {
    severity: 'blocker',
    says: '{key}: got a list of {got} when expected {expected}, one for each signal, or one number for all.',
  },
  'symbol-form': {
    severity: 'blocker',
    says: '{key}: got {got} when expected a C identifier: letters A to Z, digits and underscores, the first no digit.',
  },
  'symbol-too-long': {
    severity: 'blocker',
    says: '{key}: got {got} when expected at most {max} characters, as many as C promises to tell apart.',
  },
  'symbol-keyword': {
    severity: 'blocker',
    says: '{key}: got {got}, a keyword of C or C++. Choose another name.',
  },
  'symbol-reserved': {
    severity: 'blocker',
    says: '{key}: got {got}; names with an underscore at either end or two in a row become names that C and C++ keep for the compiler. Choose another name.',
  },
  'fixed-gain-odd': {
    severity: 'blocker',
    says: '{key}: a gain cannot be fixed for antisymmetric taps ("symmetry": "odd"), whose phase is a quarter turn and whose gain at 0 Hz is 0. Remove one of the two.',
  },
  'no-free-taps': {
    severity: 'blocker',
    says: '{key}: one antisymmetric tap is always 0. Take a length of 2 or more.',
  },
  'fixed-gain-input': {
    severity: 'blocker',
    says: '{key}: got input {got} when the takes have {inputs}. Give the number of one of them, from 1.',
  },
  'attribute-form': {
    severity: 'blocker',
    says: '{key}: got {got} when expected letters, digits, blanks and _ ( ) [ ] , . : = + < > # " - with quotes and brackets in pairs (for Rust: #[...]).',
  },
  'more-findings': { severity: 'note', says: '{count} more findings are not shown.' },
});
