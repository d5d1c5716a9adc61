import type { PairingDocument, SignalWord } from '../document/pairingDocument';
import { defaultFullScale, type SignalExtent } from '../numbers/fullScale';
import { floatScaling, type IntegerFormat, integerScaling, isFloat, type Scaling } from '../numbers/scaling';
import type { Means } from '../pair/signals';
import type { Track } from '../pair/take';
import type { Pairing } from './pairing';

/** How amplitudes become counts: as the document says, or as the recordings suggest. */
export function targetScaling(pairing: Pairing, means: Means): Scaling {
  const { word, input, output } = pairing.document.arithmetic;
  if (isFloat(word)) return floatScaling(word, means);
  const inputWord = bitsOf(input);
  const outputWord = bitsOf(output);
  return integerScaling(
    inputFullScales(pairing, inputWord),
    outputFullScale(pairing, outputWord),
    inputWord,
    outputWord,
    means,
  );
}

/** The document's arithmetic for integer words. */
export function targetFormat(
  { word, accumulator, accumulatorOverflow, overflow, input, output }: PairingDocument['arithmetic'],
  fractionBits: number,
): IntegerFormat {
  return {
    word: bitsOf({ word }),
    fractionBits,
    inputWord: bitsOf(input),
    outputWord: bitsOf(output),
    accumulator,
    accumulatorOverflow,
    overflow,
  };
}

function bitsOf({ word }: Pick<SignalWord, 'word'>): number {
  if (isFloat(word)) throw new Error('the document reader lets no float signal pass beside integer taps');
  return word;
}

function inputFullScales({ document, takes, recordings }: Pairing, bits: number): number[] {
  const given = document.arithmetic.input.fullScale;
  return takes[0].inputs.map((_, r) => {
    if (given !== null) return given.length === 1 ? given[0] : given[r];
    return defaultFullScale(
      takes.map((take) => extent(recordings, take.inputs[r])),
      bits,
    );
  });
}

function outputFullScale({ document, takes, recordings }: Pairing, bits: number): number {
  const given = document.arithmetic.output.fullScale;
  return (
    given?.[0] ??
    defaultFullScale(
      takes.map((take) => extent(recordings, take.desired)),
      bits,
    )
  );
}

function extent(recordings: Pairing['recordings'], { recording, channel }: Track): SignalExtent {
  const opened = recordings.get(recording.file);
  if (opened === undefined) throw new Error(`recording ${recording.file} was resolved without being opened`);
  return { pcm: recording.pcm, levels: opened.levels[channel] };
}
