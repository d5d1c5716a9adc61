import { samplesAndTime } from '../../figures/units';
import type { DesignResult } from '../../pipeline/designResult';
import { bullets, code, section } from '../markdown';

const ofJob = {
  cancel:
    'What an input picks up of the wanted signal is cancelled with the disturbance. A canceller whose output drives an actuator or a loudspeaker can be loud: limit its level, start low and keep people clear.',
  identify:
    'The model holds where the input had power and the path is linear and steady; elsewhere the recordings say nothing about it.',
  equalise:
    'A band that the path has removed is not restored; where the path is weak the filter raises noise with the signal.',
  predict:
    'The forecast is as good as its past is like the recorded one; after a change it can be worse than none.',
} as const;

/** What the reviewer and the user of the filter have to bear in mind. */
export function cautions(result: DesignResult): string {
  return section(
    'Cautions',
    bullets([
      ...cautionTexts(result),
      `These files are generated. Change the pairing document and run ${code('tapwright design')} again rather than edit them.`,
    ]),
  );
}

/** The cautions that hold for the filter wherever it is used. */
export function cautionTexts({ document, sampleRate }: DesignResult): string[] {
  const { delay } = document.filter;
  const late =
    delay > 0 && document.job !== 'identify'
      ? `, here ${samplesAndTime(delay, sampleRate)} by the design's own delay,`
      : '';
  return [
    'The filter holds for the conditions recorded: the same sensors, mounting, gains, sample rate and operating range. Where they change, record and design again.',
    ofJob[document.job],
    `In a control loop a filter adds delay${late} and can make the loop unstable: the loop has to be analysed with it.`,
    ...(document.job === 'cancel'
      ? []
      : ['An output that drives an actuator or a loudspeaker can be loud or large: limit it.']),
    'Nothing here qualifies the filter for a safety function, a medical device or a hearing device: the applicable standards, local codes and a licensed engineer decide.',
  ];
}
