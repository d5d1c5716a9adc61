import { expect } from 'vitest';

/** Agreement with a printed value: within one unit of its last printed digit, since prints are rounded, some twice. */
export function expectPrinted(got: number, printed: number, digits: number): void {
  expect(Math.abs(got - printed), `${got} against the printed ${printed}`).toBeLessThanOrEqual(
    1.001 * 10 ** -digits,
  );
}
