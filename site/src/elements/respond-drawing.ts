/** The moving sheet: plan with places that can be dragged, section, play, pause and step. */
import { css, html, LitElement, svg, type PropertyValues, type TemplateResult } from 'lit';
import { customElement, property, query, state } from 'lit/decorators.js';

import type { RespondResult } from '../contract.js';
import { Motion } from '../draw/motion.js';
import { coloursAt, printColours } from '../draw/palette.js';
import { PlanDrawing, planPlace, planPoint, type PlanMark } from '../draw/plan.js';
import { PolarRaster, polarSection } from '../draw/polar.js';
import { sectionPath } from '../draw/section.js';
import { Player } from '../respond/player.js';
import { themeChanged } from '../shell/theme.js';
import { figure } from './number-text.js';
import { sharedStyle } from './style.js';

const rasterSize = 141;
const sectionWidth = 360;
const sectionHeight = 110;
/** A show lasts this long on the page, s. */
const showLength = 9;
/** A finger hits a mark within this distance, CSS pixels. */
const reach = 26;

/** A place that can be dragged. */
export interface Handle extends PlanMark {
  readonly id: string;
}

@customElement('hoop-respond-drawing')
export class HoopRespondDrawing extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      canvas { display: block; width: 100%; max-width: 27rem; aspect-ratio: 1; margin: 0 auto; touch-action: none; cursor: crosshair; }
      svg { display: block; width: 92%; max-width: 25rem; margin: 6px auto; height: auto; }
      .actions { justify-content: center; }
      .rest { stroke: var(--rule); }
      .now { stroke: var(--up); stroke-width: 2.2; fill: none; }
      .clock { text-align: center; margin: 0; font-variant-numeric: tabular-nums; }
      figure { margin: 0; }
    `,
  ];

  @property({ attribute: false }) result: RespondResult | null = null;
  @property({ type: Number }) radii = 0;
  @property({ type: Number }) angles = 0;
  @property({ type: Number }) clamps = 0;
  @property({ attribute: false }) handles: readonly Handle[] = [];
  /** Shows the largest travel of each place instead of the motion. */
  @state() private travelMap = false;
  @state() private sectionAngle = 0;
  @query('canvas') private canvas!: HTMLCanvasElement | null;
  @query('.now') private nowPath!: SVGPathElement | null;
  @query('.clock') private clock!: HTMLElement | null;
  @query('#scrub') private scrub!: HTMLInputElement | null;
  private drawing: PlanDrawing | null = null;
  private polar: PolarRaster | null = null;
  private largest = 1;
  private held = '';
  private printing = false;
  private readonly player = new Player();
  private readonly motion = new Motion(this, () => this.tick());
  private lastSeconds = 0;
  private readonly repaint = (): void => this.paint();
  private readonly resized = new ResizeObserver(this.repaint);

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
    if (changed.has('result') && this.result) {
      if (this.polar?.radii !== this.radii || this.polar.angles !== this.angles) {
        this.polar = new PolarRaster(rasterSize, this.radii, this.angles);
      }
      const { times, envelope } = this.result;
      this.player.load(times.length, times[times.length - 1] ?? 1);
      this.largest = envelope.reduce((most, v) => Math.max(most, v), 0) || 1;
    }
  }

  protected override updated(): void {
    if (this.canvas && !this.drawing) {
      this.drawing = new PlanDrawing(this.canvas);
    }
    this.paint();
  }

  private tick(): void {
    this.player.advance(this.motion.seconds - this.lastSeconds, showLength);
    this.lastSeconds = this.motion.seconds;
    this.paint();
  }

  private paint(): void {
    const { result, canvas, polar } = this;
    if (!result || !canvas || !this.drawing || !polar || canvas.clientWidth === 0) {
      return;
    }
    const still = !this.motion.running || this.printing || this.travelMap;
    const offset = this.travelMap ? 0 : this.player.frame * this.radii * this.angles;
    const source = this.travelMap ? result.envelope : result.motion;
    const raster = polar.fill(source, offset);
    this.drawing.draw({
      raster: still ? raster.slice() : raster,
      size: rasterSize,
      largest: this.largest,
      factor: 1,
      circles: [],
      diameters: [],
      marks: this.handles,
      clamps: this.clamps,
      section: this.sectionAngle,
      contours: still ? 5 : 0,
    }, this.printing ? printColours : coloursAt(this), canvas.clientWidth, !this.printing);
    const section = polarSection(source, offset, this.radii, this.angles, this.sectionAngle);
    this.nowPath?.setAttribute('d', sectionPath(section, 1, this.largest, sectionWidth, sectionHeight, 4));
    this.showClock();
  }

  private showClock(): void {
    const time = this.result?.times[this.player.frame] ?? 0;
    const text = this.travelMap ? 'largest travel of each place' : `${figure(time * 1000, 3)} ms after the start, slowed ${figure(this.player.slowness(showLength), 2)} times`;
    if (this.clock && this.clock.textContent !== text) {
      this.clock.textContent = text;
    }
    if (this.scrub) {
      this.scrub.value = String(this.player.frame);
      this.scrub.setAttribute('aria-valuetext', `${figure(time * 1000, 3)} milliseconds`);
    }
  }

  private step(by: number): void {
    this.motion.toggle(false);
    this.player.position = Math.max(0, Math.min((this.result?.times.length ?? 1) - 1, this.player.frame + by));
    this.paint();
  }

  private scrubTo(event: Event): void {
    this.motion.toggle(false);
    this.player.position = Number((event.target as HTMLInputElement).value);
    this.paint();
  }

  private placeOf(event: PointerEvent): { x: number; y: number; width: number } {
    const box = (event.currentTarget as HTMLElement).getBoundingClientRect();
    return { x: event.clientX - box.left, y: event.clientY - box.top, width: box.width };
  }

  private down(event: PointerEvent): void {
    const { x, y, width } = this.placeOf(event);
    let nearest = reach;
    this.held = '';
    for (const handle of this.handles) {
      const at = planPoint(width, handle.radius, handle.angle);
      const distance = Math.hypot(at.x - x, at.y - y);
      if (distance < nearest) {
        nearest = distance;
        this.held = handle.id;
      }
    }
    const place = planPlace(width, x, y);
    if (this.held !== '') {
      (event.currentTarget as HTMLElement).setPointerCapture(event.pointerId);
      event.preventDefault();
    } else if (place.radius < 0.98) {
      this.dispatchEvent(new CustomEvent('placed', { detail: place }));
    }
  }

  private move(event: PointerEvent): void {
    if (this.held !== '') {
      const { x, y, width } = this.placeOf(event);
      this.dispatchEvent(new CustomEvent('dragged', { detail: { id: this.held, ...planPlace(width, x, y) } }));
    }
  }

  private up(): void {
    this.held = '';
  }

  protected override render(): TemplateResult {
    const degrees = Math.round((this.sectionAngle * 180) / Math.PI);
    const last = (this.result?.times.length ?? 1) - 1;
    return html`<figure>
      <canvas role="img" aria-label="Plan of the moving sheet. The numbered points and the shape can be dragged, or set in the fields."
        @pointerdown=${this.down} @pointermove=${this.move} @pointerup=${this.up} @pointercancel=${this.up}></canvas>
      <svg viewBox="0 0 ${sectionWidth} ${sectionHeight}" role="img" aria-label="Section through the sheet at ${degrees} degrees">
        ${svg`<line class="rest" x1="4" x2=${sectionWidth - 4} y1=${sectionHeight / 2} y2=${sectionHeight / 2}></line>`}
        <path class="now"></path>
      </svg>
    </figure>
    <p class="clock"></p>
    <label class="unseen" for="scrub">time</label>
    <input id="scrub" type="range" min="0" max=${last} step="1" @input=${this.scrubTo} />
    <div class="actions">
      <button type="button" class="main" @click=${() => this.motion.toggle()}>${this.motion.running ? 'Pause' : 'Move'}</button>
      <button type="button" aria-label="one step back" @click=${() => this.step(-1)}>◂</button>
      <button type="button" aria-label="one step on" @click=${() => this.step(1)}>▸</button>
      <button type="button" @click=${() => { this.sectionAngle = (this.sectionAngle + Math.PI / 12) % Math.PI; }}>Section at ${degrees}°</button>
      <button type="button" aria-pressed=${this.travelMap ? 'true' : 'false'} @click=${() => { this.travelMap = !this.travelMap; }}>Largest travel</button>
    </div>`;
  }
}
