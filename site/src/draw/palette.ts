/** Colours of a drawing, read from the page's theme each time it draws. */
import { colour } from '../elements/style.js';

export type Rgb = readonly [number, number, number];

export interface DrawingColours {
  readonly paper: Rgb;
  readonly up: Rgb;
  readonly down: Rgb;
  readonly ink: string;
  readonly soft: string;
  readonly rule: string;
  /** Signs on the map. */
  readonly onMap: string;
}

/** On paper everything is black on white and no area is filled. */
export const printColours: DrawingColours = {
  paper: [255, 255, 255],
  up: [0, 0, 0],
  down: [0, 0, 0],
  ink: '#000',
  soft: '#333',
  rule: '#999',
  onMap: '#000',
};

/** The colours in force at an element. */
export function coloursAt(at: Element): DrawingColours {
  return {
    paper: rgb(colour(at, 'panel')),
    up: rgb(colour(at, 'up')),
    down: rgb(colour(at, 'down')),
    ink: colour(at, 'ink'),
    soft: colour(at, 'soft'),
    rule: colour(at, 'rule'),
    onMap: colour(at, 'on-map'),
  };
}

/** Reads #rgb and #rrggbb; anything else is grey. */
export function rgb(text: string): Rgb {
  const hex = /^#([0-9a-f]{3}|[0-9a-f]{6})$/i.exec(text)?.[1];
  if (hex === undefined) {
    return [128, 128, 128];
  }
  const step = hex.length / 3;
  const part = (i: number): number => {
    const digits = hex.slice(i * step, (i + 1) * step);
    return parseInt(step === 1 ? digits + digits : digits, 16);
  };
  return [part(0), part(1), part(2)];
}
