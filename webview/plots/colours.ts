/** A colour (`#rgb`, `#rrggbb`, with or without opacity, `rgb()`, `rgba()`) at `share` of its opacity; others as they are. */
export function fade(colour: string, share: number): string {
  const parts = channels(colour);
  if (parts === null) return colour;
  const [red, green, blue, opacity] = parts;
  return `rgba(${red}, ${green}, ${blue}, ${Number((opacity * share).toFixed(3))})`;
}

/** The colour between two, `share` 0 to 1 from the first to the second. */
export function blend(from: string, to: string, share: number): string {
  const a = channels(from);
  const b = channels(to);
  if (a === null || b === null) return share < 0.5 ? from : to;
  const [red, green, blue] = a.map((value, i) => Math.round(value + (b[i] - value) * share));
  return `rgb(${red}, ${green}, ${blue})`;
}

/** Red, green, blue (0 to 255) and opacity (0 to 1); null for colours written otherwise. */
export function channels(colour: string): [number, number, number, number] | null {
  const hex = /^#([0-9a-f]{3,8})$/i.exec(colour.trim())?.[1];
  if (hex !== undefined && hex.length !== 5 && hex.length !== 7) {
    const digits = hex.length < 6 ? [...hex].map((digit) => digit + digit) : hex.match(/../g)!;
    const [red, green, blue, opacity = 255] = digits.map((pair) => Number.parseInt(pair, 16));
    return [red, green, blue, opacity / 255];
  }
  const listed = /^rgba?\(([^)]*)\)$/i.exec(colour.trim())?.[1];
  const numbers = listed?.split(/[\s,/]+/).filter((part) => part !== '');
  if (numbers === undefined || numbers.length < 3) return null;
  const [red, green, blue, opacity = 1] = numbers.map((part) =>
    part.endsWith('%') ? Number(part.slice(0, -1)) / 100 : Number(part),
  );
  return [red, green, blue, opacity].some(Number.isNaN) ? null : [red, green, blue, opacity];
}
