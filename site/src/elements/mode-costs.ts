/** What each effect costs the chosen mode, and what its frequency depends on most. Bars in ink; the figures say it too. */
import { css, html, LitElement, nothing, svg, type TemplateResult } from 'lit';
import { customElement, property, state } from 'lit/decorators.js';

import type { CostsResult, Diaphragm } from '../contract.js';
import { engine } from '../engine/client.js';
import { figure, percent } from './number-text.js';
import { sharedStyle } from './style.js';

@customElement('hoop-mode-costs')
export class HoopModeCosts extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      svg { display: block; width: 100%; height: 12px; }
      .bar { fill: var(--ink); }
      td.bars { width: 34%; min-width: 4em; }
      #costs th, #costs td { padding: 5px 6px; vertical-align: middle; }
      summary { min-height: 44px; padding: 9px 0; cursor: pointer; color: var(--teal); }
    `,
  ];

  @property({ attribute: false }) document: Diaphragm | null = null;
  @property({ type: Number }) m = 0;
  @property({ type: Number }) n = 1;
  /** The higher of a split pair. */
  @property({ type: Boolean }) upper = false;
  @state() private result: CostsResult | null = null;
  /** The mode that the result is of. */
  @state() private of = '';
  @state() private open = false;
  /** Share of the sensitivities that is computed. */
  @state() private share = 0;
  private asked = '';
  private timer: ReturnType<typeof setTimeout> | undefined;

  protected override willUpdate(): void {
    const { document, m, n, upper, open } = this;
    const asked = JSON.stringify([document, m, n, upper, open]);
    if (document && asked !== this.asked) {
      this.asked = asked;
      clearTimeout(this.timer);
      void this.ask(document, true);
      // The sensitivities take longest, so they wait until nobody types.
      if (open) {
        this.timer = setTimeout(() => void this.ask(document, false), 600);
      }
    }
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    clearTimeout(this.timer);
  }

  private async ask(document: Diaphragm, short: boolean): Promise<void> {
    const { m, n, upper } = this;
    this.share = 0;
    const answer = await engine.call('costs', { document, m, n, upper, short }, { key: 'mode-costs', onProgress: (share) => { this.share = share; } });
    if (answer.kind === 'result') {
      this.result = answer.result;
      this.of = `(${m}, ${n})`;
      if (!short) {
        this.share = 1;
      }
    }
  }

  protected override render(): TemplateResult | typeof nothing {
    const { result } = this;
    if (!result) {
      return nothing;
    }
    const most = Math.max(...result.steps.map((s) => s.frequency));
    return html`<h2>What each effect costs mode ${this.of}</h2>
      <table id="costs"><tbody>${result.steps.map((step, i) => html`<tr>
        <th scope="row">${step.name}</th>
        <td class="bars"><svg viewBox="0 0 100 12" preserveAspectRatio="none" aria-hidden="true">${svg`<rect class="bar" x="0" y="2" height="8" width=${(100 * step.frequency) / most}></rect>`}</svg></td>
        <td class="number">${figure(step.frequency)} Hz</td><td class="number">${i === 0 ? '' : percent(step.change, 2, true)}</td></tr>`)}</tbody></table>
      ${result.note ? html`<p class="soft">${result.note}</p>` : nothing}
      <details @toggle=${(e: Event) => { this.open = (e.target as HTMLDetailsElement).open; }}><summary>What its frequency depends on most</summary>
        ${this.share < 1 ? html`<p class="soft" role="status">Computing… <progress max="1" value=${this.share} aria-label="share of the inputs done"></progress></p>` : nothing}
        <table id="sensitivities"><thead><tr><th scope="col">input</th><th scope="col" class="number">change of frequency for 1 % of it</th></tr></thead>
        <tbody>${result.sensitivities.map((s) => html`<tr><th scope="row">${s.name}</th><td class="number">${percent(s.perPercent / 100, 2, true)}</td></tr>`)}</tbody></table></details>`;
  }
}
