import { bandPass, chain, delayed, lowPass, scaled, sum } from './filters';
import { type Complex, rotation } from './phasor';

/** Samples a second of the belt recordings. */
export const beltRate = 800;

const mode = (hertz: number, q: number) => bandPass(hertz, q, beltRate);

/** White sources that shake the frame: a lateral mode, a vertical mode, and rumble along each axis. */
export const shakers = 4;

/** What four white signals of unit variance make of the frame, in counts of 0.1 milli-g. */
export function shakenFrame([lateral, vertical, rumbleX, rumbleZ]: Float64Array[]) {
  const x = sum(
    chain(mode(29, 5), scaled(650))(lateral),
    chain(mode(76, 4), scaled(110))(vertical),
    chain(lowPass(180, 0.7, beltRate), scaled(25))(rumbleX),
  );
  const z = sum(
    chain(mode(29, 5), scaled(-200))(lateral),
    chain(mode(76, 4), scaled(400))(vertical),
    chain(lowPass(220, 0.7, beltRate), scaled(25))(rumbleZ),
  );
  return { x, z };
}

/**
 * From the frame's vertical acceleration to the cell: the platform's weight on the cell's spring, resonant at 88 Hz,
 * in counts of half a gram.
 */
export const pathOfZ = chain(lowPass(88, 3, beltRate), scaled(0.8));

/** From the lateral acceleration: through the platform's tilt, two samples later. */
export const pathOfX = chain(lowPass(55, 2.5, beltRate), scaled(0.4), delayed(2));

/** What the frame's vibration adds to the cell. */
export function shakenCell(x: Float64Array, z: Float64Array): Float64Array {
  return sum(pathOfX(x), pathOfZ(z));
}

/** Standard deviations of the sensors' own white noise, in counts. */
export const accelerometerNoise = 3;
export const cellNoise = 10;

/** A sinusoid that the drive puts on the frame: its turn per sample and complex amplitudes in counts. */
export interface DriveLine {
  turn: Complex;
  x: Complex;
  z: Complex;
}

/** Orders of the 60 mm rollers (whole) and of the motor behind a 9.5:1 gear. */
const orders: { order: number; x: [number, number]; z: [number, number] }[] = [
  { order: 1, x: [6, 2], z: [4, -3] },
  { order: 2, x: [8, -5], z: [12, 6] },
  { order: 3, x: [5, 5], z: [8, -4] },
  { order: 5, x: [-6, 3], z: [7, 5] },
  { order: 8, x: [4, 6], z: [-9, 2] },
  { order: 9.5, x: [35, 15], z: [20, -50] },
  { order: 19, x: [-8, 12], z: [24, 10] },
];

/** The drive's lines at a belt speed in m/s. */
export function driveLines(speed: number): DriveLine[] {
  const rollerHertz = speed / (Math.PI * 0.06);
  return orders.map(({ order, x, z }) => ({
    turn: rotation(order * rollerHertz, beltRate),
    x: { re: x[0], im: x[1] },
    z: { re: z[0], im: z[1] },
  }));
}
