/** The page Modes: the figures that set them, the table, and the drawing of the chosen one. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import type { Distance, Effect, Mode, ModesResult, Tautness } from '../contract.js';
import { engine, sentences } from '../engine/client.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { derivedTable } from './derived.js';
import './field.js';
import './mode-costs.js';
import './mode-drawing.js';
import { assumptions, caution } from './notes.js';
import { brief, figure, percent } from './number-text.js';
import { sharedStyle } from './style.js';
import './table-actions.js';
import type { ShownTable } from './table-copy.js';

/** The fields that move the modes most stand beside the drawing; the others are on Specify. */
const shownFields = ['ring.radius', 'tension.nominal', 'sheet.thickness'];
const shownDerived = ['sigma', 'rho', 'mass-ratio'];
const counts = [12, 24, 48, 100, 200];
const effectNames: Readonly<Record<Effect, string>> = {
  stiffness: 'bending stiffness', fluid: 'fluid that moves along', sound: 'its sound', cavity: 'cavity', masses: 'attached masses', unevenness: 'unevenness',
};

@customElement('hoop-modes')
export class HoopModes extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      tbody tr { cursor: pointer; }
      .choose { min-height: 36px; padding: 2px 10px; white-space: nowrap; font-variant-numeric: tabular-nums; }
      .count { display: flex; align-items: center; gap: 8px 18px; flex-wrap: wrap; }
      dl { display: grid; grid-template-columns: 1fr auto; gap: 3px 14px; margin: 12px 0 0; font-size: 0.94em; }
      dd { margin: 0; text-align: end; font-variant-numeric: tabular-nums; }
      .count select { width: auto; }
      details { margin-top: 12px; }
      @media print {
        .choose { display: inline !important; border: 0; padding: 0; min-height: 0; background: none; box-shadow: none; }
        td, th { padding: 2pt 4pt; }
        .count { display: none; }
      }
      summary { min-height: 44px; padding: 9px 0; cursor: pointer; color: var(--teal); }
    `,
  ];

  @state() private result: ModesResult | null = null;
  @state() private refusal = '';
  @state() private chosen = { m: 0, n: 1, upper: false };
  @state() private count = 24;
  @state() private without: readonly Effect[] = [];
  @state() private sort: 'frequency' | 'order' | 'ring-down' = 'frequency';
  /** What is listed: all, what is near or hits a line, or the modes of one number of nodal diameters. */
  @state() private filter = 'all';
  private asked: unknown = null;

  constructor() {
    super();
    new SessionController(this, () => void this.compute());
    session.addEventListener('opened', () => {
      const desk = session.recall('modes', { m: 0, n: 1, upper: false, count: 24, without: [] as Effect[] });
      this.chosen = { m: desk.m, n: desk.n, upper: desk.upper };
      this.without = desk.without;
      this.count = counts.includes(desk.count) ? desk.count : 24;
      void this.compute();
    });
  }

  private async compute(): Promise<void> {
    const { document } = session;
    const key = `${this.count} ${this.without.join()} ${JSON.stringify(document)}`;
    if (!document || key === this.asked) {
      return;
    }
    this.asked = key;
    // The even diaphragm at once; what couples its modes takes longer and follows.
    for (const quick of [true, false]) {
      const answer = await engine.call('modes', { document, count: this.count, without: [...this.without], quick }, { key: 'modes' });
      if (answer.kind === 'result') {
        this.result = answer.result;
        this.refusal = '';
        if (!answer.result.rough) {
          return;
        }
      } else {
        if (answer.kind === 'refused') {
          this.refusal = sentences(answer);
        }
        return;
      }
    }
  }

  private pick(mode: Mode): void {
    this.chosen = { m: mode.m, n: mode.n, upper: mode.upper };
    this.keepDesk();
  }

  private keepDesk(): void {
    session.remember('modes', { ...this.chosen, count: this.count, without: this.without });
  }

  private setCount(event: Event): void {
    this.count = Number((event.target as HTMLSelectElement).value);
    this.keepDesk();
    void this.compute();
  }

  protected override render(): TemplateResult {
    const { document } = session;
    if (!document) {
      return html`<section class="panel"><p role="status">${session.message || 'Opening the diaphragm…'}</p></section>`;
    }
    const rows = session.rows.filter((r) => shownFields.includes(r.field));
    const mode = this.result?.modes.find((m) => this.isChosen(m));
    return html`
      <section class="panel" aria-label="The diaphragm and the chosen mode"><div class="split">
        <div>
          <h2>The diaphragm</h2>
          ${rows.map((r) => html`<hoop-field .row=${r} terse data-field=${r.field}></hoop-field>`)}
          ${derivedTable(session.derived.filter((d) => shownDerived.includes(d.id)))}
          ${this.refusal ? html`<p class="error" role="alert">${this.refusal}</p>` : nothing}
          ${(this.result?.cautions ?? []).map((c) => caution(c, 'Read this first'))}
          <hoop-mode-costs .document=${document} .m=${this.chosen.m} .n=${this.chosen.n} .upper=${this.chosen.upper}></hoop-mode-costs>
        </div>
        <div class="drawing">
          <h2>Mode (${this.chosen.m}, ${this.chosen.n})${mode && mode.split > 0 ? (mode.upper ? ', upper' : ', lower') : ''}</h2>
          <hoop-mode-drawing .document=${document} .without=${this.without} .m=${this.chosen.m} .n=${this.chosen.n} .upper=${this.chosen.upper} .clamps=${document.ring.clamps}
            .caption=${mode ? `${figure(mode.frequency)} Hz; ${mode.nodalLines}` : ''}></hoop-mode-drawing>
          ${mode ? this.modeFigures(mode) : nothing}
        </div>
      </div></section>
      ${this.result ? this.table(this.result) : nothing}`;
  }

  private modeFigures(mode: Mode): TemplateResult {
    const d = mode.damping;
    return html`<dl id="mode-figures">
      ${mode.split > 0 ? html`<dt>the other of its pair</dt><dd>${figure(mode.partner)} Hz</dd>
        <dt>split of the pair</dt><dd>${figure(mode.splitHertz, 3)} Hz, ${percent(mode.split, 3)}</dd>
        <dt>a nodal line lies at</dt><dd>${degrees(mode.nodalAngle)}</dd>` : nothing}
      ${mode.even > 0 ? html`<dt>even, without masses</dt><dd>${figure(mode.even)} Hz</dd>
        <dt>energy that is that mode's</dt><dd>${percent(mode.share, 3)}</dd>` : nothing}
      <dt>ideal sheet in vacuum</dt><dd>${figure(mode.ideal)} Hz</dd>
      <dt>error of the computation</dt><dd>${mode.error > 0 ? `below ${figure(mode.error, 1)} Hz` : 'none to speak of'}</dd>
      ${mode.fluidShare > 0 ? html`<dt>fluid in the moving mass</dt><dd>${percent(mode.fluidShare, 3)}</dd>` : nothing}
      <dt>damping ratio</dt><dd>${percent(d.total, 3)}</dd>
      <dt>of it radiation, computed</dt><dd>${d.radiationKnown ? percent(d.radiation, 2) : 'not stated'}</dd>
      <dt>friction of the fluid, computed</dt><dd>${percent(d.viscous, 2)}</dd>
      <dt>loss of the sheet, by its energy</dt><dd>${percent(d.sheet, 2)}</dd>
      <dt>remainder, as given</dt><dd>${percent(d.remainder, 2)}</dd>
      <dt>quality factor</dt><dd>${mode.q > 0 ? figure(mode.q, 3) : '–'}</dd>
    </dl>`;
  }

  private toggle(effect: Effect): void {
    this.without = this.without.includes(effect) ? this.without.filter((e) => e !== effect) : [...this.without, effect];
    this.keepDesk();
    void this.compute();
  }

  private sorted(modes: readonly Mode[]): readonly Mode[] {
    switch (this.sort) {
      case 'order':
        return [...modes].sort((a, b) => a.m - b.m || a.n - b.n);
      case 'ring-down':
        return [...modes].sort((a, b) => b.ringDown - a.ringDown);
      default:
        return modes;
    }
  }

  private shown(modes: readonly Mode[]): readonly Mode[] {
    switch (this.filter) {
      case 'all':
        return modes;
      case 'close':
        return modes.filter((mode) => mode.belowLowest || (mode.distances[0] !== undefined && mode.distances[0].clearance !== 'clear'));
      default:
        return modes.filter((mode) => mode.m === Number(this.filter));
    }
  }

  private table(result: ModesResult): TemplateResult {
    const listed = this.sorted(this.shown(result.modes));
    const table = shownTable(listed);
    const diameters = [...new Set(result.modes.map((mode) => mode.m))].sort((a, b) => a - b);
    return html`<section class="panel" aria-labelledby="modes-title">
      <h2 id="modes-title">The lowest ${result.modes.length} modes</h2>
      <div class="count">
        <label>Modes to list <select @change=${this.setCount}>${counts.map((c) => html`<option ?selected=${c === this.count}>${c}</option>`)}</select></label>
        <label>sorted by <select id="sort" @change=${(e: Event) => { this.sort = (e.target as HTMLSelectElement).value as typeof this.sort; }}>
          <option value="frequency">frequency</option><option value="order">nodal diameters</option><option value="ring-down">ring-down</option></select></label>
        <label>shown <select id="filter" @change=${(e: Event) => { this.filter = (e.target as HTMLSelectElement).value; }}>
          <option value="all">all</option><option value="close">near, hit or too low</option>
          ${diameters.map((m) => html`<option value=${m} ?selected=${String(m) === this.filter}>${m === 0 ? 'no nodal diameter' : m === 1 ? '1 nodal diameter' : `${m} nodal diameters`}</option>`)}</select></label>
      </div>
      <fieldset class="count"><legend class="unseen">Effects taken into account</legend>
        ${result.applies.map((e) => html`<label><input type="checkbox" .checked=${!this.without.includes(e)} @change=${() => this.toggle(e)} /> ${effectNames[e]}</label>`)}</fieldset>
      ${result.rough ? html`<p role="status" id="rough">The even diaphragm is listed; uneven tension and attached masses are being put in…</p>` : nothing}
      ${result.smallest && result.largest ? html`<p id="tautness">Smallest tension ${taut(result.smallest)}; largest ${taut(result.largest)}.</p>` : nothing}
      <div class="table-scroll"><table id="mode-table">
        <thead><tr>
          <th scope="col">mode (<var>m</var>, <var>n</var>)</th><th scope="col" class="number">frequency</th><th scope="col" class="number">ideal</th>
          <th scope="col" class="number">rings for 60 dB</th><th scope="col">nodal lines</th><th scope="col">nearest line to keep clear of</th>
        </tr></thead>
        <tbody>${listed.map((mode) => this.modeRow(mode))}</tbody>
      </table></div>
      ${listed.length < result.modes.length ? html`<p role="status" id="filtered">${listed.length} of ${result.modes.length} are shown, and copied or saved.</p>` : nothing}
      <hoop-table-actions .table=${table} .whole=${result}></hoop-table-actions>
      ${assumptions(result.assumptions)}
    </section>`;
  }

  private isChosen(mode: Mode): boolean {
    return mode.m === this.chosen.m && mode.n === this.chosen.n && mode.upper === this.chosen.upper;
  }

  private modeRow(mode: Mode): TemplateResult {
    const chosen = this.isChosen(mode);
    return html`<tr class=${chosen ? 'chosen' : ''} @click=${() => this.pick(mode)}>
      <th scope="row"><button type="button" class="choose" aria-pressed=${chosen ? 'true' : 'false'}
        aria-label="Draw mode (${mode.m}, ${mode.n})${mode.split > 0 ? (mode.upper ? ', upper of the pair' : ', lower of the pair') : ''}">(${mode.m}, ${mode.n})</button></th>
      <td class="number" title=${mode.error > 0 ? `error of the computation below ${figure(mode.error, 1)} Hz` : ''}>${figure(mode.frequency)} Hz</td>
      <td class="number">${figure(mode.ideal)} Hz</td>
      <td class="number">${mode.ringDown > 0 ? `${figure(mode.ringDown, 2)} s` : '–'}</td>
      <td>${mode.nodalLines}${mode.split > 0 ? html`<br /><span class="soft">${mode.upper ? 'upper' : 'lower'} of a pair split by ${figure(mode.splitHertz, 2)} Hz (${percent(mode.split, 2)}); the other at ${figure(mode.partner)} Hz</span>` : nothing}${mode.kind ? html` <span class="chip">${mode.kind}</span>` : nothing}</td>
      <td>${nearest(mode)}</td>
    </tr>`;
  }
}

function degrees(angle: number): string {
  return `${Math.round((angle * 180) / Math.PI)}°`;
}

function taut(t: Tautness): string {
  return `${figure(t.tension, 3)} N/m (${percent(t.share, 3)} of the mean) ${t.radius < 0.005 ? 'in the middle' : `at ${figure(t.radius, 2)} of the radius, ${degrees(t.angle)}`}, pulling along ${degrees(t.direction)}`;
}

function nearest(mode: Mode): TemplateResult {
  const distance = mode.distances[0];
  return html`${mode.belowLowest ? html`<span class="chip hit">below the lowest allowed</span> ` : nothing}
    ${distance ? html`${words(distance)} <span class="chip ${distance.clearance}">${distance.clearance}</span>` : mode.belowLowest ? nothing : 'none given'}`;
}

function words(distance: Distance): string {
  return `${distance.line} ${brief(distance.lineFrequency)} Hz, ${percent(Math.abs(distance.relative), 2)} ${distance.relative < 0 ? 'below' : 'above'}`;
}

function shownTable(modes: readonly Mode[]): ShownTable {
  return {
    name: 'modes',
    heads: ['m', 'n', 'of a split pair', 'frequency, Hz', 'error below, Hz', 'other of the pair, Hz', 'split, %', 'nodal line at, °', 'ideal, Hz', 'rings for 60 dB, s', 'damping ratio', 'nodal lines', 'nearest line', 'line, Hz', 'distance, %', 'clearance'],
    rows: modes.map((mode) => {
      const d = mode.distances[0];
      return [mode.m, mode.n, mode.split > 0 ? (mode.upper ? 'upper' : 'lower') : '', mode.frequency, mode.error, ...(mode.split > 0 ? [mode.partner, mode.split * 100, (mode.nodalAngle * 180) / Math.PI] : ['', '', '']), mode.ideal, mode.ringDown, mode.damping.total, mode.nodalLines, d?.line ?? '', d?.lineFrequency ?? '', d ? d.relative * 100 : '', d?.clearance ?? ''];
    }),
  };
}
