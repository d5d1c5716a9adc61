import { expect, it } from 'vitest';
import { say } from '../../../../core/findings/say';
import { inspectChange } from '../../../../core/suitability/change/inspectChange';
import { pace } from '../../../support/takes';
import { benchDocuments, benchPair } from '../benchPairs';

it.each(benchDocuments)(
  'finds nothing in %s: its set-up is steady and its reference free of the wanted signal',
  async (name) => {
    const { document, takes, means } = await benchPair(name);
    const { findings, crosstalk } = await inspectChange(takes, document, means, pace);
    expect(findings.map(say)).toEqual([]);
    // For the belt it could be told, from the packages of three takes.
    expect(crosstalk === null).toBe(document.job !== 'cancel');
    expect(crosstalk?.proved ?? false).toBe(false);
  },
);

it('finds the packages in the belt’s reference where it is put on the platform', async () => {
  const { document, takes, means } = await benchPair('belt.pairing.json');
  const onPlatform = takes.map((take) => {
    const [x, ...others] = take.inputs;
    const { recording } = x;
    const read: typeof recording.read = async (channels, from, to) => {
      const planes = await recording.read([...channels, take.desired.channel], from, to);
      const cell = planes.pop()!;
      return planes.map((plane, i) =>
        channels[i] === x.channel ? plane.map((v, n) => v + 0.1 * cell[n]) : plane,
      );
    };
    return { ...take, inputs: [{ ...x, recording: { ...recording, read } }, ...others] };
  });
  const { findings } = await inspectChange(onPlatform, document, means, pace);
  expect(findings.map(({ code }) => code)).toContain('crosstalk');
});
