/**
 * The plan view of the round sheet on a canvas: signed colour map, contours (solid where up, dotted where down),
 * nodal lines as heavier dashes (bent ones solid, because their pieces are too short to dash), + and - at the lobes, the ring with its clamps.
 *
 * All input is a square raster around the unit disc (row 0 at the top, values at the centres of the pixels) or angles and radii in units of the ring's.
 */
import { contour } from './contour.js';
import { drawOutlines, stretch, type Outlines } from './outlines.js';
import type { DrawingColours } from './palette.js';
import { paint, signedMap, type SignedMap } from './signed-map.js';

export interface PlanMark {
  readonly radius: number;
  readonly angle: number;
  readonly text: string;
}

export interface Plan {
  /** size * size values; not finite outside the disc. */
  readonly raster: Float32Array;
  readonly size: number;
  /** Value of full colour. */
  readonly largest: number;
  /** Multiplies the raster: the phase of an animation. */
  readonly factor: number;
  /** Nodal circles (r/a) and diameters (rad). */
  readonly circles: readonly number[];
  readonly diameters: readonly number[];
  /** Signs at the lobes, numbered points and so on. */
  readonly marks: readonly PlanMark[];
  readonly clamps: number;
  /** A section line through the centre, rad; null for none. */
  readonly section: number | null;
  /** Number of contour lines to each side; 0 for none. */
  readonly contours: number;
  /** What is on the sheet; a bent mode has its nodal lines where the raster changes sign. */
  readonly outlines?: Outlines;
}

/** Share of the canvas that the ring takes; the rest is for the clamps. */
const ringShare = 0.46;

/** Where a place on the sheet is on a canvas of the given width, CSS pixels. */
export function planPoint(width: number, radius: number, angle: number): { x: number; y: number } {
  const a = width * ringShare;
  return { x: width / 2 + a * radius * Math.cos(angle), y: width / 2 - a * radius * Math.sin(angle) };
}

/** The place on the sheet under a point of the canvas; radius is above 1 outside the ring. */
export function planPlace(width: number, x: number, y: number): { radius: number; angle: number } {
  const a = width * ringShare;
  const u = (x - width / 2) / a;
  const v = (width / 2 - y) / a;
  return { radius: Math.hypot(u, v), angle: Math.atan2(v, u) };
}

/** Draws plans on one canvas and keeps what does not change between frames. */
export class PlanDrawing {
  private readonly fill = document.createElement('canvas');
  private image: ImageData | null = null;
  private map: { colours: DrawingColours; levels: SignedMap } | null = null;
  private bent: { raster: Float32Array; path: Path2D } | null = null;
  private lines: { raster: Float32Array; largest: number; contours: number; path: Map<number, Path2D> } | null = null;

  constructor(private readonly canvas: HTMLCanvasElement) {}

  /** `filled` is false on paper, where contours and line styles carry the form. */
  draw(plan: Plan, colours: DrawingColours, width: number, filled: boolean): void {
    const context = this.begin(width);
    if (!context) {
      return;
    }
    const a = width * ringShare;
    const { outlines } = plan;
    context.save();
    if (outlines) {
      stretch(context, outlines, width);
    }
    if (filled) {
      this.drawFill(context, plan, colours, width, a);
    }
    if (plan.contours > 0) {
      this.drawContours(context, plan, colours, width, a);
    }
    if (outlines?.bent) {
      this.drawBent(context, plan, colours, width, a);
    }
    drawNodalLines(context, plan, colours, width, a);
    if (outlines) {
      drawOutlines(context, outlines, colours, width, a);
    }
    drawRing(context, plan, colours, width, a);
    drawMarks(context, plan, colours, width, filled);
    context.restore();
  }

  /** Nodal lines that are neither circles nor diameters. */
  private drawBent(context: CanvasRenderingContext2D, plan: Plan, colours: DrawingColours, width: number, a: number): void {
    if (this.bent?.raster !== plan.raster) {
      this.bent = { raster: plan.raster, path: pathOf(contour(plan.raster, plan.size, 0)) };
    }
    this.onRaster(context, plan, width, a, (unit) => {
      context.strokeStyle = colours.ink;
      context.lineWidth = 2.6 / unit;
      if (this.bent) {
        context.stroke(this.bent.path);
      }
    });
  }

  /** Draws in the units of the raster: contours run between the centres of its pixels. */
  private onRaster(context: CanvasRenderingContext2D, plan: Plan, width: number, a: number, draw: (unit: number) => void): void {
    const unit = (2 * a) / plan.size;
    context.save();
    context.translate(width / 2 - a + unit / 2, width / 2 - a + unit / 2);
    context.scale(unit, unit);
    draw(unit);
    context.restore();
  }

  private begin(width: number): CanvasRenderingContext2D | null {
    const dense = Math.min(3, window.devicePixelRatio || 1);
    const pixels = Math.max(1, Math.round(width * dense));
    if (this.canvas.width !== pixels || this.canvas.height !== pixels) {
      this.canvas.width = pixels;
      this.canvas.height = pixels;
    }
    const context = this.canvas.getContext('2d');
    context?.setTransform(pixels / width, 0, 0, pixels / width, 0, 0);
    context?.clearRect(0, 0, width, width);
    return context;
  }

  private drawFill(context: CanvasRenderingContext2D, plan: Plan, colours: DrawingColours, width: number, a: number): void {
    if (this.map?.colours.ink !== colours.ink || this.map.colours.up.join() !== colours.up.join()) {
      this.map = { colours, levels: signedMap(colours) };
    }
    if (!this.image || this.image.width !== plan.size) {
      this.image = new ImageData(plan.size, plan.size);
      this.fill.width = plan.size;
      this.fill.height = plan.size;
    }
    paint(new Uint32Array(this.image.data.buffer), plan.raster, plan.factor, plan.largest, this.map.levels);
    this.fill.getContext('2d')?.putImageData(this.image, 0, 0);
    context.save();
    context.beginPath();
    context.arc(width / 2, width / 2, a, 0, 2 * Math.PI);
    context.clip();
    context.imageSmoothingEnabled = true;
    context.drawImage(this.fill, width / 2 - a, width / 2 - a, 2 * a, 2 * a);
    context.restore();
  }

  private drawContours(context: CanvasRenderingContext2D, plan: Plan, colours: DrawingColours, width: number, a: number): void {
    if (this.lines?.raster !== plan.raster || this.lines.largest !== plan.largest || this.lines.contours !== plan.contours) {
      const path = new Map<number, Path2D>();
      for (let i = 1; i <= plan.contours; i++) {
        for (const sign of [1, -1]) {
          path.set(sign * i, pathOf(contour(plan.raster, plan.size, (sign * i * plan.largest) / (plan.contours + 1))));
        }
      }
      this.lines = { raster: plan.raster, largest: plan.largest, contours: plan.contours, path };
    }
    const { path } = this.lines;
    this.onRaster(context, plan, width, a, (unit) => {
      context.strokeStyle = colours.ink;
      context.globalAlpha = 0.55;
      context.lineWidth = 0.9 / unit;
      for (const [index, line] of path) {
        const up = index * plan.factor > 0;
        context.setLineDash(up ? [] : [1.2 / unit, 3 / unit]);
        context.stroke(line);
      }
    });
  }
}

function pathOf(segments: Float32Array): Path2D {
  const path = new Path2D();
  for (let i = 0; i + 3 < segments.length; i += 4) {
    path.moveTo(segments[i] as number, segments[i + 1] as number);
    path.lineTo(segments[i + 2] as number, segments[i + 3] as number);
  }
  return path;
}

function drawNodalLines(context: CanvasRenderingContext2D, plan: Plan, colours: DrawingColours, width: number, a: number): void {
  context.save();
  context.strokeStyle = colours.ink;
  context.lineWidth = 1.6;
  context.setLineDash([6, 4]);
  for (const radius of plan.circles) {
    context.beginPath();
    context.arc(width / 2, width / 2, a * radius, 0, 2 * Math.PI);
    context.stroke();
  }
  for (const angle of plan.diameters) {
    line(context, width, 1, angle, 1, angle + Math.PI);
  }
  if (plan.section !== null) {
    context.setLineDash([10, 3, 2, 3]);
    context.lineWidth = 1;
    line(context, width, 1.06, plan.section, 1.06, plan.section + Math.PI);
  }
  context.restore();
}

function line(context: CanvasRenderingContext2D, width: number, r0: number, t0: number, r1: number, t1: number): void {
  const from = planPoint(width, r0, t0);
  const to = planPoint(width, r1, t1);
  context.beginPath();
  context.moveTo(from.x, from.y);
  context.lineTo(to.x, to.y);
  context.stroke();
}

function drawRing(context: CanvasRenderingContext2D, plan: Plan, colours: DrawingColours, width: number, a: number): void {
  context.strokeStyle = colours.ink;
  context.fillStyle = colours.ink;
  context.lineWidth = 2.4;
  context.beginPath();
  context.arc(width / 2, width / 2, a, 0, 2 * Math.PI);
  context.stroke();
  for (let i = 0; i < Math.min(plan.clamps, 120); i++) {
    const { x, y } = planPoint(width, 1.045, Math.PI / 2 - (2 * Math.PI * i) / plan.clamps);
    context.beginPath();
    context.arc(x, y, 2.4, 0, 2 * Math.PI);
    context.fill();
  }
}

function drawMarks(context: CanvasRenderingContext2D, plan: Plan, colours: DrawingColours, width: number, filled: boolean): void {
  context.font = `600 ${Math.max(14, width / 22)}px system-ui, sans-serif`;
  context.textAlign = 'center';
  context.textBaseline = 'middle';
  context.lineJoin = 'round';
  for (const mark of plan.marks) {
    const { x, y } = planPoint(width, mark.radius, mark.angle);
    context.lineWidth = 3.5;
    context.strokeStyle = filled ? colours.ink : '#fff';
    context.globalAlpha = filled ? 0.35 : 1;
    context.strokeText(mark.text, x, y);
    context.globalAlpha = 1;
    context.fillStyle = filled ? colours.onMap : colours.ink;
    context.fillText(mark.text, x, y);
  }
}
