/**
 * Polar frames (a radius at a time, radii 0..1 evenly, angles evenly from 0) onto the square raster of a plan, by
 * bilinear look-up whose places and weights are worked out once. Not finite outside the disc.
 */
export class PolarRaster {
  private readonly index: Int32Array;
  private readonly weight: Float32Array;
  readonly raster: Float32Array;

  constructor(readonly size: number, readonly radii: number, readonly angles: number) {
    const count = size * size;
    this.index = new Int32Array(4 * count);
    this.weight = new Float32Array(4 * count);
    this.raster = new Float32Array(count);
    for (let y = 0; y < size; y++) {
      for (let x = 0; x < size; x++) {
        this.place(y * size + x, (2 * x + 1) / size - 1, 1 - (2 * y + 1) / size);
      }
    }
  }

  private place(pixel: number, u: number, v: number): void {
    const radius = Math.hypot(u, v);
    const slot = 4 * pixel;
    // A little beyond the rim is kept, so that smoothing has something to work on; the drawing clips it.
    if (radius > 1 + 3 / this.size) {
      this.index[slot] = -1;
      return;
    }
    const r = Math.min(1, radius) * (this.radii - 1);
    const r0 = Math.min(this.radii - 2, Math.floor(r));
    const turn = Math.atan2(v, u) / (2 * Math.PI);
    const t = (turn < 0 ? turn + 1 : turn) * this.angles;
    const t0 = Math.floor(t) % this.angles;
    const t1 = (t0 + 1) % this.angles;
    const fr = r - r0;
    const ft = t - Math.floor(t);
    this.index.set([r0 * this.angles + t0, r0 * this.angles + t1, (r0 + 1) * this.angles + t0, (r0 + 1) * this.angles + t1], slot);
    this.weight.set([(1 - fr) * (1 - ft), (1 - fr) * ft, fr * (1 - ft), fr * ft], slot);
  }

  /** Fills and returns the raster from the frame that begins at `offset` of `frames`. */
  fill(frames: Float32Array, offset: number): Float32Array {
    const { index, weight, raster } = this;
    for (let pixel = 0, slot = 0; pixel < raster.length; pixel++, slot += 4) {
      const first = index[slot] as number;
      raster[pixel] = first < 0 ? NaN
        : (weight[slot] as number) * (frames[offset + first] as number)
        + (weight[slot + 1] as number) * (frames[offset + (index[slot + 1] as number)] as number)
        + (weight[slot + 2] as number) * (frames[offset + (index[slot + 2] as number)] as number)
        + (weight[slot + 3] as number) * (frames[offset + (index[slot + 3] as number)] as number);
    }
    return raster;
  }
}

/** The section of one polar frame along the diameter at `angle`, from the far rim through the centre. */
export function polarSection(frames: Float32Array, offset: number, radii: number, angles: number, angle: number): Float32Array {
  const section = new Float32Array(2 * radii - 1);
  const turn = (a: number): number => {
    const t = (a / (2 * Math.PI)) % 1;
    return (t < 0 ? t + 1 : t) * angles;
  };
  const ray = (t: number, put: (j: number, value: number) => void): void => {
    const t0 = Math.floor(t) % angles;
    const t1 = (t0 + 1) % angles;
    const f = t - Math.floor(t);
    for (let j = 0; j < radii; j++) {
      const row = offset + j * angles;
      put(j, (1 - f) * (frames[row + t0] as number) + f * (frames[row + t1] as number));
    }
  };
  ray(turn(angle + Math.PI), (j, value) => { section[radii - 1 - j] = value; });
  ray(turn(angle), (j, value) => { section[radii - 1 + j] = value; });
  return section;
}
