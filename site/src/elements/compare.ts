/** Two diaphragms side by side: what is on the page now against a kept revision, or against another one. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import type { CompareResult, Diaphragm, RecordInfo } from '../contract.js';
import { engine, sentences } from '../engine/client.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { figure, percent } from './number-text.js';
import { sharedStyle } from './style.js';
import './table-actions.js';
import { when } from './when.js';

const count = 24;

@customElement('hoop-compare')
export class HoopCompare extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      select { max-width: 100%; }
      tr.differs th, tr.differs td { font-weight: 600; }
      .pairs { display: flex; gap: 8px 18px; align-items: center; flex-wrap: wrap; }
    `,
  ];

  @state() private records: readonly RecordInfo[] = [];
  /** What it is held against: "revision 3" or "record <id>"; empty for nothing. */
  @state() private against = '';
  @state() private result: CompareResult | null = null;
  @state() private wrong = '';
  private other: Diaphragm | null = null;
  private asked = '';

  constructor() {
    super();
    new SessionController(this, () => void this.compute());
    session.addEventListener('opened', () => void this.opened());
    session.addEventListener('kept', () => this.requestUpdate());
  }

  override connectedCallback(): void {
    super.connectedCallback();
    if (session.document) {
      void this.opened();
    }
  }

  private async opened(): Promise<void> {
    this.result = null;
    this.other = null;
    const answer = await engine.store('records.list', {});
    this.records = answer.kind === 'result' ? answer.result.records.filter((r) => r.id !== session.document?.id && r.deleted === '') : [];
    await this.choose(session.recall('compare', { against: '' }).against);
  }

  private async choose(against: string): Promise<void> {
    this.against = against;
    this.other = null;
    this.result = null;
    this.wrong = '';
    this.asked = '';
    session.remember('compare', { against });
    const { document } = session;
    const [kind, which] = against.split(' ');
    if (!document || !which) {
      return;
    }
    const answer = kind === 'revision' ? await engine.store('records.revision', { id: document.id, number: Number(which) }) : await engine.store('records.open', { id: which });
    if (against !== this.against) {
      return;
    }
    if (answer.kind === 'result') {
      this.other = answer.result.document;
      await this.compute();
    } else {
      this.wrong = sentences(answer);
    }
  }

  private async compute(): Promise<void> {
    const { document } = session;
    if (!document || !this.other) {
      return;
    }
    const asked = JSON.stringify([document, this.against]);
    if (asked === this.asked) {
      return;
    }
    this.asked = asked;
    const answer = await engine.call('compare', { document, other: this.other, count }, { key: 'compare' });
    if (answer.kind === 'result') {
      this.result = answer.result;
      this.wrong = '';
    } else if (answer.kind === 'refused') {
      this.wrong = sentences(answer);
    }
  }

  protected override render(): TemplateResult | typeof nothing {
    if (!session.document) {
      return nothing;
    }
    const { revisions } = session;
    const choices = [
      ...[...revisions].reverse().map((r) => ({ value: `revision ${r.number}`, name: `revision ${r.number}, kept ${when(r.kept)}${r.note ? `: ${r.note}` : ''}` })),
      ...this.records.map((r) => ({ value: `record ${r.id}`, name: `${r.name}${r.place ? `, ${r.place}` : ''}` })),
    ];
    return html`<section class="panel" aria-labelledby="compare-title"><h2 id="compare-title">Side by side</h2>
      ${choices.length === 0
        ? html`<p>Keep a revision (at the top), or make another diaphragm: then what is on the page now can be held against it.</p>`
        : html`<label class="pairs">Now against <select id="against" @change=${(e: Event) => void this.choose((e.target as HTMLSelectElement).value)}>
            <option value="">nothing</option>${choices.map((c) => html`<option value=${c.value} ?selected=${c.value === this.against}>${c.name}</option>`)}</select></label>`}
      ${this.wrong ? html`<p class="error" role="alert">${this.wrong}</p>` : nothing}
      ${this.result ? this.differences(this.result) : nothing}
    </section>`;
  }

  private differences(result: CompareResult): TemplateResult {
    const table = {
      name: 'side-by-side',
      heads: ['m', 'n', 'of a split pair', 'now, Hz', 'other, Hz', 'difference, %', 'now rings for 60 dB, s', 'other, s', 'now', 'other', 'verdict changed'],
      rows: result.modes.map((r) => [r.m, r.n, r.upper ? 'upper' : '', r.frequency, r.other > 0 ? r.other : '', r.other > 0 ? r.relative * 100 : '', r.ringDown, r.otherRingDown, r.verdict, r.otherVerdict, r.differs ? 'yes' : 'no']),
    };
    return html`
      <p id="difference" role="status">${result.lines.length === 0 ? 'Nothing specified differs.' : `${result.lines.length === 1 ? 'One line' : `${result.lines.length} lines`} of the specification ${result.lines.length === 1 ? 'differs' : 'differ'}.`}
        ${result.changed === 0 ? 'No mode stands otherwise to the lines to keep clear of.' : `${result.changed === 1 ? 'One mode stands' : `${result.changed} modes stand`} otherwise to the lines to keep clear of.`}</p>
      ${result.lines.length > 0 ? html`<div class="table-scroll"><table id="different-lines">
        <thead><tr><th scope="col">specified</th><th scope="col" class="number">now</th><th scope="col" class="number">other</th></tr></thead>
        <tbody>${result.lines.map((l) => html`<tr><th scope="row">${l.group}: ${l.name}</th><td class="number">${l.now === '' ? '–' : `${l.now} ${l.unit}`}</td>
          <td class="number">${l.other === '' ? '–' : `${l.other} ${l.unit}`}</td></tr>`)}</tbody></table></div>` : nothing}
      <div class="table-scroll"><table id="different-modes">
        <thead><tr><th scope="col">mode (<var>m</var>, <var>n</var>)</th><th scope="col" class="number">now</th><th scope="col" class="number">other</th>
          <th scope="col" class="number">difference</th><th scope="col">now</th><th scope="col">other</th></tr></thead>
        <tbody>${result.modes.map((r) => html`<tr class=${r.differs ? 'differs' : ''}>
          <th scope="row">(${r.m}, ${r.n})${r.upper ? ', upper' : ''}</th><td class="number">${figure(r.frequency)} Hz</td>
          <td class="number">${r.other > 0 ? `${figure(r.other)} Hz` : '–'}</td><td class="number">${r.other > 0 ? percent(r.relative, 3, true) : '–'}</td>
          <td>${r.verdict}${r.differs ? html` <span class="chip near">changed</span>` : nothing}</td><td>${r.otherVerdict}</td></tr>`)}</tbody>
      </table></div>
      <hoop-table-actions .table=${table} .whole=${result}></hoop-table-actions>`;
  }
}
