/** Endings of files that are offered as recordings; the manifest has the same. */
export const recordingEndings = ['.wav', '.csv', '.tsv', '.npy'] as const;

export function isRecording(path: string): boolean {
  const lower = path.toLowerCase();
  return recordingEndings.some((ending) => lower.endsWith(ending));
}
