import { describe, expect, it } from 'vitest';
import { axisTitle, placeInTime, shown, withUnit } from '../../../webview/plots/shown';

describe('shown values', () => {
  it('have the digits their unit deserves and a true minus sign', () => {
    expect(shown(-23.4567, 'dB')).toBe('−23.5');
    expect(shown(-0.04, 'dB')).toBe('0.0');
    expect(shown(0.123456, '')).toBe('0.1235');
    expect(shown(1e-8, '')).toBe('1e−8');
    expect(shown(Number.NaN, 'dB')).toBe('–');
    expect(shown(Number.NEGATIVE_INFINITY, 'dB')).toBe('−∞');
  });

  it('carry their unit and error', () => {
    expect(withUnit(-4, 'dB', ' ± 0.6')).toBe('−4.0 ± 0.6 dB');
    expect(withUnit(12, '°')).toBe('12.0°');
    expect(withUnit(64, '')).toBe('64');
    expect(withUnit(Number.NaN, 'dB')).toBe('–');
    expect(axisTitle({ label: 'Length', unit: 'taps' })).toBe('Length (taps)');
    expect(axisTitle({ label: 'Tap', unit: '' })).toBe('Tap');
  });

  it('name places in time as finely as they can be told apart', () => {
    expect(placeInTime(3000, 2000, 100)).toBe('1.50');
    expect(placeInTime(3001, 2000, 1)).toBe('1.5005');
    expect(placeInTime(12_345.4, null, 1)).toBe('12,345');
    expect(placeInTime(4_000_000, 2000, 10_000)).toBe('2,000');
  });
});
