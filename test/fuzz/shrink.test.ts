import { describe, expect, it } from 'vitest';
import { alike, shrink } from './shrink';

describe('a failing input', () => {
  it('loses what the failure does not need', async () => {
    const text = `${'a'.repeat(3000)}X${'b'.repeat(500)}Y${'c'.repeat(70)}`;
    const fails = async (bytes: Uint8Array) => /X.*Y/s.test(new TextDecoder('latin1').decode(bytes));
    const smaller = await shrink(new TextEncoder().encode(text), fails);
    expect(new TextDecoder().decode(smaller)).toBe('XY');
  });

  it('is known again whatever its numbers', () => {
    expect(alike('Error: 12 of 3.5e-7\n at x')).toBe(alike('Error: 4 of 1\n at y'));
    expect(alike('Error: 12 of 3')).not.toBe(alike('TypeError: 12 of 3'));
  });
});
