import type { FindingView } from '../../core/protocol/views';
import { nearestPlace, type Path, pathKey } from '../paths';

/** Findings by the key of the field that shows them; those that no field shows are left out. */
export function findingsAtFields(
  fields: readonly Path[],
  findings: readonly FindingView[],
): Map<string, FindingView[]> {
  const byField = new Map<string, FindingView[]>();
  for (const found of findings) {
    if (found.path === null) continue;
    const field = nearestPlace(fields, found.path);
    if (field === null) continue;
    const key = pathKey(field);
    byField.set(key, [...(byField.get(key) ?? []), found]);
  }
  return byField;
}
