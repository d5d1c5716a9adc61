/**
 * A number above 0 as people write it, also with a decimal comma; null for anything else, and for `8,000`, which may be
 * meant as a thousand or as a fraction.
 */
export function numberFrom(text: string): number | null {
  if (/^[1-9]\d{0,2},\d{3}$/.test(text.trim())) return null;
  const plain = text.trim().replace(',', '.');
  if (!/^\d*\.?\d+(e[+-]?\d+)?$|^\d+\.$/i.test(plain)) return null;
  const value = Number(plain);
  return value > 0 && Number.isFinite(value) ? value : null;
}
