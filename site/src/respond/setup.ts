/** What the page Respond remembers of its controls: texts as typed, so that nothing is lost or converted. */
import type { Dimension, ReadItem, ShapeKind } from '../contract.js';
import type { SourceSetup } from './sources.js';

export interface ShapeSetup {
  kind: ShapeKind;
  peak: string;
  radius: string;
  angle: string;
  width: string;
  formula: string;
}

export interface PointSetup {
  radius: string;
  angle: string;
}

export interface Setup {
  displacement: ShapeSetup;
  velocity: ShapeSetup;
  /** The velocity is a blow: momentum per area. */
  impulse: boolean;
  duration: string;
  orders: number;
  points: PointSetup[];
  /** What sets the sheet moving besides. */
  more?: SourceSetup[];
  /** A surface beside the sheet; without a gap there is none. */
  neighbour?: NeighbourSetup;
}

export interface NeighbourSetup {
  below: boolean;
  gap: string;
  tilt: string;
  direction: string;
}

export const firstNeighbour: NeighbourSetup = { below: false, gap: '', tilt: '0°', direction: '0°' };

/** What a history shows. */
export const historyKinds = [
  { name: 'displacement', unit: 'mm', scale: 1000 },
  { name: 'velocity', unit: 'm/s', scale: 1 },
  { name: 'acceleration', unit: 'm/s²', scale: 1 },
] as const;

export type Part = 'displacement' | 'velocity';

export const parts: readonly Part[] = ['displacement', 'velocity'];

export const mostPoints = 8;

/** 0 lets the engine choose. */
export const modeChoices = [0, 8, 12, 16, 20];

export function firstSetup(): Setup {
  return {
    displacement: { kind: 'point', peak: '5 mm', radius: '0.4', angle: '30°', width: '0.1', formula: '(1 - r^2) * x' },
    velocity: { kind: 'rest', peak: '0.5', radius: '0', angle: '0°', width: '0.2', formula: '1 - r^2' },
    impulse: true,
    duration: '',
    orders: 16,
    points: [{ radius: '0', angle: '0°' }, { radius: '0.5', angle: '120°' }],
  };
}

/** Which controls a shape has. */
export function controlsOf(kind: ShapeKind): { peak: boolean; place: boolean; formula: boolean } {
  return {
    peak: kind !== 'rest',
    place: kind === 'point' || kind === 'bump' || kind === 'patch',
    formula: kind === 'formula',
  };
}

export const kindNames: Readonly<Record<Part, Readonly<Partial<Record<ShapeKind, string>>>>> = {
  displacement: {
    rest: 'flat',
    bulge: 'bulged by pressure, then released',
    point: 'pulled at a point, then let go',
    bump: 'a smooth bump',
    formula: 'a formula',
  },
  velocity: {
    rest: 'at rest',
    patch: 'struck over a round patch',
    bump: 'struck over a smooth bump',
    bulge: 'moving as 1 − r²',
    formula: 'a formula',
  },
};

/** Every typed text, with what it is to be read as. */
export function readItems(setup: Setup): ReadItem[] {
  const items: ReadItem[] = [];
  const item = (field: string, name: string, text: string, dimension: Dimension, unit: string, low = 0, high = 0): void => {
    items.push({ field, name, text, dimension, unit, low, high });
  };
  for (const part of parts) {
    const shape = setup[part];
    const has = controlsOf(shape.kind);
    if (has.peak) {
      if (part === 'displacement') {
        item('displacement.peak', 'height', shape.peak, 'length', 'mm', -10, 10);
      } else {
        item('velocity.peak', setup.impulse ? 'momentum per area' : 'speed', shape.peak, setup.impulse ? 'ratio' : 'speed', setup.impulse ? '' : 'm/s', -1000, 1000);
      }
    }
    if (has.place) {
      item(`${part}.radius`, 'distance from the centre', shape.radius, 'ratio', '', 0, 1);
      item(`${part}.angle`, 'angle', shape.angle, 'angle', '°');
      item(`${part}.width`, 'size', shape.width, 'ratio', '', 0, 1);
    }
  }
  if (setup.duration.trim() !== '') {
    item('duration', 'time shown', setup.duration, 'time', 'ms');
  }
  const { neighbour } = setup;
  if (neighbour && neighbour.gap.trim() !== '') {
    item('neighbour.gap', 'gap to the neighbour', neighbour.gap, 'length', 'mm', 1e-9, 100);
    item('neighbour.tilt', 'tilt of the neighbour', neighbour.tilt, 'angle', '°');
    item('neighbour.direction', 'direction of the tilt', neighbour.direction, 'angle', '°');
  }
  setup.points.forEach((point, i) => {
    item(`points.${i}.radius`, `distance of point ${i + 1} from the centre`, point.radius, 'ratio', '', 0, 1);
    item(`points.${i}.angle`, `angle of point ${i + 1}`, point.angle, 'angle', '°');
  });
  return items;
}

/** A place on the drawing as texts. */
export function placeTexts(radius: number, angle: number): PointSetup {
  const degrees = Math.round((angle * 180) / Math.PI);
  return { radius: String(Math.round(Math.min(0.98, radius) * 100) / 100), angle: `${degrees < 0 ? degrees + 360 : degrees}°` };
}
