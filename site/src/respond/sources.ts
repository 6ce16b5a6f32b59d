/** What sets the sheet moving beside the two starts: the texts as typed, and what is made of them for the engine. */
import type { Dimension, PulseKind, ReadItem, ShapeKind, Source, SourceKind } from '../contract.js';

export interface SourceSetup {
  kind: SourceKind;
  shape: ShapeKind;
  pulse: PulseKind;
  stays: boolean;
  /** By the names of fields below. */
  texts: Record<string, string>;
}

interface Field {
  symbol: string;
  label: string;
  dimension: Dimension;
  unit: string;
  first: string;
  low?: number;
  high?: number;
}

const fields: Readonly<Record<string, Field>> = {
  at: { symbol: 't₀', label: 'when, after the start', dimension: 'time', unit: 'ms', first: '0' },
  length: { symbol: 'w₀', label: 'largest height', dimension: 'length', unit: 'mm', first: '2 mm', low: -10, high: 10 },
  velocity: { symbol: 'v₀', label: 'speed', dimension: 'speed', unit: 'm/s', first: '0.1' },
  impulse: { symbol: 'p', label: 'momentum per area, N s/m²', dimension: 'ratio', unit: '', first: '0.1' },
  momentum: { symbol: 'P', label: 'momentum, N s', dimension: 'ratio', unit: '', first: '0.01' },
  mass: { symbol: 'M', label: 'mass of the body', dimension: 'mass', unit: 'g', first: '50 g', low: 1e-9, high: 1e6 },
  speed: { symbol: 'v', label: 'its speed, up', dimension: 'speed', unit: 'm/s', first: '-1 m/s' },
  restitution: { symbol: 'e', label: 'share of its speed that it bounces with', dimension: 'ratio', unit: '', first: '0.5', low: 0, high: 1 },
  pressure: { symbol: 'p', label: 'pressure', dimension: 'pressure', unit: 'Pa', first: '5 Pa' },
  force: { symbol: 'F', label: 'force of the pad, N', dimension: 'ratio', unit: '', first: '0.5' },
  frontSpeed: { symbol: 'c', label: 'speed of the front', dimension: 'speed', unit: 'm/s', first: '343 m/s' },
  frontDirection: { symbol: 'θ', label: 'direction in which it goes', dimension: 'angle', unit: '°', first: '0°' },
  radius: { symbol: 'r', label: 'from the centre, in radii', dimension: 'ratio', unit: '', first: '0.4', low: 0, high: 1 },
  angle: { symbol: 'θ', label: 'angle, anticlockwise from the right', dimension: 'angle', unit: '°', first: '30°' },
  width: { symbol: 'b', label: 'radius of it, in radii', dimension: 'ratio', unit: '', first: '0.1', low: 0, high: 1 },
  duration: { symbol: 'd', label: 'length in time', dimension: 'time', unit: 'ms', first: '5 ms' },
};

interface KindInfo {
  name: string;
  /** Fields of its own, after the time. */
  own: readonly string[];
  /** What the size of its shape is. */
  peak?: string;
  shapes: readonly ShapeKind[];
  pulses: readonly PulseKind[];
}

const pulses: readonly PulseKind[] = ['step', 'ramp', 'halfSine', 'triangle', 'rectangle', 'decay', 'table'];

export const sourceKinds: Readonly<Record<SourceKind, KindInfo>> = {
  blow: { name: 'a blow of given momentum', own: ['momentum'], shapes: ['patch', 'bump'], pulses: [] },
  body: { name: 'a body that strikes', own: ['mass', 'speed'], shapes: ['patch', 'bump'], pulses: [] },
  pressure: { name: 'a pressure', own: [], peak: 'pressure', shapes: ['even', 'half', 'patch', 'bump', 'formula'], pulses },
  front: { name: 'a pressure front that passes', own: ['pressure', 'frontSpeed', 'frontDirection'], shapes: [], pulses: ['step', 'rectangle', 'decay'] },
  release: { name: 'a static load that ends', own: [], peak: 'pressure', shapes: ['even', 'half', 'patch', 'point', 'formula'], pulses: [] },
  shake: { name: 'the ring is shaken', own: [], shapes: [], pulses: ['table'] },
  displacement: { name: 'a shape held, then let go', own: [], peak: 'length', shapes: ['bulge', 'point', 'bump', 'formula', 'measured'], pulses: [] },
  impulse: { name: 'momentum over a shape', own: [], peak: 'impulse', shapes: ['even', 'half', 'patch', 'bump', 'formula', 'measured'], pulses: [] },
  velocity: { name: 'a speed over a shape', own: [], peak: 'velocity', shapes: ['even', 'half', 'patch', 'bump', 'bulge', 'formula', 'measured'], pulses: [] },
};

export const shapeNames: Readonly<Partial<Record<ShapeKind, string>>> = {
  even: 'everywhere alike', half: 'on one half', patch: 'a round patch', bump: 'a smooth bump', bulge: 'as 1 − r²', point: 'a pad', formula: 'a formula',
  measured: 'measured points',
};

export const pulseNames: Readonly<Record<PulseKind, string>> = {
  step: 'stays', ramp: 'rises, then stays', halfSine: 'half a wave', triangle: 'rises and falls', rectangle: 'lasts for a time', decay: 'dies away', table: 'by a table',
};

export function firstSource(kind: SourceKind): SourceSetup {
  const { shapes, pulses: own } = sourceKinds[kind];
  return { kind, shape: shapes[0] ?? 'rest', pulse: own[0] ?? 'step', stays: false, texts: { formula: '1 - r^2', table: '0, 0\n0.01, 1\n0.02, 0' } };
}

export const fieldOf = (name: string): Field => fields[name]!;

export const textOf = (source: SourceSetup, name: string): string => source.texts[name] ?? fields[name]?.first ?? '';

/** The fields that a source shows. */
export function shownFields(source: SourceSetup): string[] {
  const kind = sourceKinds[source.kind];
  const list = ['at', ...kind.own];
  if (source.kind === 'body' && !source.stays) {
    list.push('restitution');
  }
  if (source.shape !== 'measured') {
    const force = source.kind === 'release' && source.shape === 'point';
    list.push(...(force ? ['force'] : kind.peak ? [kind.peak] : []));
  }
  if (['patch', 'bump', 'point'].includes(source.shape)) {
    list.push('radius', 'angle', 'width');
  } else if (source.shape === 'half') {
    list.push('angle');
  }
  if (kind.pulses.length > 0 && source.pulse !== 'step' && source.pulse !== 'table') {
    list.push('duration');
  }
  return list;
}

export const hasTable = (source: SourceSetup): boolean => sourceKinds[source.kind].pulses.length > 0 && source.pulse === 'table';

export function sourceItems(sources: readonly SourceSetup[]): ReadItem[] {
  return sources.flatMap((source, i) => shownFields(source).map((name) => {
    const f = fieldOf(name);
    return { field: `more.${i}.${name}`, name: f.label, text: textOf(source, name), dimension: f.dimension, unit: f.unit, low: f.low ?? 0, high: f.high ?? 0 };
  }));
}

/** The source as the engine takes it; value gives what was read. */
export function toSource(source: SourceSetup, value: (name: string) => number): Source {
  const shown = new Set(shownFields(source));
  const of = (name: string): number => (shown.has(name) ? value(name) : 0);
  const kind = sourceKinds[source.kind];
  const peak = source.shape === 'measured' ? 1 : shown.has('force') ? of('force') : of(kind.peak ?? 'pressure');
  return {
    kind: source.kind,
    at: of('at'),
    shape: {
      kind: kind.shapes.length > 0 ? source.shape : 'rest', peak, radius: of('radius'), angle: of('angle'), width: of('width'),
      formula: source.shape === 'formula' ? textOf(source, 'formula') : '',
      ...(source.shape === 'measured' ? { table: textOf(source, 'measured'), placeUnit: 'mm', ...(source.kind === 'displacement' ? { valueUnit: 'mm' } : {}) } : {}),
    },
    momentum: of('momentum'), mass: of('mass'), speed: of('speed'), restitution: of('restitution'), stays: source.kind === 'body' && source.stays,
    frontSpeed: of('frontSpeed'), frontDirection: of('frontDirection'),
    ...(kind.pulses.length > 0 ? { pulse: { kind: source.pulse, duration: of('duration'), ...(hasTable(source) ? { table: textOf(source, 'table') } : {}) } } : {}),
  };
}

/** Field of the page for a field of the engine: both show the same problem. */
export function shownAs(field: string): string {
  const match = /^sources\.(\d+)\.(?:shape\.|pulse\.)?(.*)$/.exec(field);
  return match ? `more.${match[1]}.${match[2]}` : field;
}
