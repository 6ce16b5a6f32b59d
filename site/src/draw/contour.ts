/** Contour lines of a raster by marching squares. */

/** A line piece x0, y0, x1, y1 in raster units, four numbers after another. */
export type Segments = Float32Array;

/** Pieces of the line values = level. Cells that touch a value that is not finite are left out. */
export function contour(values: Float32Array, size: number, level: number): Segments {
  const out: number[] = [];
  const at = (x: number, y: number): number => (values[y * size + x] as number) - level;
  for (let y = 0; y + 1 < size; y++) {
    for (let x = 0; x + 1 < size; x++) {
      const a = at(x, y);
      const b = at(x + 1, y);
      const c = at(x + 1, y + 1);
      const d = at(x, y + 1);
      const sum = a + b + c + d;
      if (!Number.isFinite(sum)) {
        continue;
      }
      const sides = (a > 0 ? 1 : 0) | (b > 0 ? 2 : 0) | (c > 0 ? 4 : 0) | (d > 0 ? 8 : 0);
      if (sides === 0 || sides === 15) {
        continue;
      }
      const top = [x + a / (a - b), y] as const;
      const right = [x + 1, y + b / (b - c)] as const;
      const bottom = [x + d / (d - c), y + 1] as const;
      const left = [x, y + a / (a - d)] as const;
      const join = (p: readonly [number, number], q: readonly [number, number]): void => {
        out.push(p[0], p[1], q[0], q[1]);
      };
      switch (sides) {
        case 1: case 14: join(left, top); break;
        case 2: case 13: join(top, right); break;
        case 4: case 11: join(right, bottom); break;
        case 8: case 7: join(bottom, left); break;
        case 3: case 12: join(left, right); break;
        case 6: case 9: join(top, bottom); break;
        // Saddles: the mean at the middle of the cell says which corners join.
        case 5:
          if (sum > 0) { join(left, bottom); join(top, right); } else { join(left, top); join(right, bottom); }
          break;
        case 10:
          if (sum > 0) { join(left, top); join(right, bottom); } else { join(left, bottom); join(top, right); }
          break;
      }
    }
  }
  return new Float32Array(out);
}
