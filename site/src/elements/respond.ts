/** The page Respond: how the sheet is let go or struck, its motion, histories, largest travel, and what is missed. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, query, state } from 'lit/decorators.js';

import type { RespondRequest, RespondResult, ShapeKind } from '../contract.js';
import { Curve, curveStyle } from '../draw/curve.js';
import { engine, type Problem } from '../engine/client.js';
import { controlsOf, firstNeighbour, firstSetup, historyKinds, kindNames, modeChoices, mostPoints, type NeighbourSetup, type Part, parts, placeTexts, readItems, type Setup } from '../respond/setup.js';
import { shownAs, sourceItems, type SourceSetup, toSource } from '../respond/sources.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { themeChanged } from '../shell/theme.js';
import { assumptions, caution } from './notes.js';
import { figure, percent } from './number-text.js';
import type { Handle } from './respond-drawing.js';
import './respond-drawing.js';
import './respond-sources.js';
import { sharedStyle } from './style.js';
import './table-actions.js';
import type { ShownTable } from './table-copy.js';
import './typed.js';
import { TypedTexts } from './typed-texts.js';

const radii = 41;
const angles = 80;
const frames = 160;
const dashes = [[], [8, 4], [2, 3], [10, 3, 2, 3], [1, 4], [14, 5], [6, 2, 1, 2], [3, 6]];
const seriesColours = ['ink', 'up', 'down', 'soft'];

@customElement('hoop-respond')
export class HoopRespond extends LitElement {
  static override styles = [
    sharedStyle,
    curveStyle,
    css`
      select { width: 100%; }
      .point { display: grid; grid-template-columns: 1fr auto; align-items: start; gap: 8px; }
      .point button { margin-top: 8px; }
      #history { min-height: 240px; }
      dl { display: grid; grid-template-columns: auto 1fr; gap: 6px 18px; }
      dd { margin: 0; font-variant-numeric: tabular-nums; }
      summary { min-height: 44px; padding: 9px 0; cursor: pointer; color: var(--teal); }
    `,
  ];

  @state() private setup: Setup = firstSetup();
  @state() private result: RespondResult | null = null;
  @state() private problems: readonly Problem[] = [];
  /** Place in historyKinds. */
  @state() private shown = 0;
  @query('#history') private historyHost!: HTMLElement | null;
  @query('hoop-respond-sources') private sourcesPart!: LitElement | null;
  private readonly texts = new TypedTexts();
  private curve: Curve | null = null;
  private asked = '';
  private readonly redraw = (): void => this.drawHistory();

  constructor() {
    super();
    new SessionController(this, () => void this.compute());
    session.addEventListener('opened', this.onOpened);
  }

  private readonly onOpened = (): void => {
    this.setup = session.recall('respond', firstSetup());
    void this.compute();
  };

  override connectedCallback(): void {
    super.connectedCallback();
    addEventListener(themeChanged, this.redraw);
    addEventListener('resize', this.redraw);
    if (session.document) {
      this.onOpened();
    }
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    removeEventListener(themeChanged, this.redraw);
    removeEventListener('resize', this.redraw);
    this.curve?.destroy();
    this.curve = null;
  }

  private change(setup: Setup): void {
    this.setup = setup;
    session.remember('respond', setup);
    void this.compute();
  }

  /** Sources beside the two starts; a setup remembered earlier has none. */
  private get more(): readonly SourceSetup[] {
    return this.setup.more ?? [];
  }

  private get neighbour(): NeighbourSetup {
    return this.setup.neighbour ?? firstNeighbour;
  }

  private changeNeighbour(change: Partial<NeighbourSetup>): void {
    this.change({ ...this.setup, neighbour: { ...this.neighbour, ...change } });
  }

  private changeShape(part: Part, change: Partial<Setup[Part]>): void {
    this.change({ ...this.setup, [part]: { ...this.setup[part], ...change } });
  }

  private async compute(): Promise<void> {
    const { document } = session;
    if (!document || !(await this.texts.read([...readItems(this.setup), ...sourceItems(this.more)], 'respond-texts'))) {
      return;
    }
    this.requestUpdate();
    if (!this.texts.sound) {
      return;
    }
    const request: RespondRequest = {
      document,
      sources: this.more.map((source, i) => toSource(source, (name) => this.texts.value(`more.${i}.${name}`))),
      displacement: this.shape('displacement'),
      velocity: this.shape('velocity'),
      impulse: this.setup.impulse,
      orders: this.setup.orders,
      circles: this.setup.orders,
      duration: this.texts.value('duration'),
      frames, radii, angles,
      ...(this.neighbour.gap.trim() === '' ? {} : { neighbour: { below: this.neighbour.below, gap: this.texts.value('neighbour.gap'),
        tilt: this.texts.value('neighbour.tilt'), direction: this.texts.value('neighbour.direction') } }),
      points: this.setup.points.map((_, i) => ({ radius: this.texts.value(`points.${i}.radius`), angle: this.texts.value(`points.${i}.angle`) })),
    };
    const asked = JSON.stringify(request);
    if (asked === this.asked) {
      return;
    }
    this.asked = asked;
    const answer = await engine.call('respond', request, { key: 'respond' });
    if (answer.kind === 'result') {
      this.result = answer.result;
      this.problems = [];
    } else if (answer.kind === 'refused') {
      this.problems = answer.problems;
    }
  }

  private shape(part: Part): { kind: ShapeKind; peak: number; radius: number; angle: number; width: number; formula: string } {
    const shape = this.setup[part];
    const has = controlsOf(shape.kind);
    const value = (name: string): number => (has.place ? this.texts.value(`${part}.${name}`) : 0);
    return {
      kind: shape.kind,
      peak: has.peak ? this.texts.value(`${part}.peak`) : 0,
      radius: value('radius'),
      angle: value('angle'),
      width: value('width'),
      formula: has.formula ? shape.formula : '',
    };
  }

  private problem(field: string): string {
    return this.texts.problem(field) || (this.problems.find((p) => p.field === field)?.message ?? '');
  }

  private get handles(): Handle[] {
    const shapes = parts.filter((part) => controlsOf(this.setup[part].kind).place).map((part) => ({
      id: part, text: part === 'displacement' ? '◆' : '✕', radius: this.texts.value(`${part}.radius`), angle: this.texts.value(`${part}.angle`),
    }));
    const points = this.setup.points.map((_, i) => ({
      id: `points.${i}`, text: String(i + 1), radius: this.texts.value(`points.${i}.radius`), angle: this.texts.value(`points.${i}.angle`),
    }));
    return [...shapes, ...points];
  }

  private dragged(event: CustomEvent<{ id: string; radius: number; angle: number }>): void {
    const { id, radius, angle } = event.detail;
    const place = placeTexts(radius, angle);
    if (id === 'displacement' || id === 'velocity') {
      const most = Math.max(0, 1 - this.texts.value(`${id}.width`));
      this.changeShape(id, placeTexts(Math.min(radius, Math.floor(most * 100) / 100), angle));
    } else {
      this.change({ ...this.setup, points: this.setup.points.map((p, i) => (id === `points.${i}` ? place : p)) });
    }
  }

  private placed(event: CustomEvent<{ radius: number; angle: number }>): void {
    if (this.setup.points.length < mostPoints) {
      this.addPoint(event.detail.radius, event.detail.angle);
    }
  }

  private addPoint(radius: number, angle: number): void {
    this.change({ ...this.setup, points: [...this.setup.points, placeTexts(radius, angle)] });
  }

  protected override updated(): void {
    // What was read of the texts is kept in one object, which does not tell of a change.
    this.sourcesPart?.requestUpdate();
    this.drawHistory();
  }

  private drawHistory(): void {
    const { result, historyHost } = this;
    if (!historyHost || !result || result.histories.length === 0) {
      this.curve?.destroy();
      this.curve = null;
      return;
    }
    this.curve ??= new Curve(historyHost);
    const kind = historyKinds[this.shown]!;
    this.curve.show({
      xLabel: 'time, ms',
      yLabel: `${kind.name}, ${kind.unit}`,
      height: 260,
      series: result.histories.map((_, i) => ({ label: `point ${i + 1}`, colour: seriesColours[i] ?? 'ink', dash: dashes[i] ?? [], width: 1.6 })),
    }, [result.historyTimes.map((t) => t * 1000), ...result.histories.map((h) => [h.values, h.velocity, h.acceleration][this.shown]!.map((w) => w * kind.scale))]);
  }

  protected override render(): TemplateResult {
    const { document } = session;
    if (!document) {
      return html`<section class="panel"><p role="status">${session.message || 'Opening the diaphragm…'}</p></section>`;
    }
    const shown = ['displacement', 'velocity', 'duration', 'points', 'more.', 'neighbour'];
    const general = this.problems.filter((p) => !shown.some((s) => shownAs(p.field).startsWith(s)));
    return html`
      <section class="panel" aria-label="How it starts, and the motion"><div class="split">
        <div>
          ${this.shapePart('displacement', 'Let go from', 'w₀')}
          ${this.shapePart('velocity', 'Set moving by', 'v₀')}
          <h2>Time and modes</h2>
          ${this.typed('duration', 't', 'time shown', this.setup.duration, 'ms', (text) => this.change({ ...this.setup, duration: text }),
            'Left empty: six periods of mode (0, 1).')}
          <label for="orders">Modes used, in <var>m</var> and in <var>n</var></label>
          <select id="orders" @change=${(e: Event) => this.change({ ...this.setup, orders: Number((e.target as HTMLSelectElement).value) })}>
            ${modeChoices.map((n) => html`<option value=${n} ?selected=${n === this.setup.orders}>${n === 0 ? 'as many as leave out a thousandth of the energy' : `m up to ${n}, n up to ${n}`}</option>`)}
          </select>
          <h2>A surface beside the sheet</h2>
          ${this.typed('neighbour.gap', 'g', 'gap at the centre, at rest', this.neighbour.gap, 'mm', (gap) => this.changeNeighbour({ gap }), 'Left empty: none.')}
          ${this.neighbour.gap.trim() === '' ? nothing : html`
            <label for="side">it lies</label>
            <select id="side" @change=${(e: Event) => this.changeNeighbour({ below: (e.target as HTMLSelectElement).value === 'below' })}>
              <option value="above" ?selected=${!this.neighbour.below}>above the sheet</option>
              <option value="below" ?selected=${this.neighbour.below}>below the sheet</option>
            </select>
            ${this.typed('neighbour.tilt', 'φ', 'falls away from it by', this.neighbour.tilt, '°', (tilt) => this.changeNeighbour({ tilt }))}
            ${this.typed('neighbour.direction', 'θ', 'towards', this.neighbour.direction, '°', (direction) => this.changeNeighbour({ direction }))}`}
          ${general.map((p) => html`<p class="error" role="alert">${p.message}</p>`)}
        </div>
        <div class="drawing">
          <h2>The sheet in motion</h2>
          <hoop-respond-drawing .result=${this.result} .radii=${radii} .angles=${this.result?.angles ?? angles} .clamps=${document.ring.clamps} .handles=${this.handles}
            @dragged=${this.dragged} @placed=${this.placed}></hoop-respond-drawing>
        </div>
      </div></section>
      <section class="panel" aria-labelledby="more-title">
        <h2 id="more-title">What else sets it moving</h2>
        <hoop-respond-sources .sources=${this.more} .texts=${this.texts} .problems=${this.problems} .notes=${this.result?.sources ?? []}
          @changed=${(e: CustomEvent<SourceSetup[]>) => this.change({ ...this.setup, more: e.detail })}></hoop-respond-sources>
      </section>
      ${this.result ? this.answers(this.result) : nothing}
      ${this.pointsPanel()}
      ${this.result ? this.modesPanel(this.result) : nothing}`;
  }

  private typed(field: string, symbol: string, label: string, text: string, unit: string, change: (text: string) => void, help = '', long = false): TemplateResult {
    const problem = this.problems.find((p) => p.field === field);
    return html`<hoop-typed data-field=${field} .symbol=${symbol} .label=${label} .text=${text} .unit=${unit} .help=${help} .long=${long}
      .echo=${this.texts.echo(field)} .problem=${this.problem(field)} .offset=${this.texts.problem(field) ? -1 : (problem?.offset ?? -1)}
      @typed=${(e: CustomEvent<string>) => change(e.detail)}></hoop-typed>`;
  }

  private shapePart(part: Part, title: string, symbol: string): TemplateResult {
    const shape = this.setup[part];
    const has = controlsOf(shape.kind);
    const set = (name: keyof Setup[Part]) => (text: string): void => this.changeShape(part, { [name]: text });
    return html`<h2>${title}</h2>
      <label class="unseen" for="kind-${part}">${title}</label>
      <select id="kind-${part}" @change=${(e: Event) => this.changeShape(part, { kind: (e.target as HTMLSelectElement).value as ShapeKind })}>
        ${Object.entries(kindNames[part]).map(([kind, name]) => html`<option value=${kind} ?selected=${kind === shape.kind}>${name}</option>`)}
      </select>
      ${part === 'velocity' && has.peak ? html`<label><input type="checkbox" id="impulse" .checked=${this.setup.impulse}
        @change=${(e: Event) => this.change({ ...this.setup, impulse: (e.target as HTMLInputElement).checked })} /> a blow of given momentum, which moves the fluid too</label>` : nothing}
      ${has.formula ? this.typed(`${part}.formula`, symbol, 'formula in r, theta, x, y', shape.formula, '', set('formula'),
        'r runs from 0 at the centre to 1 at the rim; theta is in radians; x = r cos theta, y = r sin theta.', true) : nothing}
      ${has.peak ? this.typed(`${part}.peak`, symbol, has.formula ? 'times' : part === 'displacement' ? 'largest height' : this.setup.impulse ? 'momentum per area' : 'speed', shape.peak,
        part === 'displacement' ? 'mm' : this.setup.impulse ? 'N s/m²' : 'm/s', set('peak')) : nothing}
      ${has.place ? html`
        ${this.typed(`${part}.radius`, 'r', 'from the centre, in radii', shape.radius, 'a', set('radius'))}
        ${this.typed(`${part}.angle`, 'θ', 'angle, anticlockwise from the right', shape.angle, '', set('angle'))}
        ${this.typed(`${part}.width`, 'b', 'radius of it, in radii', shape.width, 'a', set('width'))}` : nothing}`;
  }

  private answers(result: RespondResult): TemplateResult {
    const { travel } = result;
    return html`<section class="panel" aria-labelledby="answers-title">
      <h2 id="answers-title">How far and how long</h2>
      <dl>
        <dt>largest travel</dt><dd id="travel">${figure(travel.displacement * 1000, 4)} mm, at ${figure(travel.at.radius, 3)} of the radius
          and ${Math.round((travel.at.angle * 180) / Math.PI)}°, ${figure(travel.time * 1000, 4)} ms after the start</dd>
        ${result.clearance ? html`<dt>least gap to the neighbour</dt><dd id="clearance">${figure(result.clearance.least * 1000, 4)} mm, at ${figure(result.clearance.at.radius, 3)} of the radius
          and ${Math.round((result.clearance.at.angle * 180) / Math.PI)}°, ${figure(result.clearance.time * 1000, 4)} ms after the start; ${result.clearance.touches
            ? `it touches first at ${figure((result.clearance.first ?? 0) * 1000, 4)} ms, at ${figure(result.clearance.firstAt.radius, 3)} of the radius and ${Math.round((result.clearance.firstAt.angle * 180) / Math.PI)}°. The motion goes on as if nothing were there`
            : 'it does not touch within the time shown'}</dd>` : nothing}
        <dt>energy at the start</dt><dd>${figure(result.energy, 3)} J</dd>
        <dt>missed by the modes used</dt><dd id="missed">${percent(result.missedEnergy, 2)} of the energy
          (${percent(result.missedDisplacement, 2)} of the shape's, ${percent(result.missedVelocity, 2)} of the motion's)</dd>
        <dt>modes used</dt><dd id="used">m up to ${result.orders}, n up to ${result.circles}; the others could move it by ${
          result.missedTravel < 0 ? 'a sum without end' : `at most about ${figure(result.missedTravel * 1000, 2)} mm`}</dd>
        <dt>period of mode (0, 1)</dt><dd>${figure(result.period * 1000, 4)} ms</dd>
        <dt>rings for 60 dB</dt><dd>${result.ringDown > 0 ? `${figure(result.ringDown, 3)} s` : 'without end: no damping is given'}</dd>
        ${result.energyDown > 0 ? html`<dt>all the energy falls by 60 dB in</dt><dd id="energy-down">${figure(result.energyDown, 3)} s after the last load</dd>` : nothing}
        ${result.histories.map((h, i) => html`<dt>point ${i + 1} is moved by</dt><dd class="movers">${h.modes.slice(0, 3).map((m) => `(${m.m}, ${m.n}) ${percent(m.share, 2)}`).join(', ') || 'nothing'}</dd>`)}
      </dl>
      ${result.warnings.map((w) => caution(w, 'Read this first'))}
      ${result.histories.length > 0 ? html`<label for="shown">The points show</label>
        <select id="shown" @change=${(e: Event) => { this.shown = Number((e.target as HTMLSelectElement).value); }}>
          ${historyKinds.map((kind, i) => html`<option value=${i} ?selected=${i === this.shown}>${kind.name}</option>`)}
        </select>` : nothing}
      <div id="history"></div>
      ${result.histories.length > 0 ? html`<hoop-table-actions .table=${historyTable(result)} .whole=${result}></hoop-table-actions>` : nothing}
      ${assumptions(result.assumptions)}
    </section>`;
  }

  private pointsPanel(): TemplateResult {
    return html`<section class="panel" aria-labelledby="points-title">
      <h2 id="points-title">Points that are watched</h2>
      <p class="help">Up to ${mostPoints}. Press on the plan to add one, drag it to move it, or type its place.</p>
      ${this.setup.points.map((point, i) => html`<div class="point">
        <div>
          ${this.typed(`points.${i}.radius`, String(i + 1), `point ${i + 1}: from the centre, in radii`, point.radius, 'a', (text) => this.setPoint(i, { radius: text }))}
          ${this.typed(`points.${i}.angle`, '', `point ${i + 1}: angle`, point.angle, '', (text) => this.setPoint(i, { angle: text }))}
        </div>
        <button type="button" @click=${() => this.change({ ...this.setup, points: this.setup.points.filter((_, j) => j !== i) })}>Remove point ${i + 1}</button>
      </div>`)}
      ${this.setup.points.length < mostPoints ? html`<div class="actions"><button type="button" @click=${() => this.addPoint(0.5, 0)}>Add a point</button></div>` : nothing}
    </section>`;
  }

  private setPoint(i: number, change: Partial<{ radius: string; angle: string }>): void {
    this.change({ ...this.setup, points: this.setup.points.map((p, j) => (j === i ? { ...p, ...change } : p)) });
  }

  private modesPanel(result: RespondResult): TemplateResult {
    const table: ShownTable = {
      name: 'modes-that-matter',
      heads: ['m', 'n', 'frequency, Hz', 'share of the energy, %'],
      rows: result.strongest.map((s) => [s.m, s.n, s.frequency, s.share * 100]),
    };
    return html`<section class="panel" aria-labelledby="matter-title">
      <h2 id="matter-title">Modes that matter</h2>
      <div class="table-scroll"><table>
        <thead><tr><th scope="col">mode (<var>m</var>, <var>n</var>)</th><th scope="col" class="number">frequency</th><th scope="col" class="number">share of the energy</th></tr></thead>
        <tbody>${result.strongest.map((s) => html`<tr><th scope="row">(${s.m}, ${s.n})</th><td class="number">${figure(s.frequency)} Hz</td><td class="number">${percent(s.share, 3)}</td></tr>`)}</tbody>
      </table></div>
      <hoop-table-actions .table=${table} .whole=${result.strongest}></hoop-table-actions>
    </section>`;
  }
}

function historyTable(result: RespondResult): ShownTable {
  return {
    name: 'histories',
    heads: ['time, s', ...result.histories.flatMap((h, i) => {
      const name = `point ${i + 1} (r ${h.point.radius}, theta ${h.point.angle} rad)`;
      return [`${name}, m`, `${name}, m/s`, `${name}, m/s²`];
    })],
    rows: Array.from(result.historyTimes, (t, j) => [t, ...result.histories.flatMap((h) => [h.values[j] ?? '', h.velocity[j] ?? '', h.acceleration[j] ?? ''])]),
  };
}
