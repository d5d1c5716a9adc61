import type { FindingView } from '../core/protocol/views';

/** A blocker that only the host can find, in words that are translated already. */
export function hostFinding(code: string, text: string, file: string | null = null): FindingView {
  return {
    code,
    severity: 'blocker',
    text,
    place: file ?? '',
    file,
    take: null,
    channel: null,
    span: null,
    path: null,
    position: null,
  };
}
