import { describe, expect, it } from 'vitest';
import { channelName, inputName } from '../../webview/sections/signalNames';
import { signalCurves } from '../../webview/sections/spectrumCurves';

describe('names of signals in a legend', () => {
  it('leave no channel number bare', () => {
    expect(channelName('2')).toBe('channel 2');
    expect(channelName('force [N]')).toBe('force [N]');
    expect(inputName('1', 0, 1)).toBe('input: channel 1');
    expect(inputName('frame_z', 1, 2)).toBe('input 2: frame_z');
  });

  it('tell two files of one channel each apart by what they are for', () => {
    const none = new Float64Array(0);
    const line = (role: 'input' | 'desired') => ({ label: '1', role, valuesDb: none });
    const curves = signalCurves({ frequencies: none, lines: [line('input'), line('desired')] });
    expect(curves.map(({ label }) => label)).toEqual(['input: channel 1', 'desired: channel 1']);
  });
});
