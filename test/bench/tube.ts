import { lowPass } from './filters';

/** Lengths in samples of travel (43 mm each at 343 m/s and 8 kHz): port to tee, tee to transducer, blind drain leg. */
const portToTee = 3;
const teeToTransducer = 2;
const drainLeg = 4;
/** What the transducer's small cavity and the drain's plug send back of a wave. */
const cavityReflection = 0.95;
const plugReflection = 0.6;

/**
 * Pressure at a transducer behind tubing whose open end takes the pressure given, as travelling waves in three equal
 * pipes that meet in a tee (J. O. Smith, Physical Modeling Using Digital Waveguides, Computer Music Journal 16(4),
 * 1992). The pipes resonate like organ pipes (245, 675 and 1165 Hz), the drain leg takes out what is near odd multiples
 * of its own quarter wave (500 Hz), and the cavity is a low-pass at 1.8 kHz behind it all.
 */
export function tube(pressure: Float64Array): Float64Array {
  const [inward, outward] = [pipe(portToTee), pipe(portToTee)];
  const [towards, back] = [pipe(teeToTransducer), pipe(teeToTransducer)];
  const [down, up] = [pipe(drainLeg), pipe(drainLeg)];
  const end = new Float64Array(pressure.length);
  for (let n = 0; n < pressure.length; n++) {
    const atPort = outward.arriving();
    const fromPort = inward.arriving();
    const atTransducer = towards.arriving();
    const fromTransducer = back.arriving();
    const atPlug = down.arriving();
    const fromPlug = up.arriving();
    const atTee = (2 / 3) * (fromPort + fromTransducer + fromPlug);
    end[n] = (1 + cavityReflection) * atTransducer;
    inward.send(pressure[n] - atPort);
    outward.send(atTee - fromPort);
    towards.send(atTee - fromTransducer);
    back.send(cavityReflection * atTransducer);
    down.send(atTee - fromPlug);
    up.send(plugReflection * atPlug);
  }
  return lowPass(1800, 0.7, 8000)(end);
}

/** A wave's way along a pipe, one direction: friction takes two per cent a sample, and high frequencies first. */
function pipe(travel: number) {
  const waves = new Float64Array(travel);
  let gain = 1;
  for (let k = 0; k < travel; k++) gain *= 0.98;
  const smear = 0.02 * travel;
  let slot = 0;
  let wave = 0;
  return {
    arriving(): number {
      wave = smear * wave + (1 - smear) * gain * waves[slot];
      return wave;
    },
    send(value: number): void {
      waves[slot] = value;
      slot = (slot + 1) % travel;
    },
  };
}
