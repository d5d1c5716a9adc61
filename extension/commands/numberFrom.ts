/** A number above 0 as people write it, also with a decimal comma; null for anything else. */
export function numberFrom(text: string): number | null {
  const plain = text.trim().replace(',', '.');
  if (!/^\d*\.?\d+(e[+-]?\d+)?$|^\d+\.$/i.test(plain)) return null;
  const value = Number(plain);
  return value > 0 && Number.isFinite(value) ? value : null;
}
