/**
 * The section through the diaphragm: what lies above and below the sheet, in a drawing. A face is chosen in it to come to
 * its fields; a wall and the bottom of a cavity are moved in it.
 */
import { css, html, LitElement, nothing, svg, type SVGTemplateResult, type TemplateResult } from 'lit';
import { customElement } from 'lit/decorators.js';

import type { Diaphragm, Face, Row } from '../contract.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { sharedStyle } from './style.js';

type Side = 'upper' | 'lower';

// The drawing's own places, in its own units.
const width = 560;
const height = 300;
const middle = 150;
const left = 150;
const right = 410;
const radius = (right - left) / 2;
const nearest = 26;
const farthest = 118;

const sideWords: Readonly<Record<Side, string>> = { upper: 'Above', lower: 'Below' };

@customElement('hoop-faces')
export class HoopFaces extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      svg { display: block; width: 100%; max-width: 640px; margin: 4px auto 10px; touch-action: pan-y; }
      text { font-size: 15px; fill: var(--ink); text-anchor: middle; }
      text.length { text-anchor: start; }
      text.less { font-size: 13px; fill: var(--soft); }
      .sheet { stroke: var(--ink); stroke-width: 3; }
      .ring { fill: var(--ink); }
      .baffle { fill: none; stroke: var(--ink); stroke-width: 2; }
      .hatch { stroke: var(--soft); stroke-width: 1.2; }
      .face { fill: transparent; cursor: pointer; }
      .face:hover { fill: var(--teal); fill-opacity: 0.08; }
      .face:focus-visible, .handle:focus-visible { outline: 3px solid var(--teal); outline-offset: -3px; }
      .handle { cursor: ns-resize; touch-action: none; }
      .handle circle { fill: var(--panel); stroke: var(--teal); stroke-width: 2.5; }
      .measure { stroke: var(--teal); stroke-width: 1.5; fill: none; }
      @media print { .handle circle { display: none; } }
    `,
  ];

  /** The distance that is being dragged: its field, where the pointer began, and the figure that it had. */
  private drag: { field: string; from: number; value: number; unit: string; sent: string } | null = null;

  constructor() {
    super();
    new SessionController(this);
  }

  protected override render(): TemplateResult | typeof nothing {
    const { document } = session;
    if (!document) {
      return nothing;
    }
    const words = (['upper', 'lower'] as const).map((side) => `${sideWords[side]}: ${faceWords(document, side)}.`);
    return html`
      <svg viewBox="0 0 ${width} ${height}" role="group" aria-label="Section through the diaphragm. ${words.join(' ')}"
        @pointermove=${this.move} @pointerup=${this.drop} @pointercancel=${this.drop}>
        ${(['upper', 'lower'] as const).map((side) => this.face(document, side))}
        ${baffles(document)}
        <line class="sheet" x1=${left} x2=${right} y1=${middle} y2=${middle}></line>
        ${document.ring.hubRadius ? hub(document.ring.hubRadius / document.ring.radius) : nothing}
        ${[left - 14, right].map((x) => svg`<rect class="ring" x=${x} y=${middle - 12} width="14" height="24"></rect>`)}
        <text class="less" x=${right + 60} y=${middle - 20}>ring</text>
        <text class="less" x=${left - 78} y=${middle - 20}>sheet</text>
        <line class="measure" x1=${left - 58} y1=${middle - 18} x2=${left + 26} y2=${middle - 3}></line>
        ${(['upper', 'lower'] as const).map((side) => this.distance(document, side))}
      </svg>`;
  }

  /** The region above or below, with its words: chosen, it leads to its fields. */
  private face(document: Diaphragm, side: Side): SVGTemplateResult {
    const top = side === 'upper' ? 2 : middle + 4;
    const words = faceWords(document, side);
    const y = wordsPlace(document, side);
    const x = (left + right) / 2 - 40;
    return svg`<rect class="face" data-side=${side} x="2" y=${top} width=${width - 4} height=${middle - 6} role="button" tabindex="0"
        aria-label="${sideWords[side]}: ${words}. Go to its fields." @click=${() => this.choose(side)}
        @keydown=${(e: KeyboardEvent) => { if (e.key === 'Enter' || e.key === ' ') { e.preventDefault(); this.choose(side); } }}></rect>
      <g pointer-events="none" aria-hidden="true"><text x=${x} y=${y}>${sideWords[side].toLowerCase()}: ${fluidWord(document, side)}</text>
        <text class="less" x=${x} y=${y + 18}>${kindWords(document.faces[side])}</text></g>`;
  }

  private choose(side: Side): void {
    const root = this.getRootNode() as ParentNode;
    const field = root.querySelector(`[data-field="faces.${side}.kind"]`);
    field?.shadowRoot?.querySelector<HTMLElement>('select, input')?.focus();
    field?.scrollIntoView({ block: 'nearest' });
  }

  /** A wall or the bottom of a cavity, with the handle that moves it. */
  private distance(document: Diaphragm, side: Side): SVGTemplateResult | typeof nothing {
    const face = document.faces[side];
    const row = distanceRow(side, face);
    const length = face.kind === 'cavity' ? face.depth : face.kind === 'baffled' ? face.wall : 0;
    if (!length || !row) {
      return nothing;
    }
    const y = place(document, side, length);
    const cavity = face.kind === 'cavity';
    const [from, to] = cavity ? [left - 14, right + 14] : [20, width - 20];
    const gap = cavity && face.ventArea ? 20 : 0;
    const out = side === 'upper' ? -1 : 1;
    const x = right - 72;
    return svg`<g>
      ${cavity ? svg`<path class="baffle" d="M${from} ${middle}V${y}M${to} ${middle}V${y}"></path>` : nothing}
      <path class="baffle" d="M${from} ${y}H${left + 40}M${left + 40 + gap} ${y}H${to}"></path>
      ${hatches(from, to, y, out, gap)}
      ${gap > 0 ? svg`<text class="less" x=${left + 50} y=${y + (side === 'upper' ? 18 : -8)}>vent</text>` : nothing}
      <line class="measure" x1=${x} x2=${x} y1=${middle} y2=${y}></line>
      <g class="handle" role="slider" tabindex="0" data-field=${row.field} aria-orientation="vertical" aria-label=${`${row.name}, ${sideWords[side].toLowerCase()}`}
        aria-valuenow=${Number.parseFloat(row.text)} aria-valuetext="${row.text} ${row.unit}"
        @pointerdown=${(e: PointerEvent) => this.take(e, row)} @keydown=${(e: KeyboardEvent) => this.key(e, row, out)}>
        <circle cx=${x} cy=${y} r="13"></circle></g>
      <text class="length" x=${x + 10} y=${(middle + y) / 2 + 5}>${row.text} ${row.unit}</text></g>`;
  }

  private take(event: PointerEvent, row: Row): void {
    event.preventDefault();
    const svgElement = (event.currentTarget as SVGElement).ownerSVGElement;
    svgElement?.setPointerCapture(event.pointerId);
    (event.currentTarget as SVGElement).focus();
    this.drag = { field: row.field, from: this.away(event), value: Number.parseFloat(row.text), unit: row.unit, sent: '' };
  }

  /** How far the pointer is from the sheet, in pixels of the drawing as shown. */
  private away(event: PointerEvent): number {
    const box = this.renderRoot.querySelector('svg')?.getBoundingClientRect();
    return box ? Math.abs(event.clientY - box.top - (box.height * middle) / height) : 0;
  }

  private readonly move = (event: PointerEvent): void => {
    const { drag } = this;
    if (drag && drag.from > 0) {
      this.set(drag, (drag.value * Math.max(this.away(event), 2)) / drag.from);
    }
  };

  private readonly drop = (): void => {
    this.drag = null;
  };

  private key(event: KeyboardEvent, row: Row, out: number): void {
    const steps: Readonly<Record<string, number>> = { ArrowUp: -out, ArrowDown: out, ArrowRight: 1, ArrowLeft: -1, PageUp: -5 * out, PageDown: 5 * out };
    const step = steps[event.key];
    if (step !== undefined) {
      event.preventDefault();
      this.set({ field: row.field, unit: row.unit, sent: '' }, Number.parseFloat(row.text) * 1.05 ** step);
    }
  }

  private set(drag: { field: string; unit: string; sent: string }, value: number): void {
    const text = `${Number(value.toPrecision(3))} ${drag.unit}`;
    if (Number.isFinite(value) && value > 0 && text !== drag.sent) {
      drag.sent = text;
      void session.edit({ field: drag.field, action: 'set', text });
    }
  }
}

function distanceRow(side: Side, face: Face): Row | undefined {
  return session.rows.find((r) => r.field === `faces.${side}.${face.kind === 'cavity' ? 'depth' : 'wall'}`);
}

/** Where a distance from the sheet is drawn: to the scale of the radius as far as it fits. */
function place(document: Diaphragm, side: Side, length: number): number {
  const drawn = Math.min(Math.max((length / document.ring.radius) * radius, nearest), farthest);
  return side === 'upper' ? middle - drawn : middle + drawn;
}

/** Where the words of a face begin: between the sheet and a wall, or beyond a wall that is near. */
function wordsPlace(document: Diaphragm, side: Side): number {
  const face = document.faces[side];
  const length = (face.kind === 'cavity' ? face.depth : face.kind === 'baffled' ? face.wall : 0) ?? 0;
  const drawn = length > 0 ? Math.abs(place(document, side, length) - middle) : 0;
  const away = drawn === 0 ? 74 : drawn >= 62 ? drawn / 2 : drawn + 34;
  return (side === 'upper' ? middle - away : middle + away) - 4;
}

function fluidWord(document: Diaphragm, side: Side): string {
  const face = document.faces[side];
  if (face.kind === 'vacuum') {
    return 'vacuum';
  }
  const choices = session.rows.find((r) => r.field === `faces.${side}.fluid`)?.choices ?? [];
  return (choices.find((c) => c.value === (face.fluid ?? 'air'))?.name ?? face.fluid ?? 'air').split(',')[0] ?? '';
}

function kindWords(face: Face): string {
  switch (face.kind) {
    case 'vacuum':
      return 'nothing moves along';
    case 'open':
      return 'open: it passes around the ring';
    case 'cavity':
      return face.ventArea ? 'a cavity with a vent' : 'a closed cavity';
    default:
      return face.wall ? 'baffled, a wall near' : 'baffled, no wall near';
  }
}

function faceWords(document: Diaphragm, side: Side): string {
  const row = distanceRow(side, document.faces[side]);
  const kind = document.faces[side].kind;
  const length = row && row.text !== '' && (kind === 'cavity' || kind === 'baffled') ? `, at ${row.text} ${row.unit}` : '';
  return `${fluidWord(document, side)}, ${kindWords(document.faces[side])}${length}`;
}

/** The wall in which the ring sits, where a face is baffled. */
function baffles(document: Diaphragm): SVGTemplateResult | typeof nothing {
  const { upper, lower } = document.faces;
  if (upper.kind !== 'baffled' && lower.kind !== 'baffled') {
    return nothing;
  }
  return svg`<path class="baffle" d="M8 ${middle}H${left - 14}M${right + 14} ${middle}H${width - 8}"></path>
    <text class="less" x="52" y=${middle + 20}>baffle</text>`;
}

function hub(share: number): SVGTemplateResult {
  const half = Math.max(4, share * radius);
  return svg`<rect class="ring" x=${(left + right) / 2 - half} y=${middle - 8} width=${2 * half} height="16"></rect>
    <text class="less" x=${(left + right) / 2} y=${middle + 26}>hub</text>`;
}

/** Short strokes on the far side of a wall. */
function hatches(from: number, to: number, y: number, out: number, gap: number): SVGTemplateResult[] {
  const strokes: SVGTemplateResult[] = [];
  for (let x = from; x < to - 6; x += 14) {
    if (gap === 0 || x < left + 30 || x > left + 40 + gap) {
      strokes.push(svg`<line class="hatch" x1=${x} y1=${y + 9 * out} x2=${x + 9} y2=${y}></line>`);
    }
  }
  return strokes;
}
