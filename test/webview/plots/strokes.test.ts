import { describe, expect, it } from 'vitest';
import type { Role } from '../../../webview/plots/data';
import { barStrokes, strokeOf, strokesOf } from '../../../webview/plots/strokes';

const roles: Role[] = ['input', 'desired', 'output', 'error', 'figure', 'figure2', 'bound'];
const inkOf = ({ width, dash, fill }: ReturnType<typeof strokeOf>) => `${width} ${dash.join(',')} ${fill}`;

describe('strokes', () => {
  it('tell roles and kinds of intervals apart without colour', () => {
    expect(new Set(roles.map((role) => inkOf(strokeOf(role)))).size).toBe(roles.length);
    expect(new Set(Object.values(barStrokes).map(({ dash }) => dash.join(','))).size).toBe(3);
  });

  it('tell several curves of one role apart, and start over after the last', () => {
    const inputs = strokesOf(Array.from({ length: 5 }, () => ({ role: 'input' as const })));
    expect(new Set(inputs.slice(0, 4).map(inkOf)).size).toBe(4);
    expect(inputs[4]).toBe(inputs[0]);
  });
});
