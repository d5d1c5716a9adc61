// ITU-T G.711: eight bits of a sign, a segment of three bits and a step of four; values on the 16-bit scale.

/** Values of the 256 A-law codes: 13 bits, left-aligned in 16. */
export function aLawValues(): Float64Array {
  return Float64Array.from({ length: 256 }, (_, code) => {
    // Even bits are sent inverted.
    const bits = code ^ 0x55;
    const segment = (bits >> 4) & 7;
    const step = bits & 15;
    const magnitude = segment === 0 ? 16 * step + 8 : (16 * step + 264) << (segment - 1);
    return (bits & 0x80) === 0 ? -magnitude : magnitude;
  });
}

/** Values of the 256 µ-law codes: 14 bits, left-aligned in 16. */
export function muLawValues(): Float64Array {
  return Float64Array.from({ length: 256 }, (_, code) => {
    // All bits are sent inverted.
    const bits = ~code & 0xff;
    const segment = (bits >> 4) & 7;
    const magnitude = ((8 * (bits & 15) + 132) << segment) - 132;
    return (bits & 0x80) === 0 ? magnitude : 0 - magnitude;
  });
}
