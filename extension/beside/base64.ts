const digits = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/';

/** UTF-8 of a text in base64 (RFC 4648), in any host. */
export function base64Of(text: string): string {
  const bytes = new TextEncoder().encode(text);
  let out = '';
  for (let i = 0; i < bytes.length; i += 3) {
    const word = (bytes[i] << 16) | ((bytes[i + 1] ?? 0) << 8) | (bytes[i + 2] ?? 0);
    const left = bytes.length - i;
    out += digits[word >> 18] + digits[(word >> 12) & 63];
    out += left > 1 ? digits[(word >> 6) & 63] : '=';
    out += left > 2 ? digits[word & 63] : '=';
  }
  return out;
}
