let dictionary: Record<string, string> = {};

/** Sets the translations, by English template; empty for English. */
export function setWords(words: Record<string, string>): void {
  dictionary = words;
}

/** A sentence in the user's language: `t('{0} of {1} files', 2, 3)`. */
export function t(template: string, ...values: (string | number)[]): string {
  const text = dictionary[template] ?? template;
  return text.replace(/\{(\d+)\}/g, (whole, place: string) => String(values[Number(place)] ?? whole));
}
