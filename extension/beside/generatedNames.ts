/** Languages of the files in which generated names are looked up, as the workbench calls them. */
export const languages = ['c', 'cpp', 'cuda-cpp', 'objective-c', 'objective-cpp', 'rust'] as const;

const cArray = /^(?:(?!\/\*|\s*\*|#).)*\b([A-Za-z]\w*)_taps\[/;
const rustArray = /^pub static TAPS\b/;

/** Line, from 0, on which a generated file begins its array of taps; null where it has none. */
export function arrayLine(text: string): number | null {
  const lines = text.split(/\r\n|\n|\r/);
  const line = lines.findIndex((one) => (cArray.test(one) && one.includes('{')) || rustArray.test(one));
  return line < 0 ? null : line;
}

/** Whether a file is one that holds an array of taps, by its name. */
export function holdsArray(path: string): boolean {
  return /_taps\.(h|rs)$/.test(path);
}

const parts = ['taps', 'input', 'expected', 'filter', 'vectors'];

/**
 * Symbols that a word could be a generated name of, the likeliest first: `belt_taps` and `BELT_LENGTH` of `belt`. In Rust
 * the names themselves carry no symbol: there it is the module that stands before the word, or those that the text names.
 * @param word under the pointer
 * @param before text of the line before the word
 * @param known all symbols of the workspace
 * @param text of the whole file, its own name before it
 */
export function symbolsOf(
  word: string,
  before: string,
  known: Iterable<string>,
  text: () => string,
  language: string,
): string[] {
  const symbols = [...known];
  const own = symbols.filter(
    (symbol) => parts.some((part) => word === `${symbol}_${part}`) || isMacro(word, symbol),
  );
  if (own.length > 0) return own;
  if (language !== 'rust' || !['TAPS', 'INPUT', 'EXPECTED'].includes(word)) return [];
  const path = /(\w+)_(?:taps|vectors)\s*::\s*$/.exec(before)?.[1];
  if (path !== undefined) return symbols.filter((symbol) => symbol === path);
  const whole = text();
  return symbols.filter((symbol) => new RegExp(`\\b${symbol}_(?:taps|vectors)\\b`).test(whole));
}

const macros =
  /^(SAMPLE_RATE|LENGTH|INPUTS|NEWEST_FIRST|SYMMETRY|DELAY|TAP_BITS|INPUT_BITS|OUTPUT_BITS|FRACTION_BITS|ACCUMULATOR_BITS|WORST_CASE_BITS|ACCUMULATOR_SATURATES|OUTPUT_SATURATES|INPUT_MEANS|DESIRED_MEAN|INPUT_COUNTS_PER_UNIT|OUTPUT_COUNTS_PER_UNIT|VECTOR_\w+)$/;

function isMacro(word: string, symbol: string): boolean {
  const prefix = `${symbol.toUpperCase()}_`;
  return word.startsWith(prefix) && macros.test(word.slice(prefix.length));
}
