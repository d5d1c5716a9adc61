import { describe, expect, it } from 'vitest';
import { blend, channels, fade } from '../../../webview/plots/colours';

describe('colours', () => {
  it('are read as a theme writes them', () => {
    expect(channels('#fff')).toEqual([255, 255, 255, 1]);
    expect(channels(' #11223380 ')).toEqual([17, 34, 51, 128 / 255]);
    expect(channels('rgba(1, 2, 3, 0.5)')).toEqual([1, 2, 3, 0.5]);
    expect(channels('rgb(1 2 3 / 50%)')).toEqual([1, 2, 3, 0.5]);
    expect(channels('CanvasText')).toBeNull();
    expect(channels('#12345')).toBeNull();
  });

  it('fade and blend', () => {
    expect(fade('#102030', 0.25)).toBe('rgba(16, 32, 48, 0.25)');
    expect(fade('rgba(16, 32, 48, 0.5)', 0.5)).toBe('rgba(16, 32, 48, 0.25)');
    expect(fade('CanvasText', 0.5)).toBe('CanvasText');
    expect(blend('#000000', '#ffffff', 0.5)).toBe('rgb(128, 128, 128)');
    expect(blend('#000000', 'CanvasText', 0.9)).toBe('CanvasText');
  });
});
