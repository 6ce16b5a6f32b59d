/** The drawing of one mode: plan with nodal lines, section through it, slow motion that can be paused. */
import { css, html, LitElement, svg, type PropertyValues, type TemplateResult } from 'lit';
import { customElement, property, query, state } from 'lit/decorators.js';

import type { Diaphragm, Effect, ShapeResult } from '../contract.js';
import { ovalFactor } from '../draw/outlines.js';
import { Motion } from '../draw/motion.js';
import { coloursAt, printColours } from '../draw/palette.js';
import { type Plan, PlanDrawing } from '../draw/plan.js';
import { sectionPath } from '../draw/section.js';
import { engine } from '../engine/client.js';
import { themeChanged } from '../shell/theme.js';
import { sharedStyle } from './style.js';

const rasterSize = 181;
const sectionPoints = 121;
/** One swing takes this long on the page, s: slow enough to follow. */
const swing = 3.2;
const sectionWidth = 360;
const sectionHeight = 90;

@customElement('hoop-mode-drawing')
export class HoopModeDrawing extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      canvas { display: block; width: 100%; max-width: 26rem; aspect-ratio: 1; margin: 0 auto; }
      svg { display: block; width: 92%; max-width: 24rem; margin: 6px auto; height: auto; }
      .actions { justify-content: center; }
      .rest { stroke: var(--rule); }
      .extreme { stroke: var(--soft); stroke-width: 1; fill: none; }
      .now { stroke: var(--up); stroke-width: 2.2; fill: none; }
      figcaption { text-align: center; color: var(--soft); }
      figure { margin: 0; }
    `,
  ];

  /** The diaphragm whose mode is drawn; without it, the ideal sheet's. */
  @property({ attribute: false }) document: Diaphragm | null = null;
  @property({ attribute: false }) without: readonly Effect[] = [];
  @property({ type: Number }) m = 0;
  @property({ type: Number }) n = 1;
  /** The higher of a pair that unevenness splits. */
  @property({ type: Boolean }) upper = false;
  @property({ type: Number }) clamps = 0;
  @property() caption = '';
  @state() private shape: ShapeResult | null = null;
  @state() private sectionAngle = 0;
  @query('canvas') private canvas!: HTMLCanvasElement | null;
  @query('.now') private nowPath!: SVGPathElement | null;
  private drawing: PlanDrawing | null = null;
  private printing = false;
  private readonly motion = new Motion(this, () => this.paint());
  private readonly resized = new ResizeObserver(() => this.paint());
  private readonly repaint = (): void => this.paint();

  override connectedCallback(): void {
    super.connectedCallback();
    this.resized.observe(this);
    addEventListener(themeChanged, this.repaint);
    addEventListener('beforeprint', this.onPrint);
    addEventListener('afterprint', this.onPrint);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.resized.disconnect();
    removeEventListener(themeChanged, this.repaint);
    removeEventListener('beforeprint', this.onPrint);
    removeEventListener('afterprint', this.onPrint);
  }

  private readonly onPrint = (event: Event): void => {
    this.printing = event.type === 'beforeprint';
    this.paint();
  };

  protected override willUpdate(changed: PropertyValues<this>): void {
    if (changed.has('m') || changed.has('n') || changed.has('upper') || changed.has('document') || changed.has('without')) {
      void this.load();
    }
  }

  private async load(): Promise<void> {
    const answer = await engine.call('shape', {
      ...(this.document ? { document: this.document, without: [...this.without], upper: this.upper } : {}),
      m: this.m, n: this.n, orientation: Math.PI / 9, size: rasterSize, sectionAngle: this.sectionAngle, sectionPoints,
    }, { key: 'mode-drawing' });
    if (answer.kind === 'result') {
      this.shape = answer.result;
    }
  }

  protected override updated(): void {
    if (this.canvas && !this.drawing) {
      this.drawing = new PlanDrawing(this.canvas);
    }
    this.paint();
  }

  /** Position within the swing, -1 to 1. At rest the drawing shows the full swing. */
  private get factor(): number {
    return this.motion.seconds === 0 || this.printing ? 1 : Math.cos((2 * Math.PI * this.motion.seconds) / swing);
  }

  private paint(): void {
    const { shape, canvas } = this;
    if (!shape || !canvas || !this.drawing || canvas.clientWidth === 0) {
      return;
    }
    const factor = this.factor;
    const plan: Plan = {
      raster: shape.raster,
      size: rasterSize,
      largest: 1,
      factor,
      circles: shape.circleRadii,
      diameters: shape.diameterAngles,
      marks: shape.lobes.length > 40 ? [] : shape.lobes.map((l) => ({ radius: l.radius, angle: l.angle, text: l.value * factor >= 0 ? '+' : '−' })),
      clamps: this.clamps,
      section: this.sectionAngle,
      contours: 5,
      outlines: shape,
    };
    this.drawing.draw(plan, this.printing ? printColours : coloursAt(this), canvas.clientWidth, !this.printing);
    this.nowPath?.setAttribute('d', this.path(factor));
  }

  private path(factor: number): string {
    return this.shape ? sectionPath(this.shape.section, factor, 1, sectionWidth, sectionHeight, 4) : '';
  }

  private spoken(): string {
    const { m, n } = this;
    const lines = `${m === 0 ? 'no' : m} nodal ${m === 1 ? 'diameter' : 'diameters'} and ${n === 1 ? 'no nodal circle' : `${n - 1} nodal ${n === 2 ? 'circle' : 'circles'}`} inside the rim`;
    return `Plan of mode (${m}, ${n}): ${this.shape?.bent ? 'nodal lines close to ' : ''}${lines}`;
  }

  /** What the drawing shows beside the mode. */
  private drawn(): string[] {
    const { shape } = this;
    const list: string[] = [];
    const oval = shape?.oval ?? 0;
    if (oval > 0) {
      const times = ovalFactor(oval);
      list.push(times > 1 ? `the ring is drawn ${Math.round(times)} times as oval as it is` : 'the ring is drawn as oval as it is');
    }
    const things = [(shape?.strips?.length ?? 0) > 0 ? 'strips as bands' : '', (shape?.patches?.length ?? 0) > 0 ? 'patches as circles, rigid ones with a cross' : ''].filter((t) => t !== '');
    return things.length > 0 ? [...list, things.join(', ')] : list;
  }

  private turnSection(): void {
    this.sectionAngle = (this.sectionAngle + Math.PI / 12) % Math.PI;
    void this.load();
  }

  protected override render(): TemplateResult {
    const degrees = Math.round((this.sectionAngle * 180) / Math.PI);
    return html`<figure>
      <canvas role="img" aria-label=${this.spoken()}></canvas>
      <svg viewBox="0 0 ${sectionWidth} ${sectionHeight}" role="img" aria-label="Section through the sheet at ${degrees} degrees">
        <line class="rest" x1="4" x2=${sectionWidth - 4} y1=${sectionHeight / 2} y2=${sectionHeight / 2}></line>
        ${[1, 0.5, -0.5, -1].map((f) => svg`<path class="extreme" d=${this.path(f)}></path>`)}
        <path class="now" d=${this.path(1)}></path>
      </svg>
      <figcaption>${this.caption}${this.drawn().map((line) => html`<br />${line}`)}</figcaption>
    </figure>
    <div class="actions">
      <button type="button" class="main" @click=${() => this.motion.toggle()}>
        ${this.motion.running ? 'Pause' : 'Move'}</button>
      <button type="button" @click=${this.turnSection}>Section at ${degrees}°</button>
    </div>`;
  }
}
