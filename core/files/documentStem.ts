/** NAME of `NAME.pairing.json`, after which the written files are named. */
export function documentStem(documentFile: string): string {
  return documentFile.replace(/(\.pairing)?\.json$/, '');
}
