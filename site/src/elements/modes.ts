/** The page Modes: the figures that set them, the table, and the drawing of the chosen one. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import type { Distance, Mode, ModesResult } from '../contract.js';
import { engine, sentences } from '../engine/client.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { derivedTable } from './derived.js';
import './field.js';
import './mode-drawing.js';
import { assumptions, caution } from './notes.js';
import { brief, figure, percent } from './number-text.js';
import { sharedStyle } from './style.js';
import './table-actions.js';
import type { ShownTable } from './table-copy.js';

/** The fields that move the modes most stand beside the drawing; the others are on Specify. */
const shownFields = ['ring.radius', 'tension.nominal', 'sheet.thickness'];
const shownDerived = ['sigma', 'rho', 'mass-ratio', 'stress-share'];
const counts = [12, 24, 48, 100, 200];

@customElement('hoop-modes')
export class HoopModes extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      tbody tr { cursor: pointer; }
      .choose { min-height: 36px; padding: 2px 10px; font-variant-numeric: tabular-nums; }
      .count { display: flex; align-items: center; gap: 8px; flex-wrap: wrap; }
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
  @state() private chosen = { m: 0, n: 1 };
  @state() private count = 24;
  private asked: unknown = null;

  constructor() {
    super();
    new SessionController(this, () => void this.compute());
    session.addEventListener('opened', () => {
      const desk = session.recall('modes', { m: 0, n: 1, count: 24 });
      this.chosen = { m: desk.m, n: desk.n };
      this.count = counts.includes(desk.count) ? desk.count : 24;
      void this.compute();
    });
  }

  private async compute(): Promise<void> {
    const { document } = session;
    const key = `${this.count} ${JSON.stringify(document)}`;
    if (!document || key === this.asked) {
      return;
    }
    this.asked = key;
    const answer = await engine.call('modes', { document, count: this.count }, { key: 'modes', quick: true });
    if (answer.kind === 'result') {
      this.result = answer.result;
      this.refusal = '';
    } else if (answer.kind === 'refused') {
      this.refusal = sentences(answer);
    }
  }

  private pick(mode: { m: number; n: number }): void {
    this.chosen = { m: mode.m, n: mode.n };
    this.keepDesk();
  }

  private keepDesk(): void {
    session.remember('modes', { ...this.chosen, count: this.count });
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
    const mode = this.result?.modes.find((m) => m.m === this.chosen.m && m.n === this.chosen.n);
    return html`
      <section class="panel" aria-label="The diaphragm and the chosen mode"><div class="split">
        <div>
          <h2>The diaphragm</h2>
          ${rows.map((r) => html`<hoop-field .row=${r} terse data-field=${r.field}></hoop-field>`)}
          ${derivedTable(session.derived.filter((d) => shownDerived.includes(d.id)))}
          ${this.refusal ? html`<p class="error" role="alert">${this.refusal}</p>` : nothing}
          ${(this.result?.cautions ?? []).map((c) => caution(c, 'Read this first'))}
        </div>
        <div class="drawing">
          <h2>Mode (${this.chosen.m}, ${this.chosen.n})</h2>
          <hoop-mode-drawing .m=${this.chosen.m} .n=${this.chosen.n} .clamps=${document.ring.clamps}
            .caption=${mode ? `${figure(mode.frequency)} Hz as an ideal sheet; ${mode.nodalLines}` : ''}></hoop-mode-drawing>
        </div>
      </div></section>
      ${this.result ? this.table(this.result) : nothing}`;
  }

  private table(result: ModesResult): TemplateResult {
    const table = shownTable(result.modes);
    return html`<section class="panel" aria-labelledby="modes-title">
      <h2 id="modes-title">The lowest ${result.modes.length} modes</h2>
      <label class="count">Modes to list
        <select @change=${this.setCount}>${counts.map((c) => html`<option ?selected=${c === this.count}>${c}</option>`)}</select></label>
      <div class="table-scroll"><table id="mode-table">
        <thead><tr>
          <th scope="col">mode (<var>m</var>, <var>n</var>)</th><th scope="col" class="number">ideal frequency</th>
          <th scope="col" class="number">to (0, 1)</th><th scope="col">nodal lines</th><th scope="col">nearest line to keep clear of</th>
        </tr></thead>
        <tbody>${result.modes.map((mode) => this.modeRow(mode, result.modes[0]))}</tbody>
      </table></div>
      <hoop-table-actions .table=${table} .whole=${result}></hoop-table-actions>
      ${assumptions(result.assumptions)}
    </section>`;
  }

  private modeRow(mode: Mode, lowest: Mode | undefined): TemplateResult {
    const chosen = mode.m === this.chosen.m && mode.n === this.chosen.n;
    return html`<tr class=${chosen ? 'chosen' : ''} @click=${() => this.pick(mode)}>
      <th scope="row"><button type="button" class="choose" aria-pressed=${chosen ? 'true' : 'false'}
        aria-label="Draw mode (${mode.m}, ${mode.n})">(${mode.m}, ${mode.n})</button></th>
      <td class="number">${figure(mode.frequency)} Hz</td>
      <td class="number">${lowest ? figure(mode.frequency / lowest.frequency, 4) : ''}</td>
      <td>${mode.nodalLines}</td>
      <td>${nearest(mode)}</td>
    </tr>`;
  }
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
    heads: ['m', 'n', 'ideal frequency, Hz', 'zero of J_m', 'nodal lines', 'nearest line', 'line, Hz', 'distance, %', 'clearance'],
    rows: modes.map((mode) => {
      const d = mode.distances[0];
      return [mode.m, mode.n, mode.frequency, mode.zero, mode.nodalLines, d?.line ?? '', d?.lineFrequency ?? '', d ? d.relative * 100 : '', d?.clearance ?? ''];
    }),
  };
}
