/** What is on the sheet, and how the ring departs from round, on a plan. Lengths in units of the ring's radius. */
import type { ShapeResult } from '../contract.js';
import type { DrawingColours } from './palette.js';

export type Outlines = Pick<ShapeResult, 'bent' | 'oval' | 'ovalAngle' | 'hub' | 'patches' | 'strips'>;

/** An oval below this would not be seen, so it is drawn so large. */
const leastOval = 0.03;

/** How many times as oval as it is the ring is drawn. */
export function ovalFactor(oval: number): number {
  return oval > 0 ? Math.max(1, leastOval / oval) : 1;
}

/** Stretches what is drawn next as the ring is stretched, and keeps it within the canvas. */
export function stretch(context: CanvasRenderingContext2D, outlines: Outlines, width: number): void {
  const half = (outlines.oval ?? 0) * ovalFactor(outlines.oval ?? 0);
  if (half === 0) {
    return;
  }
  const angle = -(outlines.ovalAngle ?? 0);
  context.translate(width / 2, width / 2);
  context.rotate(angle);
  context.scale(1, (1 - half) / (1 + half));
  context.rotate(-angle);
  context.translate(-width / 2, -width / 2);
}

/** Patches as circles (rigid ones with a cross), strips as bands, the hub as a disc; `a` is the ring's radius, CSS pixels. */
export function drawOutlines(context: CanvasRenderingContext2D, outlines: Outlines, colours: DrawingColours, width: number, a: number): void {
  context.save();
  context.translate(width / 2, width / 2);
  context.strokeStyle = colours.ink;
  context.lineWidth = 1.4;
  for (const s of outlines.strips ?? []) {
    context.save();
    context.beginPath();
    context.arc(0, 0, a, 0, 2 * Math.PI);
    context.clip();
    context.rotate(-s.angle);
    context.fillStyle = colours.ink;
    context.globalAlpha = 0.18;
    const left = (s.offset - s.width / 2) * a;
    context.fillRect(left, -a, s.width * a, 2 * a);
    context.globalAlpha = 1;
    context.strokeRect(left, -a - 4, s.width * a, 2 * a + 8);
    context.restore();
  }
  for (const p of outlines.patches ?? []) {
    const x = p.radius * a * Math.cos(p.angle);
    const y = -p.radius * a * Math.sin(p.angle);
    const r = Math.max(3, p.size * a);
    context.beginPath();
    context.arc(x, y, r, 0, 2 * Math.PI);
    if (p.rigid) {
      context.moveTo(x - r, y);
      context.lineTo(x + r, y);
      context.moveTo(x, y - r);
      context.lineTo(x, y + r);
    }
    context.stroke();
  }
  if (outlines.hub) {
    context.beginPath();
    context.arc(0, 0, outlines.hub * a, 0, 2 * Math.PI);
    context.fillStyle = colours.rule;
    context.fill();
    context.lineWidth = 2.4;
    context.stroke();
  }
  context.restore();
}
