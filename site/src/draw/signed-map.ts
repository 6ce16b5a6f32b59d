/** The signed colour map of every drawing: down (rust) through paper to up (teal). */
import type { DrawingColours, Rgb } from './palette.js';

const half = 127;

/** One packed little-endian RGBA value for each of 2 * half + 1 levels. */
export type SignedMap = Uint32Array;

/** Builds the map. Levels near zero stay paper, so that nodal lines are seen as gaps. */
export function signedMap(colours: DrawingColours): SignedMap {
  const map = new Uint32Array(2 * half + 1);
  for (let i = -half; i <= half; i++) {
    const share = Math.abs(i) / half;
    map[i + half] = pack(mix(colours.paper, i < 0 ? colours.down : colours.up, share ** 0.9));
  }
  return map;
}

/** Colours `values` (not finite: left transparent) into `pixels`, full colour at `largest`. */
export function paint(pixels: Uint32Array, values: Float32Array, factor: number, largest: number, map: SignedMap): void {
  const scale = largest > 0 ? (factor * half) / largest : 0;
  for (let i = 0; i < pixels.length; i++) {
    const level = (values[i] as number) * scale;
    // A comparison with NaN is false, so places outside the disc stay clear.
    if (level >= -half && level <= half) {
      pixels[i] = map[Math.round(level) + half] as number;
    } else {
      pixels[i] = level > half ? (map[2 * half] as number) : level < -half ? (map[0] as number) : 0;
    }
  }
}

function mix(a: Rgb, b: Rgb, share: number): Rgb {
  return [0, 1, 2].map((i) => Math.round((a[i] as number) + ((b[i] as number) - (a[i] as number)) * share)) as unknown as Rgb;
}

function pack([r, g, b]: Rgb): number {
  return (0xff000000 | (b << 16) | (g << 8) | r) >>> 0;
}
