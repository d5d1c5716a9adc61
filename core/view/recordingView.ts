import type { InspectedRecording } from '../pipeline/inspect';
import type { RecordingSpectrum } from '../pipeline/recordingSpectrum';
import type { RecordingView } from '../protocol/views';
import { findingView } from './findingView';
import { fileView } from './recordingsView';
import { decibelsOf, recordingChecks } from './suitabilityView';

/** @param spectrum null where there is none */
export function recordingView(
  { opened, findings }: InspectedRecording,
  spectrum: RecordingSpectrum | null,
): RecordingView {
  const file = opened && fileView(opened.recording, opened.levels);
  return {
    file,
    findings: findings.map((found) => findingView(found, null)),
    checks: recordingChecks,
    spectrum:
      file === null || spectrum === null
        ? null
        : {
            frequencies: spectrum.frequencies,
            lines: spectrum.densities.map((density, c) => ({
              label: file.channels[c].label,
              role: 'input' as const,
              valuesDb: decibelsOf(density),
            })),
          },
  };
}
